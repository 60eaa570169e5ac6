// The parts of the analysis that need the matrix and its vectors alone.
import type { BlockMatrix } from '../compile/block-matrix.ts';
import { exp } from '../machine/pinned.ts';
import { fadingSums } from '../numeric/fading.ts';
import type { Leading } from '../numeric/leading.ts';
import { forEachEntry } from '../numeric/sparse.ts';
import type { LongRunGrowth } from '../results/results.ts';
import { because, type Answer, type Reasons } from './answer.ts';
import { mostEntries } from './cautions.ts';
import { growthStandardError } from './growth-error.ts';
import type { AnalysisInput, ParameterTangent } from './input.ts';
import { stateName } from './label.ts';
import { amongLargest } from './largest.ts';
import { generationTimes, lifetimes, nextGeneration, type LifeSplit } from './life-history.ts';
import type { Analysis } from './schema.ts';
import { entrySensitivities, sensitivityAlong, type Vectors } from './sensitivity.ts';
import { pathFromStart, transientBounds } from './transients.ts';

export function blocksAnswer(block: BlockMatrix, leading: Leading): Analysis['blocks'] {
  return leading.blocks.map(({ states, growthRate, period, feeds }) => ({
    states: Array.from(states, (state) => stateName(block, state)),
    growthRate,
    imprimitivity: period,
    feeds: [...feeds],
  }));
}

export function distributionAnswer(
  block: BlockMatrix,
  { right }: Vectors,
): NonNullable<Analysis['stableDistribution']> {
  return Array.from(right, (share, s) => ({ ...stateName(block, s), share }));
}

export function worthAnswer(block: BlockMatrix, { left }: Vectors): NonNullable<Analysis['reproductiveValue']> {
  return Array.from(left, (value, s) => ({ ...stateName(block, s), value }));
}

export function entriesAnswer(block: BlockMatrix, vectors: Vectors): NonNullable<Analysis['entries']> {
  const { sensitivity, elasticity } = entrySensitivities(block.matrix, vectors);
  const kept = amongLargest(elasticity, mostEntries);
  const entries: NonNullable<Analysis['entries']> = [];
  forEachEntry(block.matrix, (row, column, value, k) => {
    if (!kept(elasticity[k] ?? 0)) return;
    entries.push({
      from: stateName(block, column),
      to: stateName(block, row),
      value,
      sensitivity: sensitivity[k] ?? 0,
      elasticity: elasticity[k] ?? 0,
    });
  });
  return entries;
}

export function parametersAnswer(
  tangents: readonly ParameterTangent[],
  vectors: Vectors,
): NonNullable<Analysis['parameters']> {
  return tangents.map(({ name, value, matrixTangent, solvedAnew, exact = true }) => {
    const sensitivity = sensitivityAlong(matrixTangent, vectors);
    const sensitivitySolvedAnew = solvedAnew ? sensitivityAlong(solvedAnew, vectors) : sensitivity;
    const elasticity = (value / vectors.growthRate) * sensitivity;
    return { name, value, sensitivity, elasticity, sensitivitySolvedAnew, exact };
  });
}

type ApproximateGrowth = NonNullable<NonNullable<Analysis['stochasticGrowth']>['approximation']>;

export interface LifeAnswers {
  readonly netReproductiveRate: Answer<number>;
  readonly generationTime: Answer<NonNullable<Analysis['generationTime']>>;
  readonly lifetimes: Answer<NonNullable<Analysis['lifetimes']>>;
}

const immortal = 'Somebody never dies: without births the matrix does not fade.';

export function lifeAnswers(block: BlockMatrix, split: LifeSplit | undefined, vectors: Vectors | null): LifeAnswers {
  if (!split) {
    const none = because('The matrix was given without telling births from fates.');
    return { netReproductiveRate: none, generationTime: none, lifetimes: none };
  }
  const fading = fadingSums(split.fates);
  const next = nextGeneration(split, fading);
  const lives = lifetimes(split.fates, fading);
  return {
    netReproductiveRate: next ? { value: next.netRate } : because(immortal),
    generationTime: vectors
      ? { value: generationTimes(split, vectors, next) }
      : because('There is no single stable distribution.'),
    lifetimes: lives
      ? {
          value: Array.from(lives.expectancy, (expectancy, s) => ({
            ...stateName(block, s),
            expectancy,
            variance: lives.variance[s] ?? 0,
          })),
        }
      : because(immortal),
  };
}

export function transientsAnswer(
  { block, start, pathSteps = 20 }: AnalysisInput,
  vectors: Vectors,
  primitive: boolean,
): NonNullable<Analysis['transients']> {
  const bounds = transientBounds(block.matrix, vectors, primitive);
  const path = start ? pathFromStart(block.matrix, vectors, { start, steps: pathSteps, primitive }) : null;
  return { ...bounds, fromStart: path && { ...path, times: [...path.times] } };
}

/** By approximation, and by simulation. */
export function stochasticAnswer(
  input: AnalysisInput,
  take: Reasons['take'],
): Answer<NonNullable<Analysis['stochasticGrowth']>> {
  const approximation = approximateGrowth(input);
  const simulated: Answer<LongRunGrowth> =
    input.simulatedGrowth ?? because('The matrix was given without a model to simulate.');
  if (approximation.value === null && simulated.value === null) return approximation;
  return {
    value: {
      approximation: take('stochasticGrowth.approximation', approximation),
      simulated: take('stochasticGrowth.simulated', simulated),
    },
  };
}

function approximateGrowth({ noise, noiseLeavesOut = [] }: AnalysisInput): Answer<ApproximateGrowth> {
  if (!noise) return because('Nothing was said to vary from year to year.');
  if (noise.value === null) return noise;
  const { logGrowth, yearlyVariance } = noise.value;
  const method = 'Tuljapurkar (1982), small noise';
  return { value: { growthRate: exp(logGrowth), logGrowth, yearlyVariance, method, leftOut: [...noiseLeavesOut] } };
}

export function standardErrorAnswer(input: AnalysisInput, vectors: Vectors): Answer<number> {
  const { uncertainty, parameterTangents = [], withoutTangent = [] } = input;
  if (!uncertainty) return because('Every number is taken as known: no parameter says how sure it is.');
  if (uncertainty.value === null) return uncertainty;
  const { names, covariance } = uncertainty.value;
  const beyond = names.find((name) => withoutTangent.includes(name));
  if (beyond !== undefined)
    return because(`The model allows no other number for ${beyond}, so its slope is not known.`);
  // A number that is not known is as it is from the first: capacities are solved for with it.
  const along = ({ matrixTangent, solvedAnew }: ParameterTangent): number =>
    sensitivityAlong(solvedAnew ?? matrixTangent, vectors);
  const moved = new Map(parameterTangents.map((tangent) => [tangent.name, along(tangent)]));
  return {
    value: growthStandardError(
      Float64Array.from(names, (name) => moved.get(name) ?? 0),
      covariance,
    ),
  };
}
