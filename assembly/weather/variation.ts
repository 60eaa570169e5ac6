// Year-to-year variation: correlated normal numbers for each quantity and patch, and from them what the rates are multiplied by.
// Z = A E Bᵀ: E holds independent normals, keyed by names; A mixes them over patches, B over quantities.
import { f64At, i32At, u32At } from '../arrays';
import { laneNumbers, replicates, slotValues, step, weather, words, work } from '../batch';
import { philoxLanes } from '../draws/philox';
import { finalise, firstWord, streamOf } from '../draws/stream';
import { entries, operand, patches, section, sectionAt } from '../image';
import * as layout from '../layout';
import { distribute } from './distribution';
import { normalOf } from './normal';

export function vary(record: usize): void {
  const first = weather + <usize>operand(record, layout.variationWeather) * laneNumbers;
  const quantityColumns = entries(operand(record, layout.variationRateColumns));
  const quantities = entries(operand(record, layout.variationQuantities)) / layout.quantityWords;
  const patchColumns = entries(operand(record, layout.variationPatchColumns));
  drawColumns(record, first, patchColumns, quantityColumns);
  // work[column][quantity] = Σ B × E of the column
  const rateFactor = operand(record, layout.variationRateFactor);
  for (let column = 0; column < patchColumns; column++) {
    const own = first + <usize>(column * quantityColumns) * laneNumbers;
    for (let k = 0; k < quantities; k++) {
      mix(work + <usize>(column * quantities + k) * laneNumbers, rateFactor, k, own, 1);
    }
  }
  for (let k = 0; k < quantities; k++) {
    varyQuantity(record, k, quantities);
  }
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
  for (let at: usize = 0; at < laneNumbers; at += 8) {
    const word = firstWord(finalise(load<u64>(words + at) + stream), finalise(load<u64>(words + at, 128) + stream));
    const normal = normalOf(word);
    store<f64>(target + at, kept === 0 ? fresh * normal : kept * load<f64>(target + at) + fresh * normal);
  }
}

/** target[lane] = Σ weight × numbers of a row of a factor; the numbers of column j stand `stride` × j numbers after `from`. */
function mix(target: usize, factor: i32, row: i32, from: usize, stride: i32): void {
  const starts = section(factor);
  const columns = section(factor + 1);
  const weights = section(factor + 2);
  memory.fill(target, 0, laneNumbers);
  const end = i32At(starts, row + 1);
  for (let entry = i32At(starts, row); entry < end; entry++) {
    const weight = f64x2.splat(f64At(weights, entry));
    const source = from + <usize>(i32At(columns, entry) * stride) * laneNumbers;
    for (let i: usize = 0; i < laneNumbers; i += 16) {
      const sum = f64x2.add(v128.load(target + i), f64x2.mul(weight, v128.load(source + i)));
      v128.store(target + i, sum);
    }
  }
}

function varyQuantity(record: usize, k: i32, quantities: i32): void {
  const quantity = section(operand(record, layout.variationQuantities)) + ((<usize>(k * layout.quantityWords)) << 2);
  const slot = i32At(quantity, layout.quantitySlot);
  const distributions = sectionAt(i32At(quantity, layout.quantityDistributions), step);
  const tables = section(operand(record, layout.variationTables));
  const patchFactor = operand(record, layout.variationPatchFactor);
  const mixed = work + <usize>k * laneNumbers;
  for (let patch = 0; patch < patches; patch++) {
    const target = slotValues + <usize>(slot * patches + patch) * laneNumbers;
    mix(target, patchFactor, patch, mixed, quantities);
    distribute(target, distributions + ((<usize>(patch * layout.distributionNumbers)) << 3), tables);
  }
}
