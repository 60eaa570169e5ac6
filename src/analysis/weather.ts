// What the variation of a model means on the scale of its numbers: spreads, and correlations as they really are.
import { exp } from '../machine/pinned.ts';
import type { Variation, Varied } from '../model/chance.ts';
import type { VariedShape } from '../model/variation/shape.ts';
import type { Landscape } from '../landscape/landscape.ts';
import { distributionOf } from '../model/variation/distribution.ts';
import { betaTable, gammaTable, tableAt } from '../numeric/chance/quantile-table.ts';
import { namesIn } from '../spec/expression/names.ts';

export interface Range {
  readonly low: number;
  readonly high: number;
}

export interface VariedFacts {
  readonly name: string;
  readonly shape: VariedShape;
  /** Over the patches and years. */
  readonly mean: Range;
  readonly sd: Range;
  /** How far the kernel's table of the distribution can be off; 0 where there is none. */
  readonly tableError: number;
  /** Rates that are worked out anew with this parameter. */
  readonly moves: readonly string[];
}

export interface PairFacts {
  readonly names: readonly [string, string];
  /** Of the underlying normal numbers, as the author gave it. */
  readonly given: number;
  /** Of the numbers themselves. */
  readonly realised: number;
}

export interface DriversFacts {
  readonly names: readonly string[];
  /** Given years, of which each step has one. */
  readonly years: number;
  /** Rates that are worked out anew with them. */
  readonly moves: readonly string[];
}

export interface WeatherFacts {
  readonly varied: readonly VariedFacts[];
  readonly betweenRates: readonly PairFacts[];
  /** Of the underlying normal numbers, over all pairs of patches; null for a single patch. */
  readonly betweenPatches: Range | null;
  /** The same of each number itself, in its first distribution. */
  readonly betweenPatchesRealised: readonly { readonly name: string; readonly range: Range }[];
  readonly autocorrelation: number;
  /** Whose years are drawn; null for none. */
  readonly drivers: DriversFacts | null;
}

/** Pairs of rates listed. */
const mostPairs = 15;

export function weatherFacts(variation: Variation, landscape: Landscape): WeatherFacts {
  const { varied, betweenRates, autocorrelation } = variation;
  const samplers = varied.map(samplerOf);
  const pairs = varied.flatMap((_, b) => varied.slice(0, b).map((_left, a) => [a, b] as const));
  const patches = patchRange(landscape);
  return {
    varied: varied.map((one, k) => factsOf(one, { variation, tableError: samplers[k]?.error ?? 0 })),
    betweenRates: pairs.slice(0, mostPairs).map(([a, b]): PairFacts => {
      const given = entryOf(betweenRates.of, a, b);
      const names = [varied[a]?.name ?? '', varied[b]?.name ?? ''] as const;
      return { names, given, realised: realised(samplers[a], samplers[b], given) };
    }),
    betweenPatches: patches,
    betweenPatchesRealised:
      patches === null
        ? []
        : varied.map(({ name }, k) => ({
            name,
            range: {
              low: realised(samplers[k], samplers[k], patches.low),
              high: realised(samplers[k], samplers[k], patches.high),
            },
          })),
    autocorrelation,
    drivers: driversFacts(variation),
  };
}

function driversFacts({ resampled, responses }: Variation): DriversFacts | null {
  if (resampled === null) return null;
  const { names, years } = resampled;
  const moved = responses.filter(({ expression }) => namesIn(expression).some((name) => names.includes(name)));
  return { names, years: years.length, moves: [...new Set(moved.map(({ name }) => name))] };
}

function entryOf(of: Variation['betweenRates']['of'], a: number, b: number): number {
  return typeof of === 'number' ? of : (of.values[a * of.columns + b] ?? 0);
}

function patchRange({ weather }: Landscape): Range | null {
  if (weather === undefined) return null;
  const { of } = weather;
  if (typeof of === 'number') return { low: of, high: of };
  if (of.columns < 2) return null;
  let [low, high] = [Infinity, -Infinity];
  of.values.forEach((value, i) => {
    if (i % (of.columns + 1) === 0) return;
    low = Math.min(low, value);
    high = Math.max(high, value);
  });
  return { low, high };
}

function factsOf(
  { name, shape, mean, sd }: Varied,
  { variation, tableError }: { readonly variation: Variation; readonly tableError: number },
): VariedFacts {
  const moves = variation.responses.filter(({ expression }) => namesIn(expression).includes(name));
  const rates = [...new Set(moves.map((response) => response.name))];
  return { name, shape, mean: rangeOf(mean.epochs), sd: rangeOf(sd.epochs), tableError, moves: rates };
}

function rangeOf(epochs: readonly Float64Array[]): Range {
  const all = epochs.flatMap((epoch) => [...epoch]);
  return { low: Math.min(...all), high: Math.max(...all) };
}

interface Sampler {
  readonly at: (z: number) => number;
  readonly error: number;
}

/** In the first patch in which it varies. */
function samplerOf({ shape, mean, sd }: Varied): Sampler {
  const [means, sds] = [mean.epochs[0] ?? new Float64Array(0), sd.epochs[0] ?? new Float64Array(0)];
  const patch = Math.max(
    0,
    sds.findIndex((value) => value > 0),
  );
  const own = { mean: means[patch] ?? 0, sd: sds[patch] ?? 0 };
  const found = distributionOf(shape, own);
  switch (found?.shape) {
    case 'beta': {
      const table = betaTable(found, own.sd);
      return { at: (z) => tableAt(table, z), error: table.error };
    }
    case 'gamma': {
      const table = gammaTable({ shape: found.k, scale: found.scale }, own.sd);
      return { at: (z) => tableAt(table, z), error: table.error };
    }
    case 'lognormal':
      return { at: (z) => exp(found.mu + found.sigma * z), error: 0 };
    case 'logit-normal':
      return { at: (z) => 1 / (1 + exp(-found.mu - found.sigma * z)), error: 0 };
    default:
      return { at: () => own.mean, error: 0 };
  }
}

/** Pearson's correlation of two numbers whose normals have the correlation r, by the trapezoidal rule over both. */
function realised(left: Sampler | undefined, right: Sampler | undefined, r: number): number {
  if (left === undefined || right === undefined || r === 0) return 0;
  const rest = Math.sqrt(Math.max(0, 1 - r * r));
  let [weights, x, y, xx, yy, xy] = [0, 0, 0, 0, 0, 0];
  for (let i = -32; i <= 32; i++) {
    for (let j = -32; j <= 32; j++) {
      const [u, v] = [i / 4, j / 4];
      const weight = exp(-(u * u + v * v) / 2);
      const [a, b] = [left.at(u), right.at(r * u + rest * v)];
      weights += weight;
      x += weight * a;
      y += weight * b;
      xx += weight * a * a;
      yy += weight * b * b;
      xy += weight * a * b;
    }
  }
  const covariance = xy / weights - (x / weights) * (y / weights);
  const variances = (xx / weights - (x / weights) * (x / weights)) * (yy / weights - (y / weights) * (y / weights));
  return variances > 0 ? covariance / Math.sqrt(variances) : 0;
}
