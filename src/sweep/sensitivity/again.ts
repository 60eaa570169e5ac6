// Drawing rows again with replacement, the same each time: how far a number could be off.
import { wordOf } from '../design/hash.ts';

/** How often each of `rows` rows comes in the b-th drawing. */
export function drawnAgain(rows: number, b: number): Uint16Array {
  const times = new Uint16Array(rows);
  for (let i = 0; i < rows; i++) {
    const chosen = Math.floor((wordOf(0, b, i) / 4294967296) * rows);
    times[chosen] = (times[chosen] ?? 0) + 1;
  }
  return times;
}

export interface Band {
  readonly lower: number;
  readonly upper: number;
}

/** The middle 95 % of what came of the drawings. */
export function middleOf(values: readonly number[]): Band {
  const sorted = values.filter(Number.isFinite).toSorted((a, b) => a - b);
  const at = (share: number): number => {
    const place = Math.max(0, Math.min(sorted.length - 1, share * (sorted.length + 1) - 1));
    const below = Math.floor(place);
    const [low = NaN, high = low] = [sorted[below], sorted[below + 1]];
    return low + (place - below) * (high - low);
  };
  return { lower: at(0.025), upper: at(0.975) };
}
