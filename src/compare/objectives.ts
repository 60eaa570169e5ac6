// What plans are set side by side in: chances, animals and money, one number for every future of every plan.
import type { Better } from './best.ts';
import type { UnitSums } from './best.ts';
import type { PlanRun, PlansRun } from './plans-run.ts';

export interface Objective {
  readonly name: string;
  readonly definition: string;
  readonly of: 'chance' | 'animals' | 'money';
  /** Null where neither is better by itself. */
  readonly better: Better | null;
  /** It counts for being beaten: in all risks and in cost. */
  readonly decides: boolean;
  /** By plan and future; 1 or 0 for a chance. */
  readonly values: readonly (Uint8Array | Float64Array)[];
}

/** The first one decides the order of the plans. */
export function objectivesOf({ runs }: PlansRun): readonly Objective[] {
  const rules = runs[0]?.compiled.model.outcomes ?? [];
  const chances = rules.map(({ name, definition, event }, k): Objective => ({
    name,
    definition,
    of: 'chance',
    // To be above is what is hoped for; all else is feared.
    better: event.is === 'above' ? 'more' : 'less',
    decides: true,
    values: runs.map((run) => hits(run, k)),
  }));
  return [...chances, ...animals(runs, chances.length === 0), ...taken(runs), ...money(runs)];
}

function hits({ reduction }: PlanRun, outcome: number): Uint8Array {
  return Uint8Array.from(reduction.hits[outcome]?.first ?? [], (count) => (count > 0 ? 1 : 0));
}

function animals(runs: readonly PlanRun[], decides: boolean): readonly Objective[] {
  const shared = { of: 'animals', better: 'more' } as const;
  return [
    {
      ...shared,
      name: 'animals at the end',
      definition: 'all animals at the last count',
      decides,
      values: runs.map(({ ledger }) => ledger.last),
    },
    {
      ...shared,
      name: 'lowest count',
      definition: 'the lowest count of all animals in a future, the start included',
      decides: false,
      values: runs.map(({ reduction }) => Float64Array.from(reduction.lowest)),
    },
  ];
}

function taken(runs: readonly PlanRun[]): readonly Objective[] {
  if (!runs.some(({ ledger }) => ledger.takes)) return [];
  return [
    {
      name: 'animals taken',
      definition: 'animals taken over all years',
      of: 'animals',
      better: null,
      decides: false,
      values: runs.map(({ ledger }) => ledger.taken),
    },
  ];
}

function money(runs: readonly PlanRun[]): readonly Objective[] {
  if (runs.every(({ plan }) => plan.moneyOf === null)) return [];
  return [
    {
      name: 'cost',
      definition: 'money spent over all years, discounted to the first',
      of: 'money',
      better: 'less',
      decides: true,
      values: runs.map(({ ledger }) => ledger.presentValue),
    },
  ];
}

/** 1 for the futures that came to their end under every plan. */
export function endedTogether({ runs, futures }: PlansRun): Uint8Array {
  return Uint8Array.from({ length: futures }, (_, i) => (runs.every(({ ledger }) => ledger.ended[i] === 1) ? 1 : 0));
}

/** Runs of a study without draws are drawn again in blocks, so many at most. */
const mostBlocks = 400;

/** The draws, or blocks of runs: what is drawn again. */
export function unitsOf({ draws, futures }: PlansRun): PlansRun['draws'] {
  if (draws.length > 0) return draws;
  const size = Math.ceil(futures / mostBlocks);
  return Array.from({ length: Math.ceil(futures / size) }, (_, i) => ({
    first: i * size,
    futures: Math.min(size, futures - i * size),
  }));
}

export function unitSums({ values }: Objective, units: PlansRun['draws'], ended: Uint8Array): readonly UnitSums[] {
  return units.map(({ first, futures }) => {
    const sums = new Float64Array(values.length);
    let counted = 0;
    for (let i = first; i < first + futures; i++) {
      if (ended[i] === 0) continue;
      counted++;
      values.forEach((plan, p) => (sums[p] = (sums[p] ?? 0) + (plan[i] ?? 0)));
    }
    return { sums, futures: counted };
  });
}
