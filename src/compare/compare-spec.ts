// The whole way from a spec to a comparison of its plans: their runs, what tells them apart, and whether another sound model
// would reverse it.
import type { Crew } from '../kernel/crew.ts';
import type { CrewOptions } from '../pipeline.ts';
import { standingCautions } from '../results/cautions.ts';
import type { Spec } from '../spec/schema/spec.ts';
import { comparePlans } from './compare.ts';
import { movesOf, plansOf } from './plans-of.ts';
import type { PlanToRun } from './plan.ts';
import type { PlansRun } from './plans-run.ts';
import type { Comparison, Robustness } from './results.ts';
import { robustnessOf } from './robust.ts';
import { runPlans } from './run-plans.ts';

export interface CompareOptions extends CrewOptions {
  /** Whether other sound models are run, too. */
  readonly robust?: boolean;
  /** Told before each run: of the model itself, or of another one. */
  readonly onRun?: (what: string) => void;
}

export interface Compared {
  readonly comparison: Comparison;
  readonly run: PlansRun;
}

/** Of plans that `plansOf` made of the spec. Null where not even the first part of the runs was finished. */
export async function compareSpec(
  crew: Crew,
  { spec, plans }: { readonly spec: Spec; readonly plans: readonly PlanToRun[] },
  options: CompareOptions = {},
): Promise<Compared | null> {
  options.onRun?.('the model');
  const run = await runPlans(crew, plans, options);
  if (run === null) return null;
  const own = compared({ spec, plans, run, robustness: [] });
  if (options.robust !== true) return { comparison: own, run };
  const robustness = await robustnessOf(spec, own, (variant) => compareVariant(crew, variant, options));
  return { comparison: compared({ spec, plans, run, robustness }), run };
}

async function compareVariant(
  crew: Crew,
  spec: Spec,
  options: CompareOptions,
): Promise<Comparison | { readonly failure: string } | null> {
  const { plans, findings } = plansOf(spec);
  const failure = findings.find(({ severity }) => severity === 'error')?.message ?? 'it cannot be run';
  if (plans === null) return { failure };
  options.onRun?.('another model');
  const run = await runPlans(crew, plans, options);
  const asked = plans[0]?.compiled.model;
  const whole = run !== null && (asked?.precision !== undefined || run.futures >= (asked?.replicates ?? 0));
  return whole ? compared({ spec, plans, run, robustness: [] }) : null;
}

interface Parts {
  readonly spec: Spec;
  readonly plans: readonly PlanToRun[];
  readonly run: PlansRun;
  readonly robustness: readonly Robustness[];
}

function compared({ spec, plans, run, robustness }: Parts): Comparison {
  const [first] = run.runs;
  if (first === undefined) throw new RangeError('There is no plan to compare.');
  const { provenance, cost } = first.compiled;
  const models = run.runs.map(({ compiled: { model } }) => model);
  const cautions = [...new Set(models.flatMap((model) => standingCautions(model, models)))];
  return comparePlans({
    run,
    hash: provenance.hash,
    money: cost.money,
    moves: movesOf(spec, plans),
    robustness,
    cautions,
  });
}
