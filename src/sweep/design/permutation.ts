// A shuffle of 0 … n − 1 of which any place can be asked without keeping the others: a Feistel network over the next even
// power of two, walked along until it lands below n.
import { wordOf } from './hash.ts';

export interface Shuffle {
  readonly seed: number;
  /** Tells shuffles of the same seed apart. */
  readonly key: number;
  /** From 1 to 2^30. */
  readonly size: number;
}

const rounds = 8;

/** Where `place` goes; every place below `size` is reached exactly once. */
export function shuffled({ seed, key, size }: Shuffle, place: number): number {
  let half = 1;
  while (half * half < size) half *= 2;
  let here = place;
  do here = crossed({ seed, key, half }, here);
  while (here >= size);
  return here;
}

function crossed(
  { seed, key, half }: { readonly seed: number; readonly key: number; readonly half: number },
  x: number,
) {
  let [left, right] = [Math.floor(x / half), x % half];
  for (let round = 0; round < rounds; round++) {
    [left, right] = [right, (left ^ wordOf(seed, key, right, round)) & (half - 1)];
  }
  return left * half + right;
}
