// Every rate that differs between years, as a function of the normal numbers of the year: its mean, and how it goes together with others.
import { pinned } from '../../machine/pinned.ts';
import type { PatchNumbers, Response, ScaledRate, Varied, Variation } from '../../model/chance.ts';
import { distributionOf, numberAt } from '../../model/variation/distribution.ts';
import { betaTable, gammaTable, tableAt } from '../../numeric/chance/quantile-table.ts';
import { derivative } from '../../spec/expression/derivative.ts';
import { evaluate } from '../../spec/expression/evaluate.ts';
import { namesIn } from '../../spec/expression/names.ts';
import { covarianceOf, hermiteSeries } from './hermite.ts';

/** The rate as a factor of its value at the means, in one patch. */
export interface VariedRate extends ScaledRate {
  readonly patch: number;
  /** Mean of the factor, less 1. */
  readonly meanShift: number;
  /** The factor along each number of the year that it depends on, the others at their means. */
  readonly along: readonly Along[];
}

export interface Along {
  /** Index among the varied numbers. */
  readonly varied: number;
  readonly series: Float64Array;
}

/** In the first year. Rates that stand still are left out. */
export function variedRates(variation: Variation, firstYear: number): readonly VariedRate[] {
  const quantiles = variation.varied.map(quantilesOf);
  const own = variation.varied.flatMap((varied, k) => ratesItself(varied, { k, at: quantiles[k] ?? (() => null) }));
  const through = variation.responses.flatMap((response) =>
    response.patches.flatMap((patch) => responding({ variation, response, patch, firstYear, quantiles })),
  );
  return [...own, ...through];
}

/** The number in a patch at a normal number; null where it does not vary there. */
type Quantiles = (patch: number) => ((z: number) => number) | null;

/** As the kernel reads it: beta and gamma from tables. */
function quantilesOf({ shape, mean, sd }: Varied): Quantiles {
  const known = new Map<string, (z: number) => number>();
  return (patch) => {
    const own = { mean: first(mean, patch), sd: first(sd, patch) };
    if (own.sd === 0 || own.mean === 0) return null;
    const key = `${own.mean} ${own.sd}`;
    const made = known.get(key) ?? quantilesAt(shape, own);
    known.set(key, made);
    return made;
  };
}

function quantilesAt(shape: Varied['shape'], own: { readonly mean: number; readonly sd: number }) {
  const found = distributionOf(shape, own);
  if (found === null) throw new Error(`No ${shape} has the mean ${own.mean} and the SD ${own.sd}.`);
  if (found.shape !== 'beta' && found.shape !== 'gamma') return (z: number) => numberAt(found, z);
  const table =
    found.shape === 'beta' ? betaTable(found, own.sd) : gammaTable({ shape: found.k, scale: found.scale }, own.sd);
  return (z: number) => tableAt(table, z);
}

function first({ epochs, epochOf }: PatchNumbers, patch: number): number {
  return epochs[epochOf[0] ?? 0]?.[patch] ?? 0;
}

function ratesItself({ of, mean }: Varied, { k, at }: { readonly k: number; readonly at: Quantiles }): VariedRate[] {
  if (of.kind !== 'rate') return [];
  const series = new Map<(z: number) => number, Float64Array>();
  const patches = mean.epochs[0]?.length ?? 0;
  return Array.from({ length: patches }, (_, patch) => patch).flatMap((patch) => {
    const quantile = at(patch);
    if (quantile === null) return [];
    const base = first(mean, patch);
    const own = series.get(quantile) ?? hermiteSeries((z) => quantile(z) / base);
    series.set(quantile, own);
    return [
      { phase: of.phase, part: of.part, class: of.class, patch, meanShift: 0, along: [{ varied: k, series: own }] },
    ];
  });
}

interface Responding {
  readonly variation: Variation;
  readonly response: Response;
  readonly patch: number;
  readonly firstYear: number;
  readonly quantiles: readonly Quantiles[];
}

/** The mean of the factor is exact for one number, and of second order in how several numbers go together. */
function responding(request: Responding): readonly VariedRate[] {
  const { variation, response, patch, quantiles } = request;
  const base = first(response.base, patch);
  const names = namesIn(response.expression);
  const moving = variation.varied.flatMap((varied, k) => {
    const quantile = names.includes(varied.name) ? (quantiles[k]?.(patch) ?? null) : null;
    return quantile === null ? [] : [{ k, name: varied.name, quantile, series: hermiteSeries(quantile) }];
  });
  if (base === 0 || moving.length === 0) return [];
  const along = moving.map(({ k, name, quantile }) => {
    const at = (z: number): number => valueAt(request, response.expression, [name, quantile(z)]) / base;
    return { varied: k, series: hermiteSeries(at), shift: meanOf(at) - 1 };
  });
  let meanShift = along.reduce((sum, { shift }) => sum + shift, 0);
  moving.forEach((left, a) => {
    moving.slice(0, a).forEach((right) => {
      const slope = derivative(derivative(response.expression, left.name), right.name);
      const r = betweenRates(variation, left.k, right.k);
      meanShift += (valueAt(request, slope) / base) * covarianceOf(left.series, right.series, r);
    });
  });
  return [{ phase: response.phase, part: response.part, class: response.class, patch, meanShift, along }];
}

export function betweenRates({ betweenRates: { of } }: Variation, a: number, b: number): number {
  if (a === b) return 1;
  return typeof of === 'number' ? of : (of.values[a * of.columns + b] ?? 0);
}

/** With all numbers that vary at their means, but for one that is given; within the bounds that the kernel holds it to. */
function valueAt(
  { variation, response, patch, firstYear }: Responding,
  expression: Response['expression'],
  given?: readonly [string, number],
): number {
  const scope = (name: string): number | undefined => {
    if (name === given?.[0]) return given[1];
    const varied = variation.varied.find((one) => one.name === name && one.of.kind === 'parameter');
    if (varied !== undefined) return first(varied.mean, patch);
    return name === 'year' ? firstYear : (variation.dated.get(name)?.[0] ?? variation.attributes.get(name)?.[patch]);
  };
  const found = evaluate(expression, scope, pinned);
  if (!found.ok) return 0;
  if (given === undefined) return found.value;
  return Math.max(0, response.bounds === 'share' ? Math.min(1, found.value) : found.value);
}

/** E f(Z) by the trapezoidal rule over the normal curve. */
function meanOf(at: (z: number) => number): number {
  let [weights, sum] = [0, 0];
  for (let i = -288; i <= 288; i++) {
    const z = i / 32;
    const weight = pinned.exp((-z * z) / 2);
    weights += weight;
    sum += weight * at(z);
  }
  return sum / weights;
}
