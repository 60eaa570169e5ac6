// Two square matrices of one order side by side, one in each half of a vector: where they and what their solution needs
// stand in memory. An array [i][half] has the two numbers of a state next to each other.
import { reserve } from '../memory';

/** States. */
export let order: i32 = 0;
/** Bytes of a row of two matrices, and of a vector of two. */
export let stride: usize = 0;
/** f64 [row][column][half]: the matrices, and what they are eliminated to. */
export let matrices: usize = 0;
export let factors: usize = 0;
/** f64 [state][half]: inverse pivots. */
export let pivots: usize = 0;
/** f64 [state][half]: vectors found so far, right and left, and the ones to try next. */
export let right: usize = 0;
export let left: usize = 0;
export let nextRight: usize = 0;
export let nextLeft: usize = 0;
/** f64 [state][half]: the matrices times a right vector, and a left vector times the matrices. */
export let imageRight: usize = 0;
export let imageLeft: usize = 0;

/** False where the memory cannot grow so far. */
export function reserveTwo(states: i32): bool {
  order = states;
  stride = (<usize>states) << 4;
  matrices = reserve(stride * states);
  factors = reserve(stride * states);
  const vectors = reserve(stride * 7);
  pivots = vectors;
  right = vectors + stride;
  left = vectors + 2 * stride;
  nextRight = vectors + 3 * stride;
  nextLeft = vectors + 4 * stride;
  imageRight = vectors + 5 * stride;
  imageLeft = vectors + 6 * stride;
  return matrices !== 0 && factors !== 0 && vectors !== 0;
}

/** Puts two matrices (f64 [row][column] each) side by side. */
export function pair(first: usize, second: usize): void {
  const end = matrices + stride * order;
  const odd = (order & 1) !== 0;
  if (odd) {
    for (let at = matrices; at < end; at += 16) {
      v128.store(at, v128.load64_lane(second, v128.load64_zero(first), 1));
      first += 8;
      second += 8;
    }
    return;
  }
  for (let at = matrices; at < end; at += 32) {
    const a = v128.load(first);
    const b = v128.load(second);
    v128.store(at, i64x2.shuffle(a, b, 0, 2));
    v128.store(at, i64x2.shuffle(a, b, 1, 3), 16);
    first += 16;
    second += 16;
  }
}

/** One half of a vector [state][half]. */
export function half(target: usize, source: usize, which: i32): void {
  let from = source + ((<usize>which) << 3);
  const end = source + stride;
  for (; from < end; from += 16) {
    store<f64>(target, load<f64>(from));
    target += 8;
  }
}
