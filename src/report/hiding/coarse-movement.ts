// Movement as it may be told where places are hidden: who knows the kernel could work the distances back from exact numbers,
// or from many rough ones. So each link has one number for all years, in steps of 1, 2, 5, 10.
import { roundDown } from '../../view/number.ts';
import type { LinkFlow } from '../movement.ts';

/** Fewer animals a year than this are not told: faint links say most about distance. */
const least = 0.1;

/** In the order of the patches within each step. */
export function coarseMovement(flows: readonly LinkFlow[]): readonly LinkFlow[] {
  return flows
    .map(({ from, to, animals }) => ({ from, to, animals: animals.map((_, i) => (i === 0 ? 0 : yearly(animals))) }))
    .filter(({ animals }) => (animals[1] ?? 0) > 0)
    .sort((a, b) => (b.animals[1] ?? 0) - (a.animals[1] ?? 0) || a.from - b.from || a.to - b.to);
}

/** The mean over the years, rounded to the nearer step on a scale of ratios. */
function yearly(animals: Float64Array): number {
  const mean = animals.reduce((sum, one) => sum + one, 0) / Math.max(1, animals.length - 1);
  return mean < least ? 0 : roundDown(mean * 1.45);
}
