// Binomial draws of up to 64 trials by bits: every trial compares its random bits with the binary digits of p, most
// significant first, until it is decided; all trials at once, one in each bit of a word, two draws side by side.
// Exact for p rounded to 52 binary digits. With the same words the count never falls when p or n rises.
import { u64At } from '../arrays';
import { finalise } from './stream';

export const mostByBits: u32 = 128;

/** Four draws side by side, each the very number that it would be alone: counts of n trials with chances p (f64). */
export function bitsFour(drawn: usize, n: usize, p: usize, words: usize, stream: u64): void {
  const onePlusA = f64x2.add(v128.load(p), f64x2.splat(1));
  const sureA = f64x2.ge(onePlusA, f64x2.splat(2));
  let digitsA = i64x2.shl(onePlusA, 12);
  let undecidedA = trialsPair(n);
  let successesA = v128.and(undecidedA, sureA);
  undecidedA = v128.andnot(undecidedA, sureA);
  let aA = seedPairAt(words, stream);
  let bA = seedPairAt(words + 128, stream);
  const onePlusB = f64x2.add(v128.load(p + 16), f64x2.splat(1));
  const sureB = f64x2.ge(onePlusB, f64x2.splat(2));
  let digitsB = i64x2.shl(onePlusB, 12);
  let undecidedB = trialsPair(n + 8);
  let successesB = v128.and(undecidedB, sureB);
  undecidedB = v128.andnot(undecidedB, sureB);
  let aB = seedPairAt(words + 16, stream);
  let bB = seedPairAt(words + 144, stream);
  for (let word = 0; word < 7 || v128.any_true(v128.or(undecidedA, undecidedB)); word++) {
    const sumA = i64x2.add(aA, bA);
    const bitsA = i64x2.add(v128.or(i64x2.shl(sumA, 17), i64x2.shr_u(sumA, 47)), aA);
    const tA = v128.xor(aA, bA);
    aA = v128.xor(v128.xor(v128.or(i64x2.shl(aA, 49), i64x2.shr_u(aA, 15)), tA), i64x2.shl(tA, 21));
    bA = v128.or(i64x2.shl(tA, 28), i64x2.shr_u(tA, 36));
    const digitA = i64x2.lt_s(digitsA, i64x2.splat(0));
    digitsA = i64x2.add(digitsA, digitsA);
    successesA = v128.or(successesA, v128.and(undecidedA, v128.andnot(digitA, bitsA)));
    undecidedA = v128.andnot(undecidedA, v128.xor(bitsA, digitA));
    const sumB = i64x2.add(aB, bB);
    const bitsB = i64x2.add(v128.or(i64x2.shl(sumB, 17), i64x2.shr_u(sumB, 47)), aB);
    const tB = v128.xor(aB, bB);
    aB = v128.xor(v128.xor(v128.or(i64x2.shl(aB, 49), i64x2.shr_u(aB, 15)), tB), i64x2.shl(tB, 21));
    bB = v128.or(i64x2.shl(tB, 28), i64x2.shr_u(tB, 36));
    const digitB = i64x2.lt_s(digitsB, i64x2.splat(0));
    digitsB = i64x2.add(digitsB, digitsB);
    successesB = v128.or(successesB, v128.and(undecidedB, v128.andnot(digitB, bitsB)));
    undecidedB = v128.andnot(undecidedB, v128.xor(bitsB, digitB));
  }
  store<u64>(drawn, successesIn(successesA));
  store<u64>(drawn, successesIn(successesB), 8);
}

/** i32 [draw]: of four counts up to 128, those in the first block of 64 and those in the second. */
const firstBlocks = memory.data(16, 16);
const secondBlocks = memory.data(16, 16);

/** The same of up to 128 trials; `drawn` may be `n`. */
export function bitsFourLarge(drawn: usize, n: usize, p: usize, words: usize, stream: u64): void {
  const counts = v128.load(n);
  const first = i32x4.min_u(counts, i32x4.splat(64));
  v128.store(firstBlocks, first);
  v128.store(secondBlocks, i32x4.sub(counts, first));
  bitsFour(drawn, firstBlocks, p, words, stream);
  addSecondBlocks(drawn, 0, p, words, stream + secondBlock);
  addSecondBlocks(drawn, 8, p + 16, words + 16, stream + secondBlock);
}

function addSecondBlocks(drawn: usize, pair: usize, p: usize, words: usize, stream: u64): void {
  const n = secondBlocks + pair;
  if (load<u64>(n) === 0) return;
  const more = bitsCounts(trialsPair(n), v128.load(p), seedPairAt(words, stream), seedPairAt(words + 128, stream));
  store<u64>(drawn + pair, load<u64>(drawn + pair) + more);
}

