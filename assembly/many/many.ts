// Growth, both vectors and elasticities of very many small nonnegative matrices of one order, two side by side.
import { f64At, putF64, putU32 } from '../arrays';
import { reserve } from '../memory';
import { apart, growth, iterate } from './iterate';
import { periodOf, reservePattern } from './pattern';
import * as two from './two';

/** Bits of what is wanted of `solveMany`. */
const wantVectors: i32 = 1;
const wantElasticities: i32 = 2;
/** Each begins with the vectors of the matrix two places before it. */
const wantChain: i32 = 4;

/** The bounds of the growth did not close. */
const unsettled: i32 = -1;
const closeEnough: f64 = 1e-9;

/** f64 [matrix][row][column]; where elasticities are wanted, they take the place of the entries. */
let inputs: usize = 0;
/** f64 [matrix] */
let growths: usize = 0;
let errors: usize = 0;
/** i32 [matrix] */
let periods: usize = 0;
/** f64 [matrix][state] */
let rights: usize = 0;
let lefts: usize = 0;
/** f64 [2][state] */
let starts: usize = 0;

/** Makes room for so many matrices at a time of this order; false where the memory cannot grow so far. */
export function openMany(order: i32, most: i32): bool {
  const numbers = (<usize>most) << 3;
  inputs = reserve(numbers * order * order);
  growths = reserve(numbers);
  errors = reserve(numbers);
  periods = reserve(numbers);
  rights = reserve(numbers * order);
  lefts = reserve(numbers * order);
  starts = reserve((<usize>order) << 4);
  const room = inputs !== 0 && growths !== 0 && errors !== 0 && periods !== 0 && rights !== 0 && lefts !== 0;
  return room && starts !== 0 && two.reserveTwo(order) && reservePattern(order);
}

export function manyInputs(): usize {
  return inputs;
}
export function manyGrowths(): usize {
  return growths;
}
export function manyErrors(): usize {
  return errors;
}
export function manyPeriods(): usize {
  return periods;
}
export function manyRights(): usize {
  return rights;
}
export function manyLefts(): usize {
  return lefts;
}
export function manyStarts(): usize {
  return starts;
}

/**
 * Solves the first `count` inputs from the vectors at `manyStarts`, after so many multiplications. A period below 1 says
 * why a matrix has no result: see `pattern.ts`, and -1 where its bounds did not close.
 */
export function solveMany(count: i32, wanted: i32, multiplications: i32): void {
  begin();
  let waiting = -1;
  let times = multiplications;
  for (let k = 0; k < count; k++) {
    const period = periodOf(input(k));
    putU32(periods, k, period);
    if (period < 1) continue;
    if (waiting < 0) {
      waiting = k;
      continue;
    }
    solveTwo(waiting, k, wanted, times);
    waiting = -1;
    if ((wanted & wantChain) !== 0) times = 0;
    else begin();
  }
  if (waiting >= 0) solveTwo(waiting, waiting, wanted, times);
}

function input(k: i32): usize {
  return inputs + ((<usize>k * two.order * two.order) << 3);
}

function begin(): void {
  for (let i = 0; i < two.order; i++) {
    v128.store(two.right + ((<usize>i) << 4), f64x2.splat(f64At(starts, i)));
    v128.store(two.left + ((<usize>i) << 4), f64x2.splat(f64At(starts, two.order + i)));
  }
}

function solveTwo(first: i32, second: i32, wanted: i32, multiplications: i32): void {
  two.pair(input(first), input(second));
  iterate(multiplications);
  finish(first, 0, f64x2.extract_lane(growth, 0), f64x2.extract_lane(apart, 0), wanted);
  if (second !== first) finish(second, 1, f64x2.extract_lane(growth, 1), f64x2.extract_lane(apart, 1), wanted);
}

function finish(k: i32, which: i32, rate: f64, error: f64, wanted: i32): void {
  putF64(growths, k, rate);
  putF64(errors, k, error);
  if (!(error <= closeEnough)) putU32(periods, k, unsettled);
  if ((wanted & (wantVectors | wantElasticities)) === 0) return;
  const bytes = (<usize>two.order) << 3;
  const right = rights + <usize>k * bytes;
  const left = lefts + <usize>k * bytes;
  two.half(right, two.right, which);
  two.half(left, two.left, which);
  if ((wanted & wantElasticities) !== 0) elasticities(input(k), right, left, rate);
  const scale = 1 / load<f64>(left);
  for (let i = 0; i < two.order; i++) putF64(left, i, f64At(left, i) * scale);
}

/** Entry (i, j) times left i times right j, over growth and left · right. */
function elasticities(matrix: usize, right: usize, left: usize, rate: f64): void {
  let product: f64 = 0;
  for (let i = 0; i < two.order; i++) product += f64At(left, i) * f64At(right, i);
  const share = 1 / (product * rate);
  let at = matrix;
  for (let i = 0; i < two.order; i++) {
    const weight = f64At(left, i) * share;
    const both = f64x2.splat(weight);
    let j = 0;
    for (; j + 2 <= two.order; j += 2) {
      const product = f64x2.mul(f64x2.mul(v128.load(at), both), v128.load(right + ((<usize>j) << 3)));
      v128.store(at, product);
      at += 16;
    }
    if (j < two.order) {
      store<f64>(at, load<f64>(at) * weight * f64At(right, j));
      at += 8;
    }
  }
}
