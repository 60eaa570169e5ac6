// What the zeros of a nonnegative matrix say of it: whether all states reach one another, and the period of its loops.
import { i32At, putU32, u64At } from '../arrays';
import { reserve } from '../memory';

/** An entry is negative, infinite or not a number. */
export const badEntry: i32 = -2;
/** Some states never come back to others. */
export const reducible: i32 = 0;

let order: i32 = 0;
/** u64 words of a row of bits. */
let words: i32 = 0;
/** u64 [row][word]: bit j of row i where entry (i, j) is positive; of the matrix at hand and of the one before. */
let here: usize = 0;
let before: usize = 0;
let known: i32 = badEntry;
/** u64 [word]: states reached; i32 [state]: steps to it, and those to be looked at. */
let reached: usize = 0;
let level: usize = 0;
let queue: usize = 0;

/** False where the memory cannot grow so far. */
export function reservePattern(states: i32): bool {
  order = states;
  words = (states + 63) >> 6;
  const bits = (<usize>words) << 3;
  here = reserve(bits * states);
  before = reserve(bits * states);
  reached = reserve(bits);
  level = reserve((<usize>states) << 2);
  queue = reserve((<usize>states) << 2);
  known = badEntry;
  return here !== 0 && before !== 0 && reached !== 0 && level !== 0 && queue !== 0;
}

/** The period of an irreducible matrix (f64 [row][column]), else `reducible` or `badEntry`. */
export function periodOf(matrix: usize): i32 {
  if (!readBits(matrix)) return badEntry;
  if (known !== badEntry && sameAsBefore()) return known;
  known = reachesAll() && isReachedByAll() ? divisor() : reducible;
  const bits = here;
  here = before;
  before = bits;
  return known;
}

/** False where an entry is negative, infinite or not a number. */
function readBits(matrix: usize): bool {
  const zero = f64x2.splat(0);
  const infinite = f64x2.splat(Infinity);
  let fine = i64x2.splat(-1);
  let at = matrix;
  for (let i = 0; i < order; i++) {
    for (let word = 0; word < words; word++) {
      const width = min<i32>(64, order - (word << 6));
      let bits: u64 = 0;
      let j = 0;
      for (; j + 2 <= width; j += 2) {
        const both = v128.load(at);
        const positive = f64x2.gt(both, zero);
        fine = v128.and(fine, v128.and(f64x2.ge(both, zero), f64x2.lt(both, infinite)));
        bits |= u64(i64x2.bitmask(positive)) << u64(j);
        at += 16;
      }
      if (j < width) {
        const last = v128.load64_zero(at);
        fine = v128.and(fine, v128.and(f64x2.ge(last, zero), f64x2.lt(last, infinite)));
        bits |= u64(i64x2.bitmask(f64x2.gt(last, zero))) << u64(j);
        at += 8;
      }
      store<u64>(here + ((<usize>(i * words + word)) << 3), bits);
    }
  }
  return i64x2.all_true(fine);
}

function sameAsBefore(): bool {
  return memory.compare(here, before, (<usize>(order * words)) << 3) === 0;
}

function isIn(set: usize, state: i32): bool {
  return ((u64At(set, state >> 6) >> u64(state & 63)) & 1) !== 0;
}

function putIn(set: usize, state: i32): void {
  const at = set + ((<usize>(state >> 6)) << 3);
  store<u64>(at, load<u64>(at) | ((<u64>1) << u64(state & 63)));
}

/** Whether the first state comes, in any number of steps, from all others; gives each the number of steps. */
function isReachedByAll(): bool {
  memory.fill(reached, 0, (<usize>words) << 3);
  putIn(reached, 0);
  putU32(level, 0, 0);
  putU32(queue, 0, 0);
  let found = 1;
  for (let head = 0; head < found; head++) {
    const to = i32At(queue, head);
    for (let word = 0; word < words; word++) {
      let fresh = u64At(here, to * words + word) & ~u64At(reached, word);
      store<u64>(reached + ((<usize>word) << 3), u64At(reached, word) | fresh);
      for (; fresh !== 0; fresh &= fresh - 1) {
        const from = (word << 6) + i32(ctz<u64>(fresh));
        putU32(level, from, u32(i32At(level, to) + 1));
        putU32(queue, found++, from);
      }
    }
  }
  return found === order;
}

/** Whether the first state leads, in any number of steps, to all others. */
function reachesAll(): bool {
  memory.fill(reached, 0, (<usize>words) << 3);
  putIn(reached, 0);
  let found = 1;
  let grew = true;
  while (grew && found < order) {
    grew = false;
    for (let i = 0; i < order; i++) {
      if (isIn(reached, i) || !meets(i)) continue;
      putIn(reached, i);
      found++;
      grew = true;
    }
  }
  return found === order;
}

/** Whether state i gets anything from a state reached. */
function meets(i: i32): bool {
  for (let word = 0; word < words; word++) {
    if ((u64At(here, i * words + word) & u64At(reached, word)) !== 0) return true;
  }
  return false;
}

/** Greatest common divisor of the lengths of all loops, from the steps to the first state; 0 without a loop. */
function divisor(): i32 {
  let common = 0;
  for (let i = 0; i < order; i++) {
    for (let word = 0; word < words && common !== 1; word++) {
      for (let bits = u64At(here, i * words + word); bits !== 0; bits &= bits - 1) {
        const from = (word << 6) + i32(ctz<u64>(bits));
        common = greatest(common, abs<i32>(i32At(level, from) - i32At(level, i) - 1));
      }
    }
  }
  return common;
}

function greatest(a: i32, b: i32): i32 {
  while (b !== 0) {
    const rest = a % b;
    a = b;
    b = rest;
  }
  return a;
}
