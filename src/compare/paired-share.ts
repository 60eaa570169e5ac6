// The difference between two shares that were counted in the same futures.
import { z975 as z } from '../numeric/normal-quantile.ts';

/** Futures by what became of them under two plans that met the same chance. */
export interface PairedCounts {
  readonly both: number;
  readonly onlyFrom: number;
  readonly onlyTo: number;
  readonly neither: number;
}

export interface Estimate {
  readonly estimate: number;
  readonly lower: number;
  readonly upper: number;
}

export const pairedShareMethod = 'paired shares, Bonett & Price 2012';

export function futuresOf({ both, onlyFrom, onlyTo, neither }: PairedCounts): number {
  return both + onlyFrom + onlyTo + neither;
}

/**
 * Share under `to` less share under `from`, with the 95 % interval of Bonett & Price (2012): with f₁ and f₂ futures in
 * which it happens under one plan only, p₁ = (f₁ + 1)/(n + 2), p₂ = (f₂ + 1)/(n + 2), and p₂ − p₁ ± z √((p₁ + p₂ −
 * (p₂ − p₁)²)/(n + 2)). Futures in which both plans end alike only count as many: this is what common chance gains. Unlike
 * the textbook interval it never has width 0. Needs at least one future.
 */
export function pairedShareDifference(counts: PairedCounts): Estimate {
  const n = futuresOf(counts);
  const estimate = (counts.onlyTo - counts.onlyFrom) / n;
  const from = (counts.onlyFrom + 1) / (n + 2);
  const to = (counts.onlyTo + 1) / (n + 2);
  const centre = to - from;
  const half = z * Math.sqrt((from + to - centre * centre) / (n + 2));
  return { estimate, lower: Math.max(-1, centre - half), upper: Math.min(1, centre + half) };
}

/** Of `hits` under each plan, where both `ended`; arrays by future. */
export function countPairs(from: Uint8Array, to: Uint8Array, ended: Uint8Array): PairedCounts {
  let [both, onlyFrom, onlyTo, neither] = [0, 0, 0, 0];
  for (let i = 0; i < ended.length; i++) {
    if (ended[i] === 0) continue;
    if (from[i] === 1) {
      if (to[i] === 1) both++;
      else onlyFrom++;
    } else if (to[i] === 1) onlyTo++;
    else neither++;
  }
  return { both, onlyFrom, onlyTo, neither };
}
