// Sobol' points (Sobol' 1967) in the order of the Gray code (Antonov & Saleev 1979), with the direction numbers of Joe & Kuo
// (2008), to 1000 dimensions; scrambled on demand as Owen (1995) does, digit by digit.
import { stateOf, wordAfter } from './hash.ts';
import { joeKuo } from './joe-kuo.ts';

const bits = 32;

/** Dimensions that there are direction numbers for. */
export const mostDimensions = 1000;

export interface SobolSequence {
  readonly dimensions: number;
  /** Coordinate of a point as a whole number of 2^-32; the point is below 2^32. */
  word(point: number, dimension: number): number;
}

/** Throws a RangeError above 1000 dimensions. */
export function sobolSequence(dimensions: number): SobolSequence {
  if (dimensions > mostDimensions) throw new RangeError(`Sobol' points have at most ${mostDimensions} dimensions.`);
  const tokens = joeKuo.trim().split(/\s+/u);
  const directions = Array.from({ length: dimensions }, (_, d) => directionsOf(d === 0 ? null : (tokens[d - 1] ?? '')));
  return {
    dimensions,
    word: (point, dimension) => {
      const own = directions[dimension];
      let gray = (point ^ (point >>> 1)) >>> 0;
      let word = 0;
      // Without a branch, which would be guessed wrongly every other time.
      for (let bit = 0; gray !== 0; bit++, gray >>>= 1) word ^= (own?.[bit] ?? 0) & -(gray & 1);
      return word >>> 0;
    },
  };
}

/** v_j = m_j 2^(32 − j), and m_j = 2 a_1 m_(j−1) ⊕ 4 a_2 m_(j−2) ⊕ … ⊕ 2^s m_(j−s) ⊕ m_(j−s); null for the first dimension. */
function directionsOf(token: string | null): Uint32Array {
  const directions = new Uint32Array(bits);
  const [a = 0, ...first] = (token ?? '').split('.').map((part) => Number.parseInt(part, 36));
  const degree = first.length;
  for (let j = 0; j < bits; j++) {
    if (token === null || j < degree) {
      directions[j] = ((token === null ? 1 : (first[j] ?? 1)) << (bits - 1 - j)) >>> 0;
      continue;
    }
    const last = directions[j - degree] ?? 0;
    let word = last ^ (last >>> degree);
    for (let k = 1; k < degree; k++) {
      if (((a >>> (degree - 1 - k)) & 1) === 1) word ^= directions[j - k] ?? 0;
    }
    directions[j] = word >>> 0;
  }
  return directions;
}

/**
 * Nested uniform scrambling (Owen 1995): each binary digit is turned or not by chance, decided anew for each sequence of digits
 * above it. It keeps the evenness of the points and makes each of them uniform.
 */
export function scrambledWord(word: number, seed: number, dimension: number): number {
  const state = stateOf(seed, dimension);
  let out = 0;
  for (let bit = 0; bit < bits; bit++) {
    const above = bit === 0 ? 0 : word >>> (bits - bit);
    const turn = wordAfter(state, above, bit) >>> 31;
    out = ((out << 1) | (((word >>> (bits - 1 - bit)) & 1) ^ turn)) >>> 0;
  }
  return out;
}
