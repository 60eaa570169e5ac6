// How much of a capacity is left where catastrophes lower it for years.
import type { Landscape } from '../../landscape/landscape.ts';
import type { Model } from '../../model/model.ts';

/** What is left of the capacity in the mean over the years. */
export function roomOf({ catastrophes }: Model, { strikes }: Landscape, p: number): number {
  return catastrophes.reduce((room, { capacity }, k) => {
    const lowered = strikes?.[k]?.lowered[p] ?? 0;
    return capacity === null ? room : room * (1 - lowered * (1 - capacity.times));
  }, 1);
}
