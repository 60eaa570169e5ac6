// A stream of random words of its own for each (class, use): xoroshiro128++ (Blackman & Vigna 2019), its two words of state
// made from the Philox block of the patch and phase, so that adding a class or a use moves no other draw.
// Samplers keep the state in locals (globals cost twice) and write the step out; `nextWord` says what the step is.

/** The 64-bit finaliser of SplitMix64 (Steele, Lea & Flood 2014; constants of Stafford's variant 13). */
export function finalise(x: u64): u64 {
  x = (x ^ (x >> 30)) * 0xbf58476d1ce4e5b9;
  x = (x ^ (x >> 27)) * 0x94d049bb133111eb;
  return x ^ (x >> 31);
}

/** The constant of a class (by the hash of its name) and a use. */
export function streamOf(classKey: u32, use: i32): u64 {
  return finalise((u64(classKey) << 32) | u64(use));
}

/** The constant of one of several streams of the same class and use, such as one a destination. */
export function substreamOf(stream: u64, index: u32): u64 {
  return stream + u64(index) * 0x9e3779b97f4a7c15;
}

/** A uniform number in [0, 1) from the top 53 bits of a word. */
export function unit(word: u64): f64 {
  return f64(word >> 11) * 1.1102230246251565e-16;
}

/** The first word of the stream with this state. */
export function firstWord(s0: u64, s1: u64): u64 {
  return rotl<u64>(s0 + s1, 17) + s0;
}

/** Known-answer probe: the word number `index` (from 0) of the stream with this state. */
export function nextWord(s0: u64, s1: u64, index: i32): u64 {
  for (let i = 0; i < index; i++) {
    const t = s1 ^ s0;
    s0 = rotl<u64>(s0, 49) ^ t ^ (t << 21);
    s1 = rotl<u64>(t, 28);
  }
  return firstWord(s0, s1);
}
