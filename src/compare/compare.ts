// Plans against each other: from their runs to what can be said of them.
import { meansOfUnits, resampledMeans, sharesBeaten, sharesOfBest, type ObjectiveRows, type UnitSums } from './best.ts';
import { differenceOf } from './difference.ts';
import { comparedPlans } from './compared-plan.ts';
import { endedTogether, objectivesOf, unitsOf, unitSums, type Objective } from './objectives.ts';
import { patchChanges, sourceRisks, type MoveOfPlan } from './patches.ts';
import type { BestPlan, Comparison, ObjectiveWords, OverBoth, PlanDifference, Robustness } from './results.ts';
import type { PlansRun } from './plans-run.ts';
import { statementOf } from './statement.ts';

export interface ToCompare {
  readonly run: PlansRun;
  /** SHA-256 of everything that decides the comparison. */
  readonly hash: string;
  readonly money: Comparison['money'];
  readonly moves: readonly MoveOfPlan[];
  readonly robustness: readonly Robustness[];
  readonly cautions: readonly string[];
}

export function comparePlans({ run, hash, money, moves, robustness, cautions }: ToCompare): Comparison {
  const objectives = objectivesOf(run);
  const ended = endedTogether(run);
  const rows = rowsOf(run, objectives, ended);
  const differences = allPairs(run, objectives, ended);
  const words = objectives.map(wordsOf);
  const plans = comparedPlans(run, {
    ended,
    objectives,
    differences,
    beaten: beatenOf(objectives, rows),
    money: money !== null,
  });
  const patches = patchChanges(run);
  const results = run.runs[0]?.results;
  if (results === undefined) throw new RangeError('There is no plan to compare.');
  const { tool, model, seed, replicates, years, firstYear, draws, stopped, notDrawn } = results;
  return {
    format: 'skein-compare/1',
    ...{ tool, model, hash, seed, replicates, years, firstYear, money },
    objectives: words,
    scenarios: plans,
    differences,
    best: bestOf(run, objectives, rows),
    patches,
    sources: sourceRisks(run, moves, patches),
    robustness,
    statement: statementOf({ objectives: words, plans, differences, robustness, money, draws: run.draws.length }),
    afterHorizon: afterHorizon(firstYear + years - 1, money !== null),
    ...(notDrawn === true ? { notDrawn } : {}),
    ...(draws === undefined
      ? {}
      : { draws: { number: draws.number, failed: draws.failed, replicatesEach: draws.replicatesEach } }),
    ...(run.precision === null ? {} : { precision: run.precision }),
    stopped,
    cautions,
  };
}

function wordsOf({ name, definition, of, better, decides }: Objective): ObjectiveWords {
  return { name, definition, of, better, decides };
}

function afterHorizon(year: number, money: boolean): string {
  const spent = money ? ' nor what a plan then still costs' : '';
  return `Nothing is counted after ${year}: not what happens to the animals${spent}. A plan that only puts a fall off, or that
pays late, looks better or worse here than it is; look at the change of the count over the last years, and run further with \`--years\`.`.replaceAll(
    '\n',
    ' ',
  );
}

/** From the first plan to each, then between the others in their order. */
function allPairs(run: PlansRun, objectives: readonly Objective[], ended: Uint8Array): readonly PlanDifference[] {
  const plans = [...run.runs.keys()];
  const pairs = plans.flatMap((from) => plans.filter((to) => to > from).map((to) => ({ from, to })));
  return objectives.flatMap((objective) => pairs.map((pair) => differenceOf(run, { objective, ...pair }, ended)));
}

interface Rows {
  /** With other futures of the same number. */
  readonly again: readonly Float64Array[];
  /** Draw by draw; null where nothing was drawn. */
  readonly draws: readonly Float64Array[] | null;
}

function rowsOf(run: PlansRun, objectives: readonly Objective[], ended: Uint8Array): readonly Rows[] {
  const units = unitsOf(run);
  const sums = objectives.map((objective): readonly UnitSums[] => unitSums(objective, units, ended));
  const again = resampledMeans(sums);
  return sums.map((own, k) => ({
    again: again[k] ?? [],
    draws: run.draws.length === 0 ? null : meansOfUnits(own),
  }));
}

function beatenOf(objectives: readonly Objective[], rows: readonly Rows[]): readonly OverBoth[] {
  const over = (rowsIn: (one: Rows) => readonly Float64Array[] | null): Float64Array | null => {
    const decisive = objectives.flatMap(({ decides, better }, k): readonly ObjectiveRows[] => {
      const found = rows[k] === undefined ? null : rowsIn(rows[k]);
      return decides && better !== null && found !== null ? [{ better, rows: found }] : [];
    });
    return decisive.length === 0 ? null : sharesBeaten(decisive);
  };
  const again = over((one) => one.again);
  const draws = over((one) => one.draws);
  return Array.from(again ?? [], (runs, plan) => ({ runs, draws: draws?.[plan] ?? null }));
}

function bestOf({ runs }: PlansRun, objectives: readonly Objective[], rows: readonly Rows[]): readonly BestPlan[] {
  return objectives.flatMap(({ name, better }, k) => {
    const found = rows[k];
    if (better === null || found === undefined) return [];
    const again = sharesOfBest(found.again, better);
    const draws = found.draws === null ? null : sharesOfBest(found.draws, better);
    return runs.map(({ plan }, p) => ({
      outcome: name,
      scenario: plan.name,
      probability: again[p] ?? 0,
      probabilityOverDraws: draws?.[p] ?? null,
    }));
  });
}
