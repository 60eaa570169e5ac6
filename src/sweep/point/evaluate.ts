// One point: its model, and what the measures say of it.
import { equilibriumFrom } from '../../analysis/equilibrium.ts';
import { spectrum } from '../../analysis/spectrum.ts';
import { buildBlock } from '../../compile/block.ts';
import { moneyIn } from '../../compare/plans-of.ts';
import { dependsOnMakeUp } from '../../compile/make-up.ts';
import { linearisedBlock } from '../../compile/slopes/linearised.ts';
import { solveStages } from '../../compile/stage-advance.ts';
import { wholeYear, type Compiled } from '../../compile/year-map.ts';
import { batchesOf, runnerOn } from '../../kernel/batch.ts';
import { runPath } from '../../kernel/path.ts';
import { openNext } from '../../kernel/reuse.ts';
import { buildLandscape } from '../../landscape/build.ts';
import type { Machine } from '../../machine/instance.ts';
import { loadMachine } from '../../machine/machine.ts';
import type { PlanCost } from '../../model/costs.ts';
import type { Model } from '../../model/model.ts';
import { compileSpec } from '../../pipeline.ts';
import { resolveModel } from '../../model/resolve.ts';
import { leading } from '../../numeric/leading.ts';
import type { Finding } from '../../spec/finding.ts';
import { asNow } from '../../spec/plans/lay.ts';
import { scenarioOf, withScenario } from '../../spec/plans/scenarios.ts';
import type { Spec } from '../../spec/schema/spec.ts';
import type { Value } from '../design/factor.ts';
import { columnsOf, inScenarios, isOfRuns, quantitiesOf, type Quantity } from '../measures.ts';
import type { SweepPlan } from '../request.ts';
import { openChange } from './change.ts';
import { manyPoints } from './many-points.ts';
import { movingModel } from './moving-model.ts';
import { Tally } from './tally.ts';

/** What a point came to. */
export interface PointResult {
  /** In the order of the columns of the quantities; NaN for what is missing. */
  readonly numbers: Float64Array;
  /** Why no model can have these values; empty where one can. */
  readonly failure: string;
}

export interface Evaluator {
  readonly quantities: readonly Quantity[];
  at(values: readonly Value[]): PointResult;
  /** The same for many points, which may be faster together. */
  all(points: readonly (readonly Value[])[]): readonly PointResult[];
}

/** The base spec compiles. A point is the model as `--set` would have it: with its own capacities, and the same seed. */
export function openEvaluator(spec: Spec, { design, measures, scenarios }: SweepPlan): Evaluator {
  const change = openChange(spec, design.factors);
  const base = resolveModel(change([])).model;
  if (base === null) throw new Error('The base model of a sweep has a mistake.');
  const asked = quantitiesOf(measures, base);
  const quantities = inScenarios(asked, scenarios);
  const width = quantities.flatMap(columnsOf).length;
  const machine = measures.some(isOfRuns) ? loadMachine() : null;
  const inBase = change(design.factors.map((factor) => factor.base));
  const asNowOnly = scenarios.length === 0 && scenarioOf(inBase) === asNow;
  const moving = asNowOnly && !asked.every(isNearZero) ? movingModel(inBase, design.factors) : null;
  const at = (values: readonly Value[]): PointResult => {
    const moved = moving?.(values) ?? null;
    if (moved !== null) return { numbers: measure(moved, asked, machine), failure: '' };
    const changed = change(values);
    const specs = scenarios.length === 0 ? [changed] : scenarios.map((name) => withScenario(changed, name));
    const numbers = new Float64Array(width).fill(NaN);
    for (const [s, own] of specs.entries()) {
      const compiled = compilePoint(own, asked);
      if (typeof compiled === 'string') return { numbers: numbers.fill(NaN), failure: compiled };
      numbers.set(measure(compiled, asked, machine), (s * width) / specs.length);
    }
    return { numbers, failure: '' };
  };
  const growthOnly = measures.every((name) => name === 'growth') && asNowOnly;
  const many = growthOnly ? manyPoints(inBase, design.factors, withoutCrowding) : null;
  if (many === null) return { quantities, at, all: (points) => points.map(at) };
  const all = (points: readonly (readonly Value[])[]): readonly PointResult[] => {
    const growth = many.growthAt(points);
    return points.map((values, i) => {
      const own = growth[i] ?? NaN;
      return Number.isNaN(own) ? at(values) : { numbers: Float64Array.of(own), failure: '' };
    });
  };
  return { quantities, at: (values) => all([values])[0] ?? at(values), all };
}

interface CompiledPoint extends Compiled {
  /** Absent where no measure needs them. */
  readonly startAnimals?: Float64Array;
  readonly image?: ArrayBuffer;
  /** Of the plan; absent where there is none. */
  readonly cost?: PlanCost;
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

function measure(point: CompiledPoint, quantities: readonly Quantity[], machine: Machine | null): Float64Array {
  const { model, image } = point;
  const runs =
    machine === null || image === undefined ? null : tallied(machine, image, { model, cost: point.cost, quantities });
  const plain = new PlainAnswers(point);
  return Float64Array.from(
    quantities.flatMap((quantity) => (quantity.chance ? [...(runs?.numbersOf(quantity) ?? [])] : [plain.of(quantity)])),
  );
}

interface Tallying {
  readonly model: Model;
  readonly cost: PlanCost | undefined;
  readonly quantities: readonly Quantity[];
}

function tallied(machine: Machine, image: ArrayBuffer, { model, cost, quantities }: Tallying): Tally {
  openNext(machine, image);
  const run = runnerOn(machine, image, { steps: model.steps, seed: model.seed, reuse: true });
  const moneyOf = cost === undefined ? null : moneyIn({ model, cost });
  const tally = new Tally(model, quantities, moneyOf);
  for (const batch of batchesOf(model.replicates)) tally.take(run(batch));
  return tally;
}

/** Answers without chance; the matrix near zero is built once for all that need it. */
class PlainAnswers {
  readonly #point: CompiledPoint;
  #found: { readonly growth: number; readonly damping: () => number } | null = null;

  constructor(point: CompiledPoint) {
    this.#point = point;
  }

  of({ measure }: Quantity): number {
    switch (measure) {
      case 'growth':
        return this.#nearZero().growth;
      case 'damping':
        return this.#nearZero().damping();
      case 'standing':
        return this.#standing();
      case 'path-end':
        return this.#pathEnd();
      default:
        return NaN;
    }
  }

  #nearZero() {
    if (this.#found !== null) return this.#found;
    const { matrix } = linearisedBlock(this.#point) ?? buildBlock(this.#point, 'zero');
    const found = leading(matrix);
    this.#found = {
      growth: found.growthRate,
      damping: () => spectrum(matrix, found)?.dampingRatio ?? NaN,
    };
    return this.#found;
  }

  #standing(): number {
    const { startAnimals: start } = this.#point;
    const found = start === undefined ? null : equilibriumFrom(wholeYear(this.#point), start);
    return found === null ? NaN : found.animals.reduce((sum, animals) => sum + animals, 0);
  }

  #pathEnd(): number {
    const { model, image } = this.#point;
    if (image === undefined) return NaN;
    const { animals } = runPath(image, { steps: model.steps });
    const cells = model.patches.length * model.classes.length;
    return animals.subarray(model.steps * cells).reduce((sum, value) => sum + value, 0);
  }
}
