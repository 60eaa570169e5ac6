// Counts of the past beside what the runs have for the same classes, patches and years.
import type { Model, ObservedCounts } from '../model/model.ts';
import { watchedCounts } from '../model/watched.ts';
import type { Reduction } from './reduction/reduction.ts';
import type { ComparedCount, ObservedResult, YearSummary } from './results.ts';
import { z975 } from '../numeric/normal-quantile.ts';

/** Undefined where nothing was counted. */
export function summariseObserved(model: Model, reduction: Reduction): ObservedResult | undefined {
  const { observed, patches, classes } = model;
  const { watched } = reduction;
  if (observed === undefined || watched === null) return undefined;
  const all = watchedCounts(model).map(({ patch }, w) => ({ patch, byYear: courseOf(model, reduction, w) }));
  const fileOrder = (p: number | null): number => (p === null ? -1 : (patches[p]?.fileOrder ?? 0));
  const inOrder = all.toSorted((a, b) => fileOrder(a.patch) - fileOrder(b.patch));
  const nameOf = (patch: number | null): string | null => (patch === null ? null : (patches[patch]?.name ?? ''));
  const counts = inOrder.flatMap(({ patch, byYear }) =>
    countsOf(observed, patch).map((one) => ({ patch: nameOf(patch), ...compared(one, byYear, observed.error) })),
  );
  return {
    classes: classes.filter((_, c) => observed.of[c] === 1),
    error: observed.error,
    abundance: inOrder.map(({ patch, byYear }) => ({ patch: nameOf(patch), byYear })),
    counts,
    ...numbersOf(counts.filter(({ patch }) => patch !== null)),
  };
}

interface YearCount {
  readonly year: number;
  readonly animals: number;
}

/** Of all together only the years in which every counted patch was counted. */
function countsOf({ counts }: ObservedCounts, patch: number | null): readonly YearCount[] {
  if (patch !== null) return counts.filter((one) => one.patch === patch);
  const patches = new Set(counts.map((one) => one.patch)).size;
  const years = [...new Set(counts.map(({ year }) => year))].sort((a, b) => a - b);
  return years.flatMap((year) => {
    const own = counts.filter((one) => one.year === year);
    return own.length < patches ? [] : [{ year, animals: own.reduce((sum, one) => sum + one.animals, 0) }];
  });
}

/** The start is no year of the model: what stands there was put there. */
function compared({ year, animals }: YearCount, byYear: readonly YearSummary[], error: number | null) {
  const course = byYear.slice(1).find((one) => one.year === year);
  if (course === undefined) return { year, animals, lies: null, beyondError: null } as const;
  const { '0.05': low, '0.95': high } = course.quantiles;
  const lies: ComparedCount['lies'] = animals < low ? 'below' : animals > high ? 'above' : 'within';
  const reach = z975 * (error ?? 0) * animals;
  const beyond = animals + reach < low || animals - reach > high;
  return { year, animals, lies, beyondError: error === null ? null : beyond };
}

function numbersOf(counts: readonly ComparedCount[]): Pick<ObservedResult, 'compared' | 'outside' | 'beyondError'> {
  const compared = counts.filter(({ lies }) => lies !== null);
  const known = compared.every(({ beyondError }) => beyondError !== null);
  return {
    compared: compared.length,
    outside: compared.filter(({ lies }) => lies !== 'within').length,
    beyondError: known ? compared.filter(({ beyondError }) => beyondError === true).length : null,
  };
}

function courseOf(
  { firstYear, steps, observed }: Model,
  { watched, runs }: Reduction,
  w: number,
): readonly YearSummary[] {
  if (watched === null || observed === undefined) return [];
  return Array.from({ length: steps + 1 }, (_, t) => ({
    year: firstYear - 1 + t,
    ...watched.summary(w * (steps + 1) + t, runs),
  }));
}
