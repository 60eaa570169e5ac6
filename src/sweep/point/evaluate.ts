// One point: its model, and what the measures say of it.
import { dependsOnMakeUp } from '../../compile/make-up.ts';
import { solveStages } from '../../compile/stage-advance.ts';
import type { Compiled } from '../../compile/year-map.ts';
import { buildLandscape } from '../../landscape/build.ts';
import { loadMachine } from '../../machine/machine.ts';
import type { Model } from '../../model/model.ts';
import { compileSpec } from '../../pipeline.ts';
import { resolveModel } from '../../model/resolve.ts';
import type { Finding } from '../../spec/finding.ts';
import { asNow } from '../../spec/plans/lay.ts';
import { scenarioOf, withScenario } from '../../spec/plans/scenarios.ts';
import type { Spec } from '../../spec/schema/spec.ts';
import { columnsOfPoint, type Columns, type Value } from '../design/factor.ts';
import { columnsOf, inScenarios, isOfRuns, pairColumnsOf, quantitiesOf, type Quantity } from '../measures.ts';
import type { SweepPlan } from '../request.ts';
import { answerPoint, pairedAnswers, type Answered, type CompiledPoint } from './answers.ts';
import { openChange } from './change.ts';
import { manyPoints } from './many-points.ts';
import { movingModel } from './moving-model.ts';
import { Tapes } from './tapes.ts';

/** What a point came to. */
export interface PointResult {
  /** In the order of the columns of the quantities, then of `pairColumnsOf`; NaN for what is missing. */
  readonly numbers: Float64Array;
  /** Why no model can have these values; empty where one can. */
  readonly failure: string;
}

/** What many points came to. */
export interface PointResults {
  /** In the order of the columns of the quantities, each with a number a point. */
  readonly numbers: readonly Float64Array<ArrayBuffer>[];
  /** By point, only of those that no model can have. */
  readonly failures: ReadonlyMap<number, string>;
}

export interface Evaluator {
  readonly quantities: readonly Quantity[];
  at(values: readonly Value[]): PointResult;
  /** The same for so many points, which may be faster together. */
  all(columns: Columns, points: number): PointResults;
}

/** The base spec compiles. A point is the model as `--set` would have it: with its own capacities, and the same seed. */
export function openEvaluator(spec: Spec, { design, measures, scenarios }: SweepPlan): Evaluator {
  const change = openChange(spec, design.factors);
  const base = resolveModel(change([])).model;
  if (base === null) throw new Error('The base model of a sweep has a mistake.');
  const asked = quantitiesOf(measures, base);
  const quantities = inScenarios(asked, scenarios);
  const width = [...quantities.flatMap(columnsOf), ...pairColumnsOf(asked, scenarios)].length;
  const runs = measures.some(isOfRuns) ? { machine: loadMachine(), tapes: new Tapes() } : null;
  const inBase = change(design.factors.map((factor) => factor.base));
  const asNowOnly = scenarios.length === 0 && scenarioOf(inBase) === asNow;
  const moving = asNowOnly && !asked.every(isNearZero) ? movingModel(inBase, design.factors) : null;
  const asking = { quantities: asked, runs, paired: scenarios.length > 0 };
  const at = (values: readonly Value[]): PointResult => {
    const moved = moving?.(values) ?? null;
    if (moved !== null) return { numbers: Float64Array.from(answerPoint(moved, asking).numbers), failure: '' };
    const changed = change(values);
    const specs = scenarios.length === 0 ? [changed] : scenarios.map((name) => withScenario(changed, name));
    const answers: Answered[] = [];
    for (const own of specs) {
      const compiled = compilePoint(own, asked);
      if (typeof compiled === 'string') return { numbers: new Float64Array(width).fill(NaN), failure: compiled };
      answers.push(answerPoint(compiled, asking));
    }
    const paired = asking.paired ? pairedAnswers(asked, answers) : [];
    return { numbers: Float64Array.from([...answers.flatMap(({ numbers }) => numbers), ...paired]), failure: '' };
  };
  const growthOnly = measures.every((name) => name === 'growth') && asNowOnly;
  const many = growthOnly ? manyPoints(inBase, design.factors, withoutCrowding) : null;
  const all = (columns: Columns, points: number): PointResults => {
    const growth = many?.growthAt(columns, points) ?? null;
    const numbers = growth === null ? Array.from({ length: width }, () => new Float64Array(points)) : [growth];
    const failures = new Map<number, string>();
    for (let point = 0; point < points; point++) {
      if (growth !== null && !Number.isNaN(growth[point])) continue;
      const own = at(columns.map((column) => column[point] ?? NaN));
      numbers.forEach((column, k) => (column[point] = own.numbers[k] ?? NaN));
      if (own.failure !== '') failures.set(point, own.failure);
    }
    return { numbers, failures };
  };
  if (many === null) return { quantities, at, all };
  const alone = (values: readonly Value[]): PointResult => {
    const { numbers, failures } = all(columnsOfPoint(values), 1);
    return { numbers: Float64Array.from(numbers, (column) => column[0] ?? NaN), failure: failures.get(0) ?? '' };
  };
  return { quantities, at: alone, all };
}

/** A text says why there is no such model. */
function compilePoint(spec: Spec, quantities: readonly Quantity[]): CompiledPoint | string {
  if (quantities.every(isNearZero) && scenarioOf(spec) === asNow) {
    const near = compileNearZero(spec);
    if (near !== null) return near;
  }
  const { compiled, findings } = compileSpec(spec);
  return compiled ?? reasonOf(findings);
}

/** Whether it needs neither capacities nor a start. */
function isNearZero({ measure }: Quantity): boolean {
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
function withoutCrowding(model: Model): Compiled['coefficients'] {
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
