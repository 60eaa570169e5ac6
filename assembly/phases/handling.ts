// Taking and moving animals: a quota of a group of cells, drawn without replacement, never more than there are.
import { f64At, i32At, putF64, putU32, u32At } from '../arrays';
import * as batch from '../batch';
import { addCell, drawCell, occupied, scaledRates, subtractCell } from '../cells';
import { hypergeometric } from '../draws/hypergeometric';
import { philoxLanes } from '../draws/philox';
import { finalise, firstWord, streamOf, unit } from '../draws/stream';
import { classes, classKeys, operand, patches, patchKeys, section, sectionAt } from '../image';
import * as layout from '../layout';
import { addWeighted } from './crowding';

/** The stretch of patches and classes of the group at hand; the patches and classes of the phase within it. */
let firstPatch: i32 = 0;
let endPatch: i32 = 0;
let firstClass: i32 = 0;
let endClass: i32 = 0;
let inPatches: usize = 0;
let inClasses: usize = 0;

/** A column of the phase: 0 animals handled, 1 those of them that died, 2 shortfall. */
export function columnOf(record: usize, which: i32): usize {
  return batch.observed + <usize>(operand(record, layout.handledColumn) + which) * batch.laneNumbers;
}

export function isActive(record: usize, step: i32): bool {
  const row = operand(record, layout.handledActive);
  return row < 0 || i32At(section(row), step - 1) !== 0;
}

export function clearColumns(record: usize): void {
  memory.fill(columnOf(record, 0), 0, <usize>layout.handledColumns * batch.laneNumbers);
}

export function handle(record: usize): void {
  clearColumns(record);
  if (!isActive(record, batch.step)) return;
  inPatches = section(operand(record, layout.handledPatches));
  inClasses = section(operand(record, layout.handledClasses));
  const together = operand(record, layout.handledTogether) !== 0;
  const groups = together ? 1 : patches;
  for (let patch = 0; patch < groups; patch++) {
    if (!together && i32At(inPatches, patch) === 0) continue;
    firstPatch = together ? 0 : patch;
    endPatch = together ? patches : patch + 1;
    handlePatches(record);
  }
}

function handlePatches(record: usize): void {
  const byClass = operand(record, layout.handledByClass) !== 0;
  const groups = byClass ? classes : 1;
  for (let c = 0; c < groups; c++) {
    if (byClass && i32At(inClasses, c) === 0) continue;
    firstClass = byClass ? c : 0;
    endClass = byClass ? c + 1 : classes;
    handleGroup(record);
  }
}

/** numbers: how many of the group are not decided yet; moreNumbers: how many of them are still to be taken. */
function handleGroup(record: usize): void {
  countGroup();
  setQuotas(record);
  for (let patch = firstPatch; patch < endPatch; patch++) {
    if (i32At(inPatches, patch) === 0) continue;
    const row = batch.animals + <usize>patch * batch.rowBytes();
    if (!occupied(row, batch.rowBytes())) continue;
    const key = u32At(patchKeys, patch);
    philoxLanes(batch.words, batch.replicates, batch.step, key, operand(record, layout.recordKey));
    for (let c = firstClass; c < endClass; c++) {
      if (i32At(inClasses, c) !== 0) takeCell(record, row + <usize>c * batch.cellBytes, c);
    }
  }
}

function countGroup(): void {
  memory.fill(batch.numbers, 0, batch.laneNumbers);
  for (let patch = firstPatch; patch < endPatch; patch++) {
    if (i32At(inPatches, patch) === 0) continue;
    const row = batch.animals + <usize>patch * batch.rowBytes();
    for (let c = firstClass; c < endClass; c++) {
      if (i32At(inClasses, c) !== 0) addWeighted(batch.numbers, row + <usize>c * batch.cellBytes, 1);
    }
  }
}

