// What is counted in every run to be compared with counts of the past: the classes that those hold, in their patches.
import type { Model } from './model.ts';

export interface WatchedCount {
  /** Index of the patch; null for all counted patches together. */
  readonly patch: number | null;
  /** 1 for each patch that counts. */
  readonly patches: Uint8Array;
  /** By class. */
  readonly weights: Float64Array;
}

/** All together first, then each in the order of the patches; none where nothing was counted. */
export function watchedCounts({ observed, patches }: Pick<Model, 'observed' | 'patches'>): readonly WatchedCount[] {
  if (observed === undefined) return [];
  const counted = [...new Set(observed.counts.map(({ patch }) => patch))].sort((a, b) => a - b);
  const weights = Float64Array.from(observed.of);
  const maskOf = (chosen: readonly number[]): Uint8Array =>
    Uint8Array.from(patches, (_, p) => (chosen.includes(p) ? 1 : 0));
  if (counted.length === 0) return [];
  return [
    { patch: null, patches: maskOf(counted), weights },
    ...counted.map((patch) => ({ patch, patches: maskOf([patch]), weights })),
  ];
}
