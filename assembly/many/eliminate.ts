// Solves (σI − A) z = x and t (σI − A) = y for two matrices side by side, by elimination without exchange of rows: for σ
// above the growth, σI − A is an M-matrix, whose pivots are all positive and whose elimination loses no digits.
// Four rows are taken away at a time, and none where nothing is to be taken: life cycles are mostly zeros.
import { factors, matrices, nextLeft, nextRight, order, pivots, stride } from './two';

/** factors = σI − A, eliminated: multipliers below the diagonal, and above it the upper triangle. */
export function eliminate(shift: v128): void {
  shiftAll(shift);
  // A pivot of 0 means that σ is an eigenvalue to the last digit; a tiny one gives its vector.
  const least = f64x2.mul(shift, f64x2.splat(1e-17));
  for (let i = 0; i < order; i++) {
    const row = factors + <usize>i * stride;
    let k = 0;
    for (; k + 4 <= i; k += 4) takeFour(row, k);
    for (; k < i; k++) takeOne(row, k);
    const pivot = v128.load(row + ((<usize>i) << 4));
    const safe = v128.bitselect(least, pivot, f64x2.lt(f64x2.abs(pivot), least));
    v128.store(pivots + ((<usize>i) << 4), f64x2.div(f64x2.splat(1), safe));
  }
}

function shiftAll(shift: v128): void {
  const bytes = stride * order;
  const zero = f64x2.splat(0);
  for (let at: usize = 0; at < bytes; at += 16) v128.store(factors + at, f64x2.sub(zero, v128.load(matrices + at)));
  const step = stride + 16;
  for (let at: usize = 0; at < bytes; at += step) v128.store(factors + at, f64x2.add(v128.load(factors + at), shift));
}

function takeFour(row: usize, k: i32): void {
  const column = (<usize>k) << 4;
  const at = row + column;
  let a = factors + <usize>k * stride + column;
  let b = a + stride;
  let c = b + stride;
  let d = c + stride;
  const scale = pivots + column;
  const m0 = f64x2.mul(v128.load(at), v128.load(scale));
  let sum = f64x2.sub(v128.load(at, 16), f64x2.mul(m0, v128.load(a, 16)));
  const m1 = f64x2.mul(sum, v128.load(scale, 16));
  sum = f64x2.sub(v128.load(at, 32), f64x2.mul(m0, v128.load(a, 32)));
  sum = f64x2.sub(sum, f64x2.mul(m1, v128.load(b, 32)));
  const m2 = f64x2.mul(sum, v128.load(scale, 32));
  sum = f64x2.sub(v128.load(at, 48), f64x2.mul(m0, v128.load(a, 48)));
  sum = f64x2.sub(sum, f64x2.mul(m1, v128.load(b, 48)));
  sum = f64x2.sub(sum, f64x2.mul(m2, v128.load(c, 48)));
  const m3 = f64x2.mul(sum, v128.load(scale, 48));
  if (!v128.any_true(v128.or(v128.or(m0, m1), v128.or(m2, m3)))) return;
  v128.store(at, m0);
  v128.store(at, m1, 16);
  v128.store(at, m2, 32);
  v128.store(at, m3, 48);
  const end = row + stride;
  for (let to = at + 64; to < end; to += 16) {
    a += 16;
    b += 16;
    c += 16;
    d += 16;
    const first = f64x2.add(f64x2.mul(m0, v128.load(a, 48)), f64x2.mul(m1, v128.load(b, 48)));
    const second = f64x2.add(f64x2.mul(m2, v128.load(c, 48)), f64x2.mul(m3, v128.load(d, 48)));
    v128.store(to, f64x2.sub(v128.load(to), f64x2.add(first, second)));
  }
}

function takeOne(row: usize, k: i32): void {
  const column = (<usize>k) << 4;
  const at = row + column;
  const m = f64x2.mul(v128.load(at), v128.load(pivots + column));
  if (!v128.any_true(m)) return;
  v128.store(at, m);
  const end = row + stride;
  let from = factors + <usize>k * stride + column + 16;
  for (let to = at + 16; to < end; to += 16) {
    v128.store(to, f64x2.sub(v128.load(to), f64x2.mul(m, v128.load(from))));
    from += 16;
  }
}

/** Both solutions in the place of their right-hand sides, `nextRight` and `nextLeft`, on one way down and one up. */
export function solve(): void {
  for (let i = 0; i < order; i++) {
    const place = (<usize>i) << 4;
    const row = factors + <usize>i * stride;
    v128.store(nextRight + place, f64x2.sub(v128.load(nextRight + place), dot(row, nextRight, place)));
    const t = f64x2.mul(v128.load(nextLeft + place), v128.load(pivots + place));
    v128.store(nextLeft + place, t);
    take(nextLeft + place + 16, row + place + 16, row + stride, t);
  }
  for (let i = order - 1; i >= 0; i--) {
    const place = (<usize>i) << 4;
    const row = factors + <usize>i * stride;
    const after = place + 16;
    const rest = f64x2.sub(v128.load(nextRight + place), dot(row + after, nextRight + after, stride - after));
    v128.store(nextRight + place, f64x2.mul(rest, v128.load(pivots + place)));
    take(nextLeft, row, row + place, v128.load(nextLeft + place));
  }
}

/** Σ over so many bytes of two arrays. */
function dot(a: usize, b: usize, bytes: usize): v128 {
  let even = f64x2.splat(0);
  let odd = f64x2.splat(0);
  let at: usize = 0;
  for (; at + 32 <= bytes; at += 32) {
    even = f64x2.add(even, f64x2.mul(v128.load(a + at), v128.load(b + at)));
    odd = f64x2.add(odd, f64x2.mul(v128.load(a + at, 16), v128.load(b + at, 16)));
  }
  if (at < bytes) even = f64x2.add(even, f64x2.mul(v128.load(a + at), v128.load(b + at)));
  return f64x2.add(even, odd);
}

/** target −= factor × source, from `source` to `end`. */
function take(target: usize, source: usize, end: usize, factor: v128): void {
  for (; source < end; source += 16) {
    v128.store(target, f64x2.sub(v128.load(target), f64x2.mul(factor, v128.load(source))));
    target += 16;
  }
}
