// Which patches gain and which lose under a plan, and what a move does to the patch that it takes from.
import { student95 } from '../numeric/student.ts';
import { pairedShareDifference } from './paired-share.ts';
import type { PatchPair } from './patch-pairs.ts';
import type { PatchChange, SourceRisk } from './results.ts';
import type { PlanRun, PlansRun } from './plans-run.ts';

export function patchChanges({ runs }: PlansRun): readonly PatchChange[] {
  return runs
    .slice(1)
    .flatMap(({ plan, patches }) => inFileOrder(runs, patches).map((pair) => changeOf(plan.name, pair)));
}

/** As the author lists them; those that a plan makes come last. */
function inFileOrder(runs: readonly PlanRun[], patches: readonly PatchPair[]): readonly PatchPair[] {
  const order = new Map((runs[0]?.compiled.model.patches ?? []).map(({ name, fileOrder }) => [name, fileOrder]));
  return patches.toSorted((a, b) => (order.get(a.patch) ?? Infinity) - (order.get(b.patch) ?? Infinity));
}

function changeOf(scenario: string, pair: PatchPair): PatchChange {
  const { patch, futures: n, difference, squares, emptyBoth, emptyBase, emptyPlan } = pair;
  const mean = difference / n;
  const variance = n < 2 ? Infinity : Math.max(0, squares - difference * mean) / (n - 1);
  const half = n < 2 ? Infinity : student95(n - 1) * Math.sqrt(variance / n);
  const neither = n - emptyBoth - emptyBase - emptyPlan;
  return {
    patch,
    scenario,
    animals: { estimate: mean, lower: mean - half, upper: mean + half },
    everEmpty: { before: (emptyBoth + emptyBase) / n, after: (emptyBoth + emptyPlan) / n },
    everEmptyChange: pairedShareDifference({ both: emptyBoth, onlyFrom: emptyBase, onlyTo: emptyPlan, neither }),
  };
}

/** A move as the models of plans have it: from which patches, in which years. */
export interface MoveOfPlan {
  readonly scenario: string;
  readonly action: string;
  readonly sources: readonly string[];
  readonly firstYear: number;
}

export function sourceRisks(
  { runs }: PlansRun,
  moves: readonly MoveOfPlan[],
  changes: readonly PatchChange[],
): readonly SourceRisk[] {
  return moves.flatMap(({ scenario, action, sources, firstYear }) =>
    sources.flatMap((source): readonly SourceRisk[] => {
      const change = changes.find((one) => one.scenario === scenario && one.patch === source);
      const course = runs[0]?.results.abundance.patches.find(({ patch }) => patch === source)?.byYear;
      const before = course?.find(({ year }) => year === firstYear) ?? course?.at(-1);
      if (change === undefined || before === undefined) return [];
      return [{ scenario, action, source, change, stopBelow: before.quantiles['0.05'], year: before.year }];
    }),
  );
}
