// The chance of falling to a low number when the logarithm of numbers drifts and diffuses.
import { exp } from '../machine/pinned.ts';
import { normalBelow } from '../numeric/normal.ts';

export interface Drift {
  /** Mean yearly change of ln N. */
  readonly drift: number;
  /** Variance that a year adds to ln N. */
  readonly variance: number;
}

/** Shift for looking once a year only, in yearly standard deviations (Broadie, Glasserman & Kou 1997, from memory). */
const yearlyShift = 0.5826;

export type Looks = 'all the time' | 'once a year';

/**
 * Chance of having fallen below by year T when starting `logDistance` = ln(N₀/N_low) above (Lande & Orzack 1988; Dennis,
 * Munholland & Scott 1991, from memory): Φ((−d−μT)/σ√T) + e^(−2μd/σ²) Φ((−d+μT)/σ√T). A count once a year misses
 * dips between counts: d is then 0.5826 σ farther.
 */
export function chanceFallenBy(years: number, logDistance: number, { drift, variance }: Drift, looks: Looks): number {
  const sd = Math.sqrt(variance);
  const distance = logDistance + (looks === 'once a year' ? yearlyShift * sd : 0);
  if (logDistance <= 0) return 1;
  if (years <= 0 || variance <= 0) return variance <= 0 && -drift * years > logDistance ? 1 : 0;
  const spread = sd * Math.sqrt(years);
  const direct = normalBelow((-distance - drift * years) / spread);
  const reflected = normalBelow((-distance + drift * years) / spread);
  return direct + (reflected > 0 ? exp((-2 * drift * distance) / variance) * reflected : 0);
}

/** Chance of ever falling below, min(1, e^(−2μd/σ²)). */
export function chanceEverFallen(logDistance: number, { drift, variance }: Drift): number {
  return drift <= 0 ? 1 : Math.min(1, exp((-2 * drift * logDistance) / variance));
}

/** Mean years until the fall, d/|μ|; null where it may never come. */
export function meanYearsToFall(logDistance: number, { drift }: Drift): number | null {
  return drift < 0 ? logDistance / -drift : null;
}

/**
 * Mean lowest number within T years, watched all the time, as a share of N₀ (derived; the idea McCarthy & Thompson 2001):
 * [2(μ+σ²)/(2μ+σ²)] e^((μ+σ²/2)T) Φ(−(μ+σ²)√T/σ) + [2μ/(2μ+σ²)] Φ(μ√T/σ). Counts once a year find higher lows.
 */
export function meanLowestShare(years: number, { drift, variance }: Drift): number {
  const sd = Math.sqrt(variance);
  const divisor = 2 * drift + variance;
  if (Math.abs(divisor) < 1e-5 * variance) return aroundTheGap(years, { drift, variance });
  const spread = Math.sqrt(years) / sd;
  const grown = exp((drift + variance / 2) * years) * normalBelow(-(drift + variance) * spread);
  return ((2 * (drift + variance)) / divisor) * grown + ((2 * drift) / divisor) * normalBelow(drift * spread);
}

/** The formula is 0/0 at 2μ = −σ² and smooth across it: the mean of two points on either side. */
function aroundTheGap(years: number, { variance }: Drift): number {
  const middle = -variance / 2;
  const step = 1e-4 * variance;
  const [above, below] = [middle + step, middle - step].map((drift) => meanLowestShare(years, { drift, variance }));
  return ((above ?? 0) + (below ?? 0)) / 2;
}
