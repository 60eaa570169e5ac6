// What every phase does with the sixteen counts of one patch and class.
import { i32At } from './arrays';
import { binomial } from './draws/binomial';
import { bitsFour, bitsFourLarge, mostByBits } from './draws/bits';
import { cellBytes, laneNumbers, rates, slotValues, words } from './batch';
import { classes, patches } from './image';

/** Whether any lane has animals in these bytes. */
export function occupied(at: usize, bytes: usize): bool {
  for (let i: usize = 0; i < bytes; i += cellBytes) {
    const cell = at + i;
    const low = v128.or(v128.load(cell, 0), v128.load(cell, 16));
    if (v128.any_true(v128.or(low, v128.or(v128.load(cell, 32), v128.load(cell, 48))))) return true;
  }
  return false;
}

/** target += source, lane by lane. */
export function addCell(target: usize, source: usize): void {
  for (let i: usize = 0; i < cellBytes; i += 16) {
    v128.store(target + i, i32x4.add(v128.load(target + i), v128.load(source + i)));
  }
}

/** target −= source, lane by lane. */
export function subtractCell(target: usize, source: usize): void {
  for (let i: usize = 0; i < cellBytes; i += 16) {
    v128.store(target + i, i32x4.sub(v128.load(target + i), v128.load(source + i)));
  }
}

/** target += source, for f64 [lane]. */
export function addNumbers(target: usize, source: usize): void {
  for (let i: usize = 0; i < laneNumbers; i += 16) {
    v128.store(target + i, f64x2.add(v128.load(target + i), v128.load(source + i)));
  }
}

/** target[lane] ×= animals of a cell. */
export function multiplyByCell(target: usize, cell: usize): void {
  for (let i: usize = 0; i < cellBytes; i += 8) {
    const at = target + (i << 1);
    v128.store(at, f64x2.mul(v128.load(at), f64x2.convert_low_i32x4_u(v128.load64_zero(cell + i))));
  }
}

/** Number of slots that scale a class. */
export function slotCount(lists: usize, c: i32): i32 {
  return lists === 0 ? 0 : i32At(lists, c + 1) - i32At(lists, c);
}

/** Fills `target` (f64 [lane]) with a rate times the product of the slots that scale this class in this patch. */
export function scaledRates(target: usize, rate: f64, lists: usize, c: i32, patch: i32): void {
  const count = slotCount(lists, c);
  const list = lists + ((<usize>(classes + 1 + (count === 0 ? 0 : i32At(lists, c)))) << 2);
  const splat = f64x2.splat(rate);
  for (let i: usize = 0; i < laneNumbers; i += 16) v128.store(target + i, splat);
  for (let k = 0; k < count; k++) {
    const slot = i32At(list, k);
    const values = slotValues + (<usize>slot * patches + patch) * laneNumbers;
    for (let i: usize = 0; i < laneNumbers; i += 16) {
      v128.store(target + i, f64x2.mul(v128.load(target + i), v128.load(values + i)));
    }
  }
}

const above63: i32 = -64;

/** drawn[lane] = successes of n[lane] trials at chance rates[lane]; `drawn` may be `n`. */
export function drawCell(drawn: usize, n: usize, stream: u64): void {
  for (let four: usize = 0; four < cellBytes; four += 16) {
    const counts = v128.load(n + four);
    const at = four << 1;
    if (!v128.any_true(counts)) v128.store(drawn + four, counts);
    else if (!v128.any_true(v128.and(counts, i32x4.splat(above63)))) {
      bitsFour(drawn + four, n + four, rates + at, words + at, stream);
    } else if (!v128.any_true(i32x4.gt_u(counts, i32x4.splat(mostByBits)))) {
      bitsFourLarge(drawn + four, n + four, rates + at, words + at, stream);
    } else drawSome(drawn + four, n + four, at, stream);
  }
}

function drawSome(drawn: usize, n: usize, at: usize, stream: u64): void {
  for (let pair: usize = 0; pair < 16; pair += 8) {
    const both = load<u64>(n + pair);
    store<u64>(drawn + pair, both === 0 ? 0 : drawLarge(both, at + (pair << 1), stream));
  }
}

function drawLarge(both: u64, at: usize, stream: u64): u64 {
  const w = words + at;
  const low = binomial(u32(both), load<f64>(rates + at), load<u64>(w), load<u64>(w, 128), stream);
  const high = binomial(u32(both >> 32), load<f64>(rates + at, 8), load<u64>(w, 8), load<u64>(w, 136), stream);
  return u64(low) | (u64(high) << 32);
}
