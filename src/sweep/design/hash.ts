// Chance of designs: 32-bit words from a seed and up to three others, the same everywhere, in any order.

/** The 32-bit finaliser of MurmurHash3. */
function mixed(x: number): number {
  const once = Math.imul(x ^ (x >>> 16), 0x85ebca6b);
  const twice = Math.imul(once ^ (once >>> 13), 0xc2b2ae35);
  return (twice ^ (twice >>> 16)) >>> 0;
}

/** Absorbs one word after the other. `seed` is a whole number below 2^53. */
export function wordOf(seed: number, a: number, b = 0, c = 0): number {
  return wordAfter(stateOf(seed, a), b, c);
}

/** What has absorbed the seed and the first word, for many others after it. */
export function stateOf(seed: number, a: number): number {
  let state = mixed((seed >>> 0) ^ 0x9e3779b9);
  state = mixed(state ^ (Math.floor(seed / 4294967296) + 0x7f4a7c15));
  return mixed(Math.imul(state, 0x2c1b3c6d) ^ a);
}

export function wordAfter(state: number, b: number, c: number): number {
  const next = mixed(Math.imul(state, 0x297a2d39) ^ b);
  return mixed(Math.imul(next, 0x1b56c4e9) ^ c);
}

/** In (0, 1). */
export function shareOf(word: number): number {
  return (word + 0.5) / 4294967296;
}
