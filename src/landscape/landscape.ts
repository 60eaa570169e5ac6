// For each dispersal, where those that leave a patch end; and how alike the years are in different patches.
import type { Strike } from './strikes.ts';
import type { Correlation } from '../model/chance.ts';

/**
 * Where leavers of a patch end, by origin: destinations[start[p]] to destinations[start[p + 1]] in ascending order, with
 * `chance` the chance of arriving there alive, given that the animal left. What is missing to 1 dies on the way.
 */
export interface Movement {
  readonly start: Int32Array;
  readonly destinations: Int32Array;
  readonly chance: Float64Array;
  /**
   * Where they change with the years, the chances of the same ways in each stretch of steps; `epochOf[t - 1]` is the stretch of
   * step t, and `chance` is that of the first. A way that nobody takes in some years has the chance 0 in them.
   */
  readonly byYear?: { readonly chances: readonly Float64Array[]; readonly epochOf: Int32Array };
  /** Kilometres of each of these ways in the first year in which it is taken, rounded to 1 mm; null where no distance is used. */
  readonly lengthKm: Float64Array | null;
}

export interface Landscape {
  /** One movement for each phase of kind `dispersal`, by the index of the phase; null elsewhere. */
  readonly movements: readonly (Movement | null)[];
  /** Correlation of the years between patches, where rates vary. */
  readonly weather?: Correlation;
  /** One for each catastrophe of the model. */
  readonly strikes?: readonly Strike[];
}

/** The chances of the ways in a step (1-based). */
export function chancesIn({ chance, byYear }: Movement, step: number): Float64Array {
  return byYear?.chances[byYear.epochOf[step - 1] ?? 0] ?? chance;
}
