// Small models, written as the compiler receives them, for tests of the kernel.
import { buildImage } from '../../src/compile/image/build.ts';
import type { CrowdingCoefficients } from '../../src/compile/coefficients.ts';
import type { Movement } from '../../src/landscape/landscape.ts';
import type { Variation } from '../../src/model/chance.ts';
import type { Crowding, Model, OutcomeRule, Phase, RateTable } from '../../src/model/model.ts';

export interface Sketch {
  readonly patches: readonly string[];
  readonly classes: readonly string[];
  readonly phases: readonly Phase[];
  /** P × C. */
  readonly start: readonly number[];
  readonly movements?: readonly (Movement | null)[];
  readonly crowding?: readonly Crowding[];
  readonly coefficients?: readonly CrowdingCoefficients[];
  readonly outcomes?: readonly OutcomeRule[];
  readonly variation?: Variation;
  readonly steps?: number;
}

export function modelOf(sketch: Sketch): Model {
  return {
    title: 'A sketch',
    question: null,
    by: null,
    madeFor: null,
    date: null,
    status: null,
    invented: true,
    firstYear: 1,
    steps: sketch.steps ?? 10,
    counts: 'females',
    oldest: 'open-ended',
    patches: sketch.patches.map((name, fileOrder) => ({ name, at: null, areaKm2: null, capacity: null, fileOrder })),
    classes: sketch.classes,
    parameters: [],
    phases: [...sketch.phases, { kind: 'count', name: 'count' }],
    year: [],
    crowding: sketch.crowding ?? [],
    variation: sketch.variation ?? null,
    catastrophes: [],
    uncertainty: null,
    draws: 0,
    start: { by: 'table', animals: Float64Array.from(sketch.start) },
    outcomes: sketch.outcomes ?? [],
    replicates: 1000,
    seed: 1,
    defaults: [],
  };
}

export function imageOf(sketch: Sketch): ArrayBuffer {
  return buildImage({
    model: modelOf(sketch),
    landscape: { movements: sketch.movements ?? sketch.phases.map(() => null) },
    coefficients: sketch.coefficients ?? [],
    startAnimals: Float64Array.from(sketch.start),
  });
}

/** The same number a class in every patch. */
export function everywhere(patches: number, byClass: readonly number[]): RateTable {
  return table(Array.from({ length: patches }, () => byClass).flat());
}

export function table(numbers: readonly number[]): RateTable {
  return { epochs: [Float64Array.from(numbers)], epochOf: new Int32Array() };
}

/** Each row: from, to, chance. Rows by origin, destinations ascending. */
export function movement(patches: number, rows: readonly (readonly [number, number, number])[]): Movement {
  const start = Int32Array.from({ length: patches + 1 }, (_, p) => rows.filter(([from]) => from < p).length);
  return {
    start,
    destinations: Int32Array.from(rows, ([, to]) => to),
    chance: Float64Array.from(rows, ([, , chance]) => chance),
    lengthKm: null,
  };
}
