// The models of a point, each by the shortest way that gives the compiler's own bytes.
import { dependsOnMakeUp } from '../../compile/make-up.ts';
import { solveStages } from '../../compile/stage-advance.ts';
import type { Compiled } from '../../compile/year-map.ts';
import { buildLandscape } from '../../landscape/build.ts';
import type { Model } from '../../model/model.ts';
import { resolveModel } from '../../model/resolve.ts';
import { compileBase, compileScenario, type CompiledBase } from '../../pipeline.ts';
import type { Finding } from '../../spec/finding.ts';
import { asNow } from '../../spec/plans/lay.ts';
import { scenarioOf, withScenario } from '../../spec/plans/scenarios.ts';
import type { Spec } from '../../spec/schema/spec.ts';
import { openDesign } from '../design/design.ts';
import { valuesOf, type Factor, type Value } from '../design/factor.ts';
import type { Quantity } from '../measures.ts';
import { scenarioName } from '../places.ts';
import type { SweepPlan } from '../request.ts';
import type { CompiledPoint } from './answers.ts';
import { movingModel } from './moving-model.ts';
import { movingPlans, type MovingPlans } from './moving-plans.ts';

interface Asked {
  readonly plan: SweepPlan;
  readonly change: (values: readonly Value[]) => Spec;
  readonly asked: readonly Quantity[];
}

/** Scenario by scenario, or of the one that is run; a text says why there is no such model, and is the last. */
export type PointCompiler = (values: readonly Value[]) => Iterable<CompiledPoint | string>;

/** With fewer points the shorter way is not worth opening. */
const fewPoints = 6;

export function openCompiler({ plan, change, asked }: Asked): PointCompiler {
  const { design, scenarios } = plan;
  const { factors } = design;
  const base = change(factors.map((factor) => factor.base));
  const running = scenarioOf(base);
  const ofRates =
    scenarios.length === 0 && running === asNow && !asked.every(isNearZero) ? movingModel(base, factors) : null;
  const points = openDesign(design);
  const swept = factors.findIndex(({ name }) => name === scenarioName);
  const all = scenarios.length > 0 ? scenarios : scenarioNames(factors[swept], running);
  // Opened where it is needed: most sweeps of growth never ask.
  let moving: MovingPlans | null | undefined;
  const open = (): MovingPlans | null =>
    points.size < fewPoints
      ? null
      : movingPlans({ factors, scenarios: all, change, probe: points.at(points.size - 1) });
  return (values) => {
    const rated = ofRates?.(values) ?? null;
    if (rated !== null) return [rated];
    const wanted = scenarios.length > 0 ? scenarios : [String(values[swept] ?? running)];
    moving = moving === undefined ? open() : moving;
    const moved = moving?.(values, wanted) ?? null;
    if (moved === null) return compileWhole(change(values), scenarios, asked);
    if (!asked.every(isNearZero)) return moved;
    return moved.map((own, s) => (wanted[s] === asNow ? asNearZero(own) : own));
  };
}

function scenarioNames(swept: Factor | undefined, running: string): readonly string[] {
  return swept === undefined ? [running] : [...new Set(valuesOf(swept).map(String))];
}

/** As `compileNearZero` has it. */
function asNearZero(point: CompiledPoint): CompiledPoint {
  return dependsOnMakeUp(point.model) ? point : { ...point, coefficients: withoutCrowding(point.model) };
}

/** One after the other, so that none is compiled after one that cannot be; what they share is compiled once. */
function* compileWhole(
  spec: Spec,
  scenarios: readonly string[],
  quantities: readonly Quantity[],
): Generator<CompiledPoint | string> {
  const specs = scenarios.length === 0 ? [spec] : scenarios.map((name) => withScenario(spec, name));
  let base: CompiledBase | null = null;
  for (const own of specs) {
    const near = quantities.every(isNearZero) && scenarioOf(own) === asNow ? compileNearZero(own) : null;
    if (near !== null) yield near;
    else {
      base ??= compileBase(spec);
      const { compiled, findings } = compileScenario(base, own);
      yield compiled ?? reasonOf(findings);
    }
  }
}

/** Whether it needs neither capacities nor a start. */
export function isNearZero({ measure }: Quantity): boolean {
  return measure === 'growth' || measure === 'damping';
}

/** Growth needs neither capacities nor a start, and there is growth where these cannot be. Null where more must be solved. */
function compileNearZero(spec: Spec): CompiledPoint | string | null {
  const { model: resolved, findings } = resolveModel(spec);
  if (resolved === null) return reasonOf(findings);
  if (dependsOnMakeUp(resolved)) return null;
  const { landscape, findings: ofLandscape } = buildLandscape(resolved);
  const { model, findings: ofStages } = solveStages(resolved, landscape);
  const all = [...ofLandscape, ...ofStages];
  return anyError(all) ? reasonOf(all) : { model, landscape, coefficients: withoutCrowding(model) };
}

/** Near zero nobody crowds, however strong crowding is; Allee factors stay. */
export function withoutCrowding(model: Model): Compiled['coefficients'] {
  return model.crowding.map(({ alleeHalf }) => ({
    form: model.patches.map(() => 'none'),
    coefficient: new Float64Array(model.patches.length),
    alleeHalf,
  }));
}

function anyError(findings: readonly Finding[]): boolean {
  return findings.some(({ severity }) => severity === 'error');
}

function reasonOf(findings: readonly Finding[]): string {
  return findings.find(({ severity }) => severity === 'error')?.message ?? '';
}
