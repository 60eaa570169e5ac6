// Releasing animals: numbers by patch and class, of which those that survive it are there from now on.
import { f64At, i32At, putF64, putU32, u32At } from '../arrays';
import * as batch from '../batch';
import { philoxLanes } from '../draws/philox';
import { finalise, firstWord, streamOf, unit } from '../draws/stream';
import { classes, classKeys, operand, patches, patchKeys, section, sectionAt } from '../image';
import * as layout from '../layout';
import { clearColumns, columnOf, isActive, surviveHandling } from './handling';

export function release(record: usize): void {
  clearColumns(record);
  if (!isActive(record, batch.step)) return;
  const amounts = sectionAt(operand(record, layout.handledAmounts), batch.step);
  const inPatches = section(operand(record, layout.handledPatches));
  for (let patch = 0; patch < patches; patch++) {
    if (i32At(inPatches, patch) === 0) continue;
    const key = u32At(patchKeys, patch);
    philoxLanes(batch.words, batch.replicates, batch.step, key, operand(record, layout.recordKey));
    for (let c = 0; c < classes; c++) {
      const number = f64At(amounts, patch * classes + c);
      if (number <= 0) continue;
      bringNew(record, number, c);
      const row = batch.animals + <usize>patch * batch.rowBytes();
      surviveHandling(record, row + <usize>c * batch.cellBytes, c);
    }
  }
}

/** counts[lane] = a whole number with this mean, in the lanes that still run. */
function bringNew(record: usize, number: f64, c: i32): void {
  const stream = streamOf(u32At(classKeys, c), layout.useQuota);
  const handled = columnOf(record, 0);
  const whole = floor<f64>(number);
  for (let lane = 0; lane < layout.lanes; lane++) {
    const at = batch.words + ((<usize>lane) << 3);
    const u = unit(firstWord(finalise(load<u64>(at) + stream), finalise(load<u64>(at, batch.laneNumbers) + stream)));
    const n = batch.isStopped(lane) ? 0 : u < number - whole ? whole + 1 : whole;
    putU32(batch.counts, lane, u32(n));
    putF64(handled, lane, f64At(handled, lane) + n);
  }
}
