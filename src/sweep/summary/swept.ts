// The points of a sweep as columns.
import type { Manifest } from '../manifest.ts';

export interface Swept {
  readonly manifest: Manifest;
  /** By factor, in the order of the points. */
  readonly values: readonly (Float64Array | readonly string[])[];
  /** By name of the column; NaN for what is missing. */
  readonly numbers: ReadonlyMap<string, Float64Array>;
  /** How many points failed for each reason. */
  readonly failures: ReadonlyMap<string, number>;
}
