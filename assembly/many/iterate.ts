// Growth and both vectors of two irreducible nonnegative matrices side by side.
// Each round solves with σI − A for both vectors at once. σ stands a little above the quotient of both vectors, the less the
// closer their bounds, with which digits triple from round to round (Ostrowski 1959), as long as what comes out is positive;
// else σ is the upper bound of the growth, with which it surely does and draws in from any start (Noda 1971). A half that has
// settled is left alone, so that neither matrix knows its neighbour.
import { eliminate, solve } from './eliminate';
import * as measured from './measure';
import * as two from './two';

/** Growth, and how far its bounds lie apart relative to it. */
export let growth: v128 = f64x2.splat(0);
export let apart: v128 = f64x2.splat(0);

/** Bounds this close are as close as rounding lets them come. */
const settledAt: f64 = 1e-13;
const mostRounds = 60;
/** How far above the quotient, of the way to the upper bound, where bounds lie far apart. Fewest rounds of 0 to 1 tried. */
const margin: f64 = 0.2;
/** What a multiplication keeps of a vector, as a share of its growth. */
const kept: f64 = 0.3;
/** Rounds without progress after which the bounds are taken as they are. */
const mostIdle: f64 = 4;

/** From `right` and `left`, which must be positive, to the vectors found there; multiplies first so many times. */
export function iterate(multiplications: i32): void {
  for (let i = 0; i < multiplications; i++) soften();
  measured.measure(two.right, two.left);
  let quotient = measured.quotient;
  let high = measured.high;
  growth = held();
  apart = measured.apart;
  let done = f64x2.le(apart, f64x2.splat(settledAt));
  let trusting = i64x2.splat(-1);
  let idle = f64x2.splat(0);
  let more = f64x2.splat(0);
  for (let round = 0; round < mostRounds && !i64x2.all_true(done); round++) {
    const safe = f64x2.mul(high, f64x2.add(f64x2.splat(1), more));
    const little = f64x2.mul(f64x2.splat(margin), f64x2.min(f64x2.splat(1), apart));
    const close = f64x2.add(quotient, f64x2.mul(little, f64x2.sub(high, quotient)));
    advance(v128.bitselect(close, safe, trusting));
    const fine = v128.andnot(positive(), done);
    measured.measure(two.nextRight, two.nextLeft);
    const closer = v128.and(fine, f64x2.lt(measured.apart, f64x2.mul(apart, f64x2.splat(0.9))));
    // A round with the bound draws in, but not always by what is measured.
    const taken = v128.bitselect(closer, fine, trusting);
    keep(two.right, two.nextRight, taken);
    keep(two.left, two.nextLeft, taken);
    const better = v128.and(taken, v128.or(closer, f64x2.lt(measured.high, high)));
    idle = v128.bitselect(f64x2.splat(0), f64x2.add(idle, f64x2.splat(1)), better);
    quotient = v128.bitselect(measured.quotient, quotient, taken);
    high = v128.bitselect(measured.high, high, taken);
    growth = v128.bitselect(held(), growth, taken);
    apart = v128.bitselect(measured.apart, apart, taken);
    const wider = f64x2.add(f64x2.mul(more, f64x2.splat(10)), f64x2.splat(1e-15));
    more = v128.bitselect(f64x2.splat(0), v128.bitselect(more, wider, trusting), taken);
    trusting = taken;
    done = v128.or(done, f64x2.le(apart, f64x2.splat(settledAt)));
    done = v128.or(done, f64x2.ge(idle, f64x2.splat(mostIdle)));
  }
}

/** The quotient within its bounds. */
function held(): v128 {
  return f64x2.max(measured.low, f64x2.min(measured.high, measured.quotient));
}

/** One multiplication by A + cI, which does not mind periods. */
function soften(): void {
  measured.apply(two.right, two.left);
  mixIn(two.right, two.imageRight);
  mixIn(two.left, two.imageLeft);
}

/** vector = image + a share of the vector, with a sum of 1. */
function mixIn(vector: usize, image: usize): void {
  const some = f64x2.mul(f64x2.div(sumOf(image), sumOf(vector)), f64x2.splat(kept));
  for (let at: usize = 0; at < two.stride; at += 16) {
    v128.store(vector + at, f64x2.add(v128.load(image + at), f64x2.mul(some, v128.load(vector + at))));
  }
  scale(vector);
}

function advance(shift: v128): void {
  eliminate(shift);
  memory.copy(two.nextRight, two.right, two.stride);
  memory.copy(two.nextLeft, two.left, two.stride);
  solve();
  scale(two.nextRight);
  scale(two.nextLeft);
}

function sumOf(vector: usize): v128 {
  let sum = f64x2.splat(0);
  for (let at: usize = 0; at < two.stride; at += 16) sum = f64x2.add(sum, v128.load(vector + at));
  return sum;
}

/** To a sum of 1. */
function scale(vector: usize): void {
  const factor = f64x2.div(f64x2.splat(1), sumOf(vector));
  for (let at: usize = 0; at < two.stride; at += 16) {
    v128.store(vector + at, f64x2.mul(v128.load(vector + at), factor));
  }
}

/** Where both next vectors are positive in all states. */
function positive(): v128 {
  const zero = f64x2.splat(0);
  let all = i64x2.splat(-1);
  for (let at: usize = 0; at < two.stride; at += 16) {
    const right = f64x2.gt(v128.load(two.nextRight + at), zero);
    all = v128.and(all, v128.and(right, f64x2.gt(v128.load(two.nextLeft + at), zero)));
  }
  return all;
}

function keep(vector: usize, next: usize, where: v128): void {
  for (let at: usize = 0; at < two.stride; at += 16) {
    v128.store(vector + at, v128.bitselect(v128.load(next + at), v128.load(vector + at), where));
  }
}