/** Whole quotas: a fraction of an animal is one more with that chance. What is lacking is the shortfall. */
function setQuotas(record: usize): void {
  const together = operand(record, layout.handledTogether) !== 0;
  // All patches together have a block of random words of their own.
  const key = together ? 0 : u32At(patchKeys, firstPatch);
  philoxLanes(batch.words, batch.replicates, batch.step, key, operand(record, layout.recordKey));
  const byClass = operand(record, layout.handledByClass) !== 0;
  const stream = streamOf(byClass ? u32At(classKeys, firstClass) : 0, layout.useQuota);
  const short = columnOf(record, 2);
  for (let lane = 0; lane < layout.lanes; lane++) {
    const all = f64At(batch.numbers, lane);
    const wanted = wantedOf(record, all, firstPatch, firstClass, batch.step);
    let whole = floor<f64>(wanted);
    if (whole < wanted && uniform(lane, stream) < wanted - whole) whole += 1;
    if (whole > all) {
      putF64(short, lane, f64At(short, lane) + whole - all);
      whole = all;
    }
    putF64(batch.moreNumbers, lane, whole);
  }
}

/** How many are wanted of a group of so many. */
export function wantedOf(record: usize, all: f64, patch: i32, c: i32, step: i32): f64 {
  const amount = f64At(sectionAt(operand(record, layout.handledAmounts), step), patch * classes + c);
  const rule = operand(record, layout.handledRule);
  if (rule === layout.ruleNumber) return amount;
  if (rule === layout.ruleShare) return amount * all;
  const level = f64At(section(operand(record, layout.handledLevels)), patch);
  return all > level ? amount * (all - level) : 0;
}

function uniform(lane: i32, stream: u64): f64 {
  const at = batch.words + ((<usize>lane) << 3);
  return unit(firstWord(finalise(load<u64>(at) + stream), finalise(load<u64>(at, batch.laneNumbers) + stream)));
}

function takeCell(record: usize, cell: usize, c: i32): void {
  const stream = streamOf(u32At(classKeys, c), layout.useTake);
  const handled = columnOf(record, 0);
  memory.fill(batch.counts, 0, batch.cellBytes);
  for (let lane = 0; lane < layout.lanes; lane++) {
    const n = u32At(cell, lane);
    if (n === 0) continue;
    const quota = f64At(batch.moreNumbers, lane);
    const all = f64At(batch.numbers, lane);
    putF64(batch.numbers, lane, all - f64(n));
    if (quota === 0) continue;
    const taken = hypergeometric(u32(all), n, u32(quota), uniform(lane, stream));
    putF64(batch.moreNumbers, lane, quota - f64(taken));
    putF64(handled, lane, f64At(handled, lane) + f64(taken));
    putU32(cell, lane, n - taken);
    putU32(batch.counts, lane, taken);
  }
  if (operand(record, layout.recordOpcode) === layout.opMove) bring(record, cell, c);
}

/** Those in `counts` enter their new patch as far as they survive it and stay; the others go back to the cell. */
function bring(record: usize, cell: usize, c: i32): void {
  const row = batch.animals + <usize>operand(record, layout.handledTo) * batch.rowBytes();
  const target = row + <usize>c * batch.cellBytes;
  surviveHandling(record, target, c);
  const homing = operand(record, layout.handledHoming);
  if (homing < 0) return;
  scaledRates(batch.rates, f64At(section(homing), 0), 0, c, 0);
  drawCell(batch.counts, batch.moreCounts, streamOf(u32At(classKeys, c), layout.useHoming));
  subtractCell(target, batch.counts);
  addCell(cell, batch.counts);
}

export function surviveHandling(record: usize, target: usize, c: i32): void {
  const survival = f64At(section(operand(record, layout.handledSurvival)), c);
  scaledRates(batch.rates, survival, 0, c, 0);
  drawCell(batch.moreCounts, batch.counts, streamOf(u32At(classKeys, c), layout.useHandling));
  const died = columnOf(record, 1);
  for (let lane = 0; lane < layout.lanes; lane++) {
    const alive = u32At(batch.moreCounts, lane);
    putU32(target, lane, u32At(target, lane) + alive);
    putF64(died, lane, f64At(died, lane) + f64(u32At(batch.counts, lane)) - f64(alive));
  }
}
