// Ageing: a share of each class goes on to the next, or leaves the model; the others stay. All at once.
import { f64At, i32At, u32At } from '../arrays';
import { animals, arrivals, cellBytes, moreCounts, rates, replicates, rowBytes, step, words } from '../batch';
import { addCell, drawCell, occupied, scaledRates, subtractCell } from '../cells';
import { philoxLanes } from '../draws/philox';
import { streamOf } from '../draws/stream';
import { classes, classKeys, operand, patches, patchKeys, section } from '../image';
import { ageingAdvance, ageingByPatch, ageingNext, recordKey, useAdvance } from '../layout';

export function age(record: usize): void {
  const next = section(operand(record, ageingNext));
  const chance =
    anyChance(section(operand(record, ageingAdvance)), classes) || anyChance(sharesByPatch(record), patches * classes);
  for (let patch = 0; patch < patches; patch++) {
    const row = animals + <usize>patch * rowBytes();
    if (!occupied(row, rowBytes())) continue;
    if (chance) {
      philoxLanes(words, replicates, step, u32At(patchKeys, patch), operand(record, recordKey));
    }
    const advance = advanceShares(record, patch);
    // The first row of the arrivals serves as the next state of the patch.
    memory.fill(arrivals, 0, rowBytes());
    for (let c = 0; c < classes; c++) {
      const to = i32At(next, c);
      ageClass(c, row + <usize>c * cellBytes, f64At(advance, c), to);
    }
    memory.copy(row, arrivals, rowBytes());
  }
}

function sharesByPatch(record: usize): usize {
  return section(operand(record, ageingByPatch));
}

/** By class, in a patch. */
export function advanceShares(record: usize, patch: i32): usize {
  const byPatch = sharesByPatch(record);
  if (byPatch === 0) return section(operand(record, ageingAdvance));
  return byPatch + ((<usize>(patch * classes)) << 3);
}

function anyChance(advance: usize, count: i32): bool {
  if (advance === 0) return false;
  for (let c = 0; c < count; c++) {
    const share = f64At(advance, c);
    if (share > 0 && share < 1) return true;
  }
  return false;
}

function ageClass(c: i32, cell: usize, share: f64, to: i32): void {
  let going = cell;
  if (share < 1) {
    const staying = arrivals + <usize>c * cellBytes;
    addCell(staying, cell);
    if (share <= 0) return;
    scaledRates(rates, share, 0, c, 0);
    drawCell(moreCounts, cell, streamOf(u32At(classKeys, c), useAdvance));
    subtractCell(staying, moreCounts);
    going = moreCounts;
  }
  if (to >= 0) addCell(arrivals + <usize>to * cellBytes, going);
}
