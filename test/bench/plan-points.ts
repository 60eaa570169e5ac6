// Points of a sweep that are comparisons: every plan of the flagship at every point by the short way, against compiling each whole.
import { readFileSync } from 'node:fs';
import { compileSpec } from '../../src/pipeline.ts';
import { scenariosOf, withScenario } from '../../src/spec/plans/scenarios.ts';
import { openChange } from '../../src/sweep/point/change.ts';
import { movingPlans } from '../../src/sweep/point/moving-plans.ts';
import { openDesign } from '../../src/sweep/design/design.ts';
import { planSweep } from '../../src/sweep/request.ts';
import { inTurns, processorSeconds } from './measure.ts';
import type { Options } from './options.ts';
import { compileText } from './workload.ts';

export interface PlanPoints {
  /** The number that is swept. */
  readonly over: string;
  /** Compiling every plan whole over the short way. */
  readonly gain: number;
}

const swept = {
  adult_survival: { from: 0.5, to: 0.6 },
  'patches.Saltmarsh.capacity': { from: 60, to: 90 },
  'natal.kernel.mean': { from: 2, to: 4 },
  'start.counted.Saltmarsh': { from: 10, to: 40 },
} as const;

export function measurePlanPoints({ quick, rounds }: Options): readonly PlanPoints[] {
  const { spec } = compileText(readFileSync('models/reed-hare.yaml', 'utf8'));
  const steps = quick ? 5 : 20;
  return Object.entries(swept).map(([over, range]) => {
    const { compiled } = compileSpec(spec);
    const planned =
      compiled === null ? null : planSweep({ over: { [over]: { ...range, steps } }, compare: 'all' }, compiled);
    const plan = planned?.plan ?? null;
    if (plan === null) throw new Error(`No sweep goes over ${over}.`);
    const design = openDesign(plan.design);
    const change = openChange(spec, design.plan.factors);
    const scenarios = scenariosOf(spec).map(({ name }) => name);
    const probe = design.at(design.size - 1);
    const short = movingPlans({ factors: design.plan.factors, scenarios, change, probe });
    if (short === null) throw new Error(`There is no short way over ${over}.`);
    const points = Array.from({ length: design.size }, (_, i) => design.at(i));
    const each = (action: (point: (typeof points)[number]) => void): number =>
      processorSeconds(() => {
        points.forEach(action);
      });
    const whole = (): number =>
      each((point) => {
        for (const name of scenarios) compileSpec(withScenario(change(point), name));
      });
    const times = inTurns(
      [
        { name: 'whole', run: whole },
        { name: 'short', run: () => each((point) => void short(point, scenarios)) },
      ],
      rounds,
    );
    return { over, gain: (times.get('whole') ?? NaN) / (times.get('short') ?? NaN) };
  });
}
