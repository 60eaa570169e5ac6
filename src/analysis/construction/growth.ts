// Growth that no life history of that pace is known to have.
import type { CompiledModel } from '../../pipeline.ts';
import { multipliersAtRest } from '../../compile/multipliers.ts';
import { patchYear } from '../../compile/patch-year.ts';
import { pinned } from '../../machine/pinned.ts';
import type { Model } from '../../model/model.ts';
import { growthRateOf } from '../../numeric/leading.ts';
import { sparseFromDense } from '../../numeric/sparse.ts';
import type { Finding } from '../../spec/finding.ts';

/** The rule is one of thumb: only what is far above it is told. */
const slack = 1.25;

export function fastGrowth({ model }: CompiledModel): readonly Finding[] {
  const pace = paceOf(model);
  if (pace === null) return [];
  const n = model.classes.length;
  const growths = model.patches.map((patch, p) => {
    const values = patchYear({ model, patch: p, multipliers: multipliersAtRest(model) });
    return { patch: patch.name, growth: growthRateOf(sparseFromDense({ rows: n, columns: n, values })) };
  });
  const fastest = growths.reduce((most, one) => (one.growth > most.growth ? one : most));
  const limit = fastestGrowth(pace);
  if (fastest.growth <= slack * limit) return [];
  const { firstBreeding, survival } = pace;
  return [
    {
      severity: 'warning',
      code: 'too-fast-growth',
      message: `${fastest.patch} grows by ${String(Math.round((fastest.growth - 1) * 100))} % a year near zero, more than such a life history can`,
      path: ['births'],
      part: 'key',
      details: {
        expected: `up to about ${String(Math.round((limit - 1) * 100))} % a year for a first breeding at ${String(firstBreeding)} and an adult survival of ${String(Number(survival.toPrecision(3)))}`,
        fix: 'See whether births are for one sex, and whether they count young that live to the next count twice.',
        reason:
          'Growth, age at first breeding and adult survival of birds and mammals go together (Niel & Lebreton 2005).',
      },
    },
  ];
}

interface Pace {
  /** Years from birth to the first births. */
  readonly firstBreeding: number;
  /** Highest of any breeding class and patch, over the whole year. */
  readonly survival: number;
}

/** Null for life histories that the rule does not know: stages, both sexes, no survival. */
function paceOf(model: Model): Pace | null {
  const seasons = model.phases.filter((phase) => phase.kind === 'survival');
  const broods = model.phases.filter((phase) => phase.kind === 'breeding');
  const ageing = model.phases.find((phase) => phase.kind === 'ageing');
  if (seasons.length === 0 || broods.length === 0 || ageing === undefined) return null;
  if (model.counts !== 'females' || ageing.stages !== undefined || ageing.advance.some((share) => share < 1))
    return null;
  const n = model.classes.length;
  const breeds = (i: number): boolean =>
    broods.some(({ births }) => births.epochs.some((epoch) => (epoch[i] ?? 0) > 0));
  const breeding = Array.from({ length: model.patches.length * n }, (_, i) => i).filter(breeds);
  if (breeding.length === 0) return null;
  const survivals = breeding.map((i) =>
    seasons.reduce((product, { survival }) => product * (survival.epochs[0]?.[i] ?? 0), 1),
  );
  return { firstBreeding: Math.max(1, Math.min(...breeding.map((i) => i % n))), survival: Math.max(...survivals) };
}

/** λ = exp(1 / (α + s / (λ − s))), by bisection: the right side falls as λ grows (Niel & Lebreton 2005). */
function fastestGrowth({ firstBreeding, survival }: Pace): number {
  let [low, high] = [Math.max(1, survival), 20];
  for (let i = 0; i < 60; i++) {
    const middle = (low + high) / 2;
    const right = pinned.exp(1 / (firstBreeding + survival / Math.max(1e-12, middle - survival)));
    if (right > middle) low = middle;
    else high = middle;
  }
  return high;
}
