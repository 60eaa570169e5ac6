// A whole year as a function of the animals at its start: the path without chance, and the matrix at any state.
import type { Landscape } from '../landscape/landscape.ts';
import type { Model } from '../model/model.ts';
import type { SparseMatrix } from '../numeric/sparse.ts';
import { multiply, product } from '../numeric/sparse-product.ts';
import type { CrowdingCoefficients } from './coefficients.ts';
import { coefficientsIn, multiplierAt } from './crowding-form.ts';
import { addedAnimals, lastingOnly } from './handling.ts';
import { dependsOnMakeUp, settledMakeUp } from './make-up.ts';
import { readingPhase, unitMultipliers, type Multipliers } from './multipliers.ts';
import { phaseMap } from './phase-map.ts';
import { roomOf } from './weather/room.ts';

export interface Compiled {
  readonly model: Model;
  readonly landscape: Landscape;
  readonly coefficients: readonly CrowdingCoefficients[];
}

/** The maps of a year's phases as the given animals meet them, and the animals after it. */
export interface YearRun {
  readonly maps: readonly SparseMatrix[];
  readonly multipliers: Multipliers;
  /** Animals before each phase. */
  readonly before: readonly Float64Array[];
  /** Releases are not in the maps, but in here. */
  readonly after: Float64Array;
}

/** Runs one year from P·C animals at the count before step `step`. */
export function runYear({ model, landscape, coefficients }: Compiled, before: Float64Array, step = 1): YearRun {
  const multipliers = unitMultipliers(model);
  landscape.strikes?.forEach(({ on }, k) => multipliers[model.crowding.length + k]?.set(on));
  const readAt = model.crowding.map((_, k) => readingPhase(model, k));
  const states: Float64Array[] = [];
  let state = before;
  const maps = model.phases.map((phase, index) => {
    readAt.forEach((reading, k) => {
      const own = coefficients[k];
      if (reading === index && own !== undefined)
        readMultipliers({ model, landscape, k, own: coefficientsIn(own, step), into: multipliers[k] }, state);
    });
    states.push(state);
    const map = phaseMap(index, { model, landscape, step, multipliers, state });
    state = multiply(map, state);
    if (phase.kind === 'add') state = sum(state, addedAnimals(phase, step));
    return map;
  });
  return { maps, multipliers, before: states, after: state };
}

function sum(a: Float64Array, b: Float64Array): Float64Array {
  return a.map((value, i) => value + (b[i] ?? 0));
}

interface Reading {
  readonly model: Model;
  readonly landscape: Landscape;
  readonly k: number;
  readonly own: CrowdingCoefficients;
  readonly into: Float64Array | undefined;
}

export function readMultipliers({ model, landscape, k, own, into }: Reading, state: Float64Array): void {
  const n = model.classes.length;
  const counted = model.crowding[k]?.counted;
  model.patches.forEach((_, p) => {
    let count = 0;
    for (let c = 0; c < n; c++) count += (counted?.[c] ?? 0) * (state[p * n + c] ?? 0);
    if (into !== undefined) into[p] = multiplierAt(own, p, count, roomOf(model, landscape, p));
  });
}

/** The year of the first step as a function over all P·C animals; what people do in some years only is left out. */
export interface WholeYear {
  readonly states: number;
  readonly apply: (animals: Float64Array) => Float64Array;
  readonly matrixAt: (animals: Float64Array) => SparseMatrix;
}

export function wholeYear(first: Compiled): WholeYear {
  const compiled = { ...first, model: lastingOnly(first.model) };
  const { patches, classes } = compiled.model;
  return {
    states: patches.length * classes.length,
    apply: (animals) => runYear(compiled, animals).after,
    matrixAt: (animals) => {
      const nobody = animals.every((value) => value === 0);
      return productOf(runYear(compiled, nobody ? nearZero(compiled) : animals).maps);
    },
  };
}

/** Nobody; where births depend on the make-up of the sexes, so few animals of the settled make-up that nothing else matters. */
export function nearZero(compiled: Compiled): Float64Array {
  const { model } = compiled;
  const states = model.patches.length * model.classes.length;
  if (!dependsOnMakeUp(model)) return new Float64Array(states);
  return settledMakeUp(states, (animals) => runYear(compiled, animals).after);
}

/** maps[last] · … · maps[0]. */
export function productOf(maps: readonly SparseMatrix[]): SparseMatrix {
  const [first, ...others] = maps;
  if (first === undefined) throw new RangeError('A year has at least one phase.');
  return others.reduce((year, map) => product(map, year), first);
}
