// One point: its model, and what the measures say of it.
import { loadMachine } from '../../machine/machine.ts';
import { resolveModel } from '../../model/resolve.ts';
import { asNow } from '../../spec/plans/lay.ts';
import { scenarioOf } from '../../spec/plans/scenarios.ts';
import type { Spec } from '../../spec/schema/spec.ts';
import { columnsOfPoint, type Columns, type Value } from '../design/factor.ts';
import { columnsOf, inScenarios, isOfRuns, pairColumnsOf, quantitiesOf, type Quantity } from '../measures.ts';
import type { SweepPlan } from '../request.ts';
import { answerPoint, pairedAnswers, type Answered } from './answers.ts';
import { openChange } from './change.ts';
import { openCompiler, withoutCrowding } from './compile.ts';
import { manyPoints } from './many-points.ts';
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
  const asking = { quantities: asked, runs, paired: scenarios.length > 0 };
  const compile = openCompiler({ plan: { design, measures, scenarios }, change, asked });
  const at = (values: readonly Value[]): PointResult => {
    const answers: Answered[] = [];
    for (const compiled of compile(values)) {
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
