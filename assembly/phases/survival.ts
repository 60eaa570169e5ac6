// Survival: each animal lives with the chance of its class and patch.
import { f64At, u32At } from '../arrays';
import { animals, cellBytes, rates, replicates, rowBytes, step, words } from '../batch';
import { drawCell, occupied, scaledRates, slotCount } from '../cells';
import { philoxLanes } from '../draws/philox';
import { streamOf } from '../draws/stream';
import { classes, classKeys, operand, patches, patchKeys, section, sectionAt } from '../image';
import { recordKey, survivalRates, survivalSlots, useSurvive } from '../layout';

export function survive(record: usize): void {
  const table = sectionAt(operand(record, survivalRates), step);
  const lists = section(operand(record, survivalSlots));
  for (let patch = 0; patch < patches; patch++) {
    const row = animals + <usize>patch * rowBytes();
    if (!occupied(row, rowBytes())) continue;
    philoxLanes(words, replicates, step, u32At(patchKeys, patch), operand(record, recordKey));
    for (let c = 0; c < classes; c++) {
      const rate = f64At(table, patch * classes + c);
      const cell = row + <usize>c * cellBytes;
      if ((rate === 1 && slotCount(lists, c) === 0) || !occupied(cell, cellBytes)) continue;
      scaledRates(rates, rate, lists, c, patch);
      drawCell(cell, cell, streamOf(u32At(classKeys, c), useSurvive));
    }
  }
}
