// Distances between patches and, for each dispersal, where those that leave end.

/**
 * Where leavers of a patch end, by origin: destinations[start[p]] to destinations[start[p + 1]] in ascending order, with
 * `chance` the chance of arriving there alive, given that the animal left. What is missing to 1 dies on the way.
 */
export interface Movement {
  readonly start: Int32Array;
  readonly destinations: Int32Array;
  readonly chance: Float64Array;
}

export interface Landscape {
  /** Kilometres, P×P, rounded to 1 mm; null where no distance is used. */
  readonly distanceKm: Float64Array | null;
  /** One movement for each phase of kind `dispersal`, by the index of the phase; null elsewhere. */
  readonly movements: readonly (Movement | null)[];
}
