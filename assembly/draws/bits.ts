// Binomial draws of up to 64 trials by bits: every trial compares its random bits with the binary digits of p, most
// significant first, until it is decided; all trials at once, one in each bit of a word, two draws side by side.
// Exact for p rounded to 52 binary digits. With the same words the count never falls when p or n rises.
import { finalise } from './stream';

/** One bit for each of the first n trials, 0 ≤ n ≤ 64. */
function trials(n: u32): u64 {
  return n === 0 ? 0 : (<u64>-1) >> u64(64 - n);
}

/** Successes of two draws, in the low and the high half, from n packed the same way and words of the two blocks. */
export function bitsPair(n: u64, p: v128, w0: v128, w1: v128, stream: u64): u64 {
  return bitsCounts(
    i64x2.replace_lane(i64x2.splat(trials(u32(n))), 1, trials(u32(n >> 32))),
    p,
    seedPair(w0, stream),
    seedPair(w1, stream),
  );
}

/** Successes of n ≤ 128 trials: the blocks of 64 have streams of their own, by their index. */
export function bitsOf(n: u32, p: f64, w0: u64, w1: u64, stream: u64): u32 {
  const inFirst = min<u32>(n, 64);
  const next = stream + secondBlock;
  const counts = bitsCounts(
    i64x2.replace_lane(i64x2.splat(trials(inFirst)), 1, trials(n - inFirst)),
    f64x2.splat(p),
    i64x2.replace_lane(i64x2.splat(finalise(w0 + stream)), 1, finalise(w0 + next)),
    i64x2.replace_lane(i64x2.splat(finalise(w1 + stream)), 1, finalise(w1 + next)),
  );
  return u32(counts) + u32(counts >> 32);
}

const secondBlock: u64 = 0xd1b54a32d192ed03;

function seedPair(words: v128, stream: u64): v128 {
  return i64x2.replace_lane(
    i64x2.splat(finalise(i64x2.extract_lane(words, 0) + stream)),
    1,
    finalise(i64x2.extract_lane(words, 1) + stream),
  );
}

function bitsCounts(undecided: v128, p: v128, s0: v128, s1: v128): u64 {
  // 1 + p holds the digits of p in its mantissa; where it is 2, every trial succeeds.
  const onePlus = f64x2.add(p, f64x2.splat(1));
  const sure = f64x2.ge(onePlus, f64x2.splat(2));
  let digits = i64x2.shl(onePlus, 12);
  let successes = v128.and(undecided, sure);
  undecided = v128.andnot(undecided, sure);
  for (let word = 0; word < 7; word++) {
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
  while (v128.any_true(undecided)) {
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
  const low = popcnt<u64>(i64x2.extract_lane(successes, 0));
  return low | (popcnt<u64>(i64x2.extract_lane(successes, 1)) << 32);
}
