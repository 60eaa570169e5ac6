// Demography: one matrix holds a whole year. Fates of each class are one multinomial draw, births a Poisson draw an entry;
// both are taken from the animals before the phase.
import { f64At, putU32, u32At } from '../arrays';
import * as batch from '../batch';
import { addCell, drawCell, occupied, scaledRates, subtractCell } from '../cells';
import { philoxLanes } from '../draws/philox';
import { poisson } from '../draws/poisson';
import { streamOf, substreamOf } from '../draws/stream';
import { classes, classKeys, operand, patches, patchKeys, section, sectionAt } from '../image';
import * as layout from '../layout';

export function liveYear(record: usize): void {
  const fates = sectionAt(operand(record, layout.demographyFates), batch.step);
  const births = sectionAt(operand(record, layout.demographyBirths), batch.step);
  for (let patch = 0; patch < patches; patch++) {
    const row = batch.animals + <usize>patch * batch.rowBytes();
    if (!occupied(row, batch.rowBytes())) continue;
    const key = u32At(patchKeys, patch);
    philoxLanes(batch.words, batch.replicates, batch.step, key, operand(record, layout.recordKey));
    // The first row of the arrivals serves as the next state of the patch.
    memory.fill(batch.arrivals, 0, batch.rowBytes());
    const matrix = (<usize>(patch * classes * classes)) << 3;
    for (let c = 0; c < classes; c++) {
      const cell = row + <usize>c * batch.cellBytes;
      if (!occupied(cell, batch.cellBytes)) continue;
      scaledRates(batch.numbers, 1, section(operand(record, layout.demographyFateSlots)), c, patch);
      drawFates(c, cell, fates + matrix + ((<usize>c) << 3));
      scaledRates(batch.numbers, 1, section(operand(record, layout.demographyBirthSlots)), c, patch);
      drawBirths(c, cell, births + matrix + ((<usize>c) << 3), operand(record, layout.recordIndex));
    }
    memory.copy(row, batch.arrivals, batch.rowBytes());
  }
}

function keyOf(c: i32): u32 {
  return u32At(classKeys, c);
}

/** A multinomial draw by conditional binomials; who is left over dies. `column` is the first entry of the column. */
function drawFates(from: i32, cell: usize, column: usize): void {
  const stream = streamOf(keyOf(from), layout.useFate);
  const left = batch.counts;
  memory.copy(left, cell, batch.cellBytes);
  scaledRates(batch.moreNumbers, 1, 0, from, 0);
  for (let to = 0; to < classes; to++) {
    const share = f64At(column, to * classes);
    if (share === 0) continue;
    takeShare(share);
    drawCell(batch.moreCounts, left, substreamOf(stream, keyOf(to)));
    addCell(batch.arrivals + <usize>to * batch.cellBytes, batch.moreCounts);
    subtractCell(left, batch.moreCounts);
  }
}

/** rates = share × scale / rest, and rest −= share × scale, where rest (`moreNumbers`) is the chance not given away yet. */
function takeShare(share: f64): void {
  for (let i: usize = 0; i < batch.laneNumbers; i += 16) {
    const scaled = f64x2.mul(f64x2.splat(share), v128.load(batch.numbers + i));
    const rest = v128.load(batch.moreNumbers + i);
    v128.store(batch.rates + i, f64x2.min(f64x2.div(scaled, rest), f64x2.splat(1)));
    v128.store(batch.moreNumbers + i, f64x2.max(f64x2.sub(rest, scaled), f64x2.splat(1e-300)));
  }
}

function drawBirths(from: i32, cell: usize, column: usize, index: i32): void {
  const stream = streamOf(keyOf(from), layout.useBirth);
  for (let to = 0; to < classes; to++) {
    const births = f64At(column, to * classes);
    if (births === 0) continue;
    addBirths(cell, batch.arrivals + <usize>to * batch.cellBytes, births, substreamOf(stream, keyOf(to)), index);
  }
}

function addBirths(cell: usize, target: usize, births: f64, stream: u64, index: i32): void {
  for (let lane = 0; lane < layout.lanes; lane++) {
    const n = u32At(cell, lane);
    if (n === 0) continue;
    const at = (<usize>lane) << 3;
    const mean = f64(n) * births * load<f64>(batch.numbers + at);
    const young = poisson(mean, load<u64>(batch.words + at), load<u64>(batch.words + at, 128), stream);
    const sum = f64(u32At(target, lane)) + young;
    if (sum > layout.mostAnimals) batch.stopLane(lane, layout.faultTooMany, index);
    putU32(target, lane, sum > layout.mostAnimals ? 0 : u32(sum));
  }
}