function successesIn(bits: v128): u64 {
  return popcnt<u64>(i64x2.extract_lane(bits, 0)) | (popcnt<u64>(i64x2.extract_lane(bits, 1)) << 32);
}

/** The trials of two counts (u32). */
function trialsPair(n: usize): v128 {
  const first = masks + ((<usize>load<u32>(n)) << 3);
  return v128.load64_lane(masks + ((<usize>load<u32>(n, 4)) << 3), v128.load64_zero(first), 1);
}

function seedPairAt(words: usize, stream: u64): v128 {
  const first = finalise(load<u64>(words) + stream);
  return i64x2.replace_lane(i64x2.splat(first), 1, finalise(load<u64>(words, 8) + stream));
}

/** Successes of n ≤ 128 trials: the blocks of 64 have streams of their own, by their index. */
export function bitsOf(n: u32, p: f64, w0: u64, w1: u64, stream: u64): u32 {
  const inFirst = min<u32>(n, 64);
  const next = stream + secondBlock;
  const counts = bitsCounts(
    i64x2.replace_lane(i64x2.splat(u64At(masks, inFirst)), 1, u64At(masks, n - inFirst)),
    f64x2.splat(p),
    i64x2.replace_lane(i64x2.splat(finalise(w0 + stream)), 1, finalise(w0 + next)),
    i64x2.replace_lane(i64x2.splat(finalise(w1 + stream)), 1, finalise(w1 + next)),
  );
  return u32(counts) + u32(counts >> 32);
}

const secondBlock: u64 = 0xd1b54a32d192ed03;

function bitsCounts(undecided: v128, p: v128, s0: v128, s1: v128): u64 {
  // 1 + p holds the digits of p in its mantissa; where it is 2, every trial succeeds.
  const onePlus = f64x2.add(p, f64x2.splat(1));
  const sure = f64x2.ge(onePlus, f64x2.splat(2));
  let digits = i64x2.shl(onePlus, 12);
  let successes = v128.and(undecided, sure);
  undecided = v128.andnot(undecided, sure);
  for (let word = 0; word < 7 || v128.any_true(undecided); word++) {
    const sum = i64x2.add(s0, s1);
    const bits = i64x2.add(v128.or(i64x2.shl(sum, 17), i64x2.shr_u(sum, 47)), s0);
    const t = v128.xor(s0, s1);
    s0 = v128.xor(v128.xor(v128.or(i64x2.shl(s0, 49), i64x2.shr_u(s0, 15)), t), i64x2.shl(t, 21));
    s1 = v128.or(i64x2.shl(t, 28), i64x2.shr_u(t, 36));
    const digit = i64x2.lt_s(digits, i64x2.splat(0));
    digits = i64x2.add(digits, digits);
    successes = v128.or(successes, v128.and(undecided, v128.andnot(digit, bits)));
    undecided = v128.andnot(undecided, v128.xor(bits, digit));
  }
  return successesIn(successes);
}

/** One bit for each of the first n trials. */
const masks = memory.data<u64>([
  0x0, 0x1, 0x3, 0x7, 0xf, 0x1f, 0x3f, 0x7f, 0xff, 0x1ff, 0x3ff, 0x7ff, 0xfff, 0x1fff, 0x3fff, 0x7fff, 0xffff, 0x1ffff,
  0x3ffff, 0x7ffff, 0xfffff, 0x1fffff, 0x3fffff, 0x7fffff, 0xffffff, 0x1ffffff, 0x3ffffff, 0x7ffffff, 0xfffffff,
  0x1fffffff, 0x3fffffff, 0x7fffffff, 0xffffffff, 0x1ffffffff, 0x3ffffffff, 0x7ffffffff, 0xfffffffff, 0x1fffffffff,
  0x3fffffffff, 0x7fffffffff, 0xffffffffff, 0x1ffffffffff, 0x3ffffffffff, 0x7ffffffffff, 0xfffffffffff, 0x1fffffffffff,
  0x3fffffffffff, 0x7fffffffffff, 0xffffffffffff, 0x1ffffffffffff, 0x3ffffffffffff, 0x7ffffffffffff, 0xfffffffffffff,
  0x1fffffffffffff, 0x3fffffffffffff, 0x7fffffffffffff, 0xffffffffffffff, 0x1ffffffffffffff, 0x3ffffffffffffff,
  0x7ffffffffffffff, 0xfffffffffffffff, 0x1fffffffffffffff, 0x3fffffffffffffff, 0x7fffffffffffffff, 0xffffffffffffffff,
]);
