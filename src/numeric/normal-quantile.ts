// The number below which a share of the normal curve lies.
import { log } from '../machine/pinned.ts';
import { normalBelow } from './normal.ts';
import { findRoot } from './root.ts';

/** z with Φ(z) = 0.975: 95 % lie within ±z. */
export const z975 = 1.959963984540054;

/** z with Φ(z) = share, to about 1e-13; share in (0, 1). */
export function normalQuantile(share: number): number {
  if (share === 0.5) return 0;
  const tail = Math.min(share, 1 - share);
  const wanted = log(tail);
  const z = findRoot((x) => log(normalBelow(x)) - wanted, { low: -38, high: 0 }) ?? NaN;
  return share < 0.5 ? z : -z;
}
