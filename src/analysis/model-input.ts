// What the analysis needs of a compiled model: its matrix at a state, births apart from fates, the year as a function.
import type { AtState } from '../compile/block-matrix.ts';
import { yearJacobian } from '../compile/slopes/year-jacobian.ts';
import { nearZero, runYear, type Compiled } from '../compile/year-map.ts';
import type { Model, Phase, RateTable } from '../model/model.ts';
import { principalPart } from '../numeric/principal-part.ts';
import { sparseFromDense } from '../numeric/sparse.ts';
import { growthWithChance, type CompiledModel } from '../pipeline.ts';
import type { LongRunGrowth } from '../results/results.ts';
import { because, type Answer } from './answer.ts';
import { estimateErrors } from './chance/estimate-errors.ts';
import { modelFalls } from './chance/model-falls.ts';
import { modelYears } from './chance/model-years.ts';
import type { AnalysisInput, FactorAtZero, NamedCovariance } from './input.ts';
import { placesOf } from './label.ts';
import { lifeAt } from './life-at.ts';
import { networkOf } from './network.ts';
import { quickYear } from './quick-year.ts';
import { parameterTangents } from './parameter-tangents.ts';
import { dependsOnNumbers, stateAt } from './state-at.ts';
import { modelSpread } from './spread/model-spread.ts';
import type { YearMap } from './year-map.ts';

/** The input at nobody, at the start, or where numbers stand still; there may be no such place. */
export function analysisInputOf(compiled: CompiledModel, at: AtState): Answer<AnalysisInput> {
  const { model, startAnimals } = compiled;
  const state = stateAt(compiled, at);
  if (state === null) return because('Numbers do not come to stand still from the start of this model.');
  const { block, split, linearised } = lifeAt(compiled, at, state);
  const places = placesOf(block);
  const crowded = dependsOnNumbers(model)
    ? { yearMap: yearOver(compiled, places), factorsAtZero: factorsAtZero(compiled) }
    : {};
  const changing = changesByYear(compiled);
  return {
    value: {
      block,
      start: Float64Array.from(places, (place) => startAnimals[place] ?? 0),
      split,
      ...parameterTangents(compiled, block, state),
      noise: noiseAt(compiled, at),
      noiseLeavesOut: model.catastrophes.map(({ name }) => name),
      simulatedGrowth: simulatedAt(compiled, at),
      falls: modelFalls(compiled, { at, changesByYear: changing, places }),
      changesByYear: changing,
      uncertainty: uncertaintyOf(model),
      network: networkOf(model),
      spread: modelSpread(compiled),
      losslessDispersal: nobodyIsLost(compiled),
      linearised: linearised && needsBoth(model),
      ...crowded,
    },
  };
}

function noiseAt(compiled: CompiledModel, at: AtState): AnalysisInput['noise'] & object {
  const { model } = compiled;
  if (at !== 'zero' && model.variation !== null && dependsOnNumbers(model)) {
    return because('Where numbers are held by crowding there is no long-run growth; it is told near zero.');
  }
  return modelYears(compiled);
}

function simulatedAt(compiled: CompiledModel, at: AtState): Answer<LongRunGrowth> {
  if (at !== 'zero') return because('It is told near zero.');
  const { withChance, reason } = growthWithChance(compiled);
  return withChance === null ? because(reason ?? 'There is none.') : { value: withChance };
}

function changesByYear({ model, landscape }: Compiled): boolean {
  const moves = landscape.movements.some((movement) => (movement?.byYear?.chances.length ?? 1) > 1);
  return (
    moves ||
    model.phases.some((phase) => doneInSomeYears(phase) || tablesOf(phase).some(({ epochs }) => epochs.length > 1))
  );
}

function doneInSomeYears(phase: Phase): boolean {
  return 'active' in phase && phase.active !== null;
}

function tablesOf(phase: Phase): readonly RateTable[] {
  switch (phase.kind) {
    case 'survival':
      return [phase.survival];
    case 'breeding':
      return [phase.births];
    case 'demography':
      return [phase.fates, phase.births];
    case 'dispersal':
      return [phase.leaving];
    default:
      return [];
  }
}

function uncertaintyOf({ uncertainty }: Model): Answer<NamedCovariance> {
  if (uncertainty === null) return because('Every number is taken as known: no parameter says how sure it is.');
  const errors = estimateErrors(uncertainty);
  return errors === null ? because('One draw does not tell how far a number can be off.') : { value: errors };
}

function needsBoth({ phases }: Model): boolean {
  return phases.some(
    (phase) => phase.kind === 'breeding' && (phase.mating?.form ?? 'female-dominant') !== 'female-dominant',
  );
}

function factorsAtZero(compiled: Compiled): readonly FactorAtZero[] {
  const { multipliers } = runYear(compiled, nearZero(compiled));
  return compiled.model.crowding.map(({ name }, k) => {
    const factors = multipliers[k] ?? Float64Array.of(1);
    return { crowding: name, least: Math.min(...factors), most: Math.max(...factors) };
  });
}

function yearOver(compiled: Compiled, places: readonly number[]): YearMap {
  const whole = quickYear(compiled);
  const spread = (animals: Float64Array): Float64Array => {
    const all = new Float64Array(whole.states);
    places.forEach((place, s) => (all[place] = animals[s] ?? 0));
    return all;
  };
  return {
    states: places.length,
    apply: (animals) => {
      const after = whole.apply(spread(animals));
      const kept = new Float64Array(places.length);
      places.forEach((place, s) => (kept[s] = after[place] ?? 0));
      return kept;
    },
    matrixAt: (animals) => principalPart(whole.matrixAt(spread(animals)), places),
    jacobianAt: (animals) => {
      const all = spread(animals);
      return sparseFromDense(yearJacobian(compiled, all.some((count) => count > 0) ? all : nearZero(compiled), places));
    },
  };
}

/** In every dispersal all that leave arrive alive. */
function nobodyIsLost({ model, landscape }: Compiled): boolean {
  return model.phases.every((phase, index) => {
    const movement = landscape.movements[index];
    if (phase.kind !== 'dispersal' || !movement) return true;
    return model.patches.every((_, p) => {
      const [start, end] = [movement.start[p] ?? 0, movement.start[p + 1] ?? 0];
      return start === end || movement.chance.subarray(start, end).reduce((sum, chance) => sum + chance, 0) > 1 - 1e-9;
    });
  });
}
