// Year-to-year variation: correlated normal numbers for each quantity and patch, and from them what the rates are multiplied by.
// Z = A E Bᵀ: E holds independent normals, keyed by names; A mixes them over patches, B over quantities.
import { f64At, i32At, u32At } from '../arrays';
import {
  calendar,
  laneNumbers,
  numbers,
  replicates,
  slotValues,
  step,
  weather,
  weatherGiven,
  words,
  work,
} from '../batch';
import { philoxLanes } from '../draws/philox';
import { finalise, firstWord, streamOf } from '../draws/stream';
import { entries, operand, patches, section, sectionAt } from '../image';
import * as layout from '../layout';
import { distribute } from './distribution';
import { normalLanes } from './normal';

export function vary(record: usize): void {
  const first = weather + <usize>operand(record, layout.variationWeather) * laneNumbers;
  const quantityColumns = entries(operand(record, layout.variationRateColumns));
  const quantities = entries(operand(record, layout.variationQuantities)) / layout.quantityWords;
  const patchColumns = entries(operand(record, layout.variationPatchColumns));
  if (!weatherGiven) drawColumns(record, first, patchColumns, quantityColumns);
  const rateFactor = operand(record, layout.variationRateFactor);
  for (let k = 0; k < quantities; k++) {
    if (firstAlike(rateFactor, k) !== k) continue;
    // work[column] = Σ B × E of the column
    for (let column = 0; column < patchColumns; column++) {
      const own = first + <usize>(column * quantityColumns) * laneNumbers;
      mix(work + <usize>column * laneNumbers, rateFactor, k, own);
    }
    varyAlike(record, k, quantities);
  }
}

/** The first quantity with the same row of the factor: both have the same normal numbers. */
function firstAlike(factor: i32, k: i32): i32 {
  for (let other = 0; other < k; other++) if (sameRow(factor, other, k)) return other;
  return k;
}

function sameRow(factor: i32, a: i32, b: i32): bool {
  const starts = section(factor);
  const count = i32At(starts, a + 1) - i32At(starts, a);
  if (count !== i32At(starts, b + 1) - i32At(starts, b)) return false;
  for (let i = 0; i < count; i++) {
    const inA = i32At(starts, a) + i;
    const inB = i32At(starts, b) + i;
    if (i32At(section(factor + 1), inA) !== i32At(section(factor + 1), inB)) return false;
    if (f64At(section(factor + 2), inA) !== f64At(section(factor + 2), inB)) return false;
  }
  return true;
}

/** Renews the independent normals of each column: e, or φ before + √(1 − φ²) e from the second step on. */
function drawColumns(record: usize, first: usize, patchColumns: i32, quantityColumns: i32): void {
  const patchKeys = section(operand(record, layout.variationPatchColumns));
  const quantityKeys = section(operand(record, layout.variationRateColumns));
  const carry = section(operand(record, layout.variationCarry));
  const kept: f64 = step > 1 ? f64At(carry, 0) : 0;
  const fresh: f64 = step > 1 ? f64At(carry, 1) : 1;
  let target = first;
  for (let column = 0; column < patchColumns; column++) {
    philoxLanes(words, replicates, step, u32At(patchKeys, column), operand(record, layout.recordKey));
    for (let k = 0; k < quantityColumns; k++) {
      renew(target, streamOf(u32At(quantityKeys, k), layout.useWeather), kept, fresh);
      target += laneNumbers;
    }
  }
}

function renew(target: usize, stream: u64, kept: f64, fresh: f64): void {
  for (let lane = 0; lane < layout.lanes; lane++) {
    const at = (<usize>lane) << 3;
    const word = firstWord(finalise(load<u64>(words + at) + stream), finalise(load<u64>(words + at, 128) + stream));
    store<u64>(numbers + at, word);
  }
  normalLanes(numbers, numbers);
  const before = f64x2.splat(kept);
  const share = f64x2.splat(fresh);
  for (let at: usize = 0; at < laneNumbers; at += 16) {
    const normals = f64x2.mul(share, v128.load(numbers + at));
    const all = kept === 0 ? normals : f64x2.add(f64x2.mul(before, v128.load(target + at)), normals);
    v128.store(target + at, all);
  }
}

/** target[lane] = Σ weight × numbers of a row of a factor; the numbers of column j stand j numbers after `from`. */
function mix(target: usize, factor: i32, row: i32, from: usize): void {
  const starts = section(factor);
  const columns = section(factor + 1);
  const weights = section(factor + 2);
  const end = i32At(starts, row + 1);
  let s0 = f64x2.splat(0);
  let s1 = s0;
  let s2 = s0;
  let s3 = s0;
  let s4 = s0;
  let s5 = s0;
  let s6 = s0;
  let s7 = s0;
  for (let entry = i32At(starts, row); entry < end; entry++) {
    const weight = v128.load64_splat(weights + ((<usize>entry) << 3));
    const source = from + <usize>i32At(columns, entry) * laneNumbers;
    s0 = f64x2.add(s0, f64x2.mul(weight, v128.load(source)));
    s1 = f64x2.add(s1, f64x2.mul(weight, v128.load(source, 16)));
    s2 = f64x2.add(s2, f64x2.mul(weight, v128.load(source, 32)));
    s3 = f64x2.add(s3, f64x2.mul(weight, v128.load(source, 48)));
    s4 = f64x2.add(s4, f64x2.mul(weight, v128.load(source, 64)));
    s5 = f64x2.add(s5, f64x2.mul(weight, v128.load(source, 80)));
    s6 = f64x2.add(s6, f64x2.mul(weight, v128.load(source, 96)));
    s7 = f64x2.add(s7, f64x2.mul(weight, v128.load(source, 112)));
  }
  v128.store(target, s0);
  v128.store(target, s1, 16);
  v128.store(target, s2, 32);
  v128.store(target, s3, 48);
  v128.store(target, s4, 64);
  v128.store(target, s5, 80);
  v128.store(target, s6, 96);
  v128.store(target, s7, 112);
}

/** Fills the slots of a quantity and of all after it whose normal numbers are the same, from those of the columns. */
function varyAlike(record: usize, first: i32, quantities: i32): void {
  const rateFactor = operand(record, layout.variationRateFactor);
  const normals = slotOf(record, first);
  for (let patch = 0; patch < patches; patch++) {
    mix(normals + <usize>patch * laneNumbers, operand(record, layout.variationPatchFactor), patch, work);
  }
  for (let k = first + 1; k < quantities; k++) {
    if (!sameRow(rateFactor, first, k)) continue;
    memory.copy(slotOf(record, k), normals, <usize>patches * laneNumbers);
    distributeAll(record, k);
  }
  distributeAll(record, first);
}

function quantityOf(record: usize, k: i32): usize {
  return section(operand(record, layout.variationQuantities)) + ((<usize>(k * layout.quantityWords)) << 2);
}

/** Where the numbers of a quantity stand, patch by patch. */
function slotOf(record: usize, k: i32): usize {
  return slotValues + <usize>(i32At(quantityOf(record, k), layout.quantitySlot) * patches) * laneNumbers;
}

/** From normal numbers to what the rates are multiplied by. */
function distributeAll(record: usize, k: i32): void {
  const distributions = sectionAt(i32At(quantityOf(record, k), layout.quantityDistributions), calendar);
  const tables = section(operand(record, layout.variationTables));
  const target = slotOf(record, k);
  for (let patch = 0; patch < patches; patch++) {
    const own = distributions + ((<usize>(patch * layout.distributionNumbers)) << 3);
    distribute(target + <usize>patch * laneNumbers, own, tables);
  }
}
