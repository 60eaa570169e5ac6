// How sure it is which plan is best, and whether a plan is beaten: over futures drawn again, or over draws of
// what is not known. A row holds one number for each plan.
import { resampled, resamples } from '../results/draws/intervals.ts';

export type Better = 'less' | 'more';

/** Shares of the rows in which each plan is best; where several are, they share the row. */
export function sharesOfBest(rows: readonly Float64Array[], better: Better): Float64Array {
  const plans = rows[0]?.length ?? 0;
  const shares = new Float64Array(plans);
  for (const row of rows) {
    const best = better === 'less' ? Math.min(...row) : Math.max(...row);
    const ties = row.reduce((sum, value) => sum + (value === best ? 1 : 0), 0);
    row.forEach((value, plan) => {
      if (value === best) shares[plan] = (shares[plan] ?? 0) + 1 / ties;
    });
  }
  return shares.map((best) => best / rows.length);
}

/** What is asked of plans: its rows stand for the same futures or draws, in the same order, in every objective. */
export interface ObjectiveRows {
  readonly better: Better;
  readonly rows: readonly Float64Array[];
}

/**
 * Shares of the rows in which some other plan is at least as good as this one in every objective and better in one.
 */
export function sharesBeaten(objectives: readonly ObjectiveRows[]): Float64Array {
  const [first] = objectives;
  const plans = first?.rows[0]?.length ?? 0;
  const shares = new Float64Array(plans);
  (first?.rows ?? []).forEach((_, r) => {
    const values = objectives.map(({ better, rows }) => rows[r]?.map((value) => (better === 'less' ? value : -value)));
    for (let plan = 0; plan < plans; plan++) {
      if (isBeaten(values, plan)) shares[plan] = (shares[plan] ?? 0) + 1;
    }
  });
  return shares.map((rows) => rows / (first?.rows.length ?? 1));
}

/** Whether some other plan is at least as good in every row and better in one; less is better in all. */
export function isBeaten(values: readonly (ArrayLike<number> | undefined)[], plan: number): boolean {
  const plans = values[0]?.length ?? 0;
  for (let other = 0; other < plans; other++) {
    const steps = values.map((row) => (row?.[other] ?? 0) - (row?.[plan] ?? 0));
    if (other !== plan && steps.every((step) => step <= 0) && steps.some((step) => step < 0)) return true;
  }
  return false;
}

/** Sums over the futures of a unit (a block of runs, or a draw), by plan, and how many futures these are. */
export interface UnitSums {
  readonly sums: Float64Array;
  readonly futures: number;
}

/**
 * What the mean of each plan could have been with other futures, by objective: units drawn again with replacement, 2,000 times, the same
 * ones for all objectives, which have the same units.
 */
export function resampledMeans(objectives: readonly (readonly UnitSums[])[]): readonly (readonly Float64Array[])[] {
  const units = objectives[0]?.length ?? 0;
  const found = objectives.map((): Float64Array[] => []);
  for (let b = 0; b < resamples; b++) {
    const weights = resampled(units, b);
    objectives.forEach((own, k) => found[k]?.push(weightedMeans(own, weights)));
  }
  return found;
}

function weightedMeans(units: readonly UnitSums[], weights: Float64Array): Float64Array {
  const plans = units[0]?.sums.length ?? 0;
  const means = new Float64Array(plans);
  let all = 0;
  units.forEach(({ sums, futures }, u) => {
    const weight = weights[u] ?? 0;
    if (weight === 0) return;
    all += weight * futures;
    for (let plan = 0; plan < plans; plan++) means[plan] = (means[plan] ?? 0) + weight * (sums[plan] ?? 0);
  });
  return means.map((sum) => sum / all);
}

/** Each unit by itself. */
export function meansOfUnits(units: readonly UnitSums[]): readonly Float64Array[] {
  return units.filter(({ futures }) => futures > 0).map(({ sums, futures }) => sums.map((sum) => sum / futures));
}
