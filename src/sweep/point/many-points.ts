// Growth at many points at a time: the rates that move, the matrices they make, and the kernel that makes and solves them.
import { buildBlock } from '../../compile/block.ts';
import type { Compiled } from '../../compile/year-map.ts';
import { openAlikeSolver } from '../../kernel/alike-growths.ts';
import type { StartVectors } from '../../kernel/alike-program.ts';
import { openManySolver, type ManySolver } from '../../kernel/many-growths.ts';
import { buildLandscape } from '../../landscape/build.ts';
import { leading } from '../../numeric/leading.ts';
import type { Spec } from '../../spec/schema/spec.ts';
import type { Columns, Factor } from '../design/factor.ts';
import { movingRates } from './moving-rates.ts';
import { planYear, type YearPlan } from './year-plan.ts';

export interface ManyPoints {
  /** One growth rate a point; NaN where a point has to be compiled by itself, to say what stands against it. */
  growthAt(columns: Columns, points: number): Float64Array<ArrayBuffer>;
}

/** Their columns stay in the cache next to the cores. */
const pointsAtATime = 2048;

/**
 * `spec` has the base values of the factors. Null where what is swept moves more than rates. Every matrix starts from the
 * vectors of the base, so that the answer of a point does not depend on its neighbours. Relative error of a growth about 1e-12.
 */
export function manyPoints(
  spec: Spec,
  factors: readonly Factor[],
  coefficientsOf: (model: Compiled['model']) => Compiled['coefficients'],
): ManyPoints | null {
  const moving = movingRates(spec, factors);
  if (moving === null || !isSame(moving.model)) return null;
  const { landscape } = buildLandscape(moving.model);
  const compiled = { model: moving.model, landscape, coefficients: coefficientsOf(moving.model) };
  const plan = planYear(moving, compiled);
  if (plan === null) return null;
  const start = startOf(compiled, plan.order);
  const alike = start === null ? null : openAlikeSolver(plan, start);
  const others = new OtherMatrices(plan, start);
  const solve = (columns: Columns, growth: Float64Array): void => {
    const { columns: rates, fine } = moving.ratesAt(columns, growth.length);
    if (alike === null) growth.fill(NaN);
    else growth.set(alike.growthAt(rates, growth.length));
    const left: number[] = [];
    for (let point = 0; point < growth.length; point++) {
      if (fine[point] === 0) growth[point] = NaN;
      else if (Number.isNaN(growth[point])) left.push(point);
    }
    others.solve(rates, left, growth);
  };
  return {
    growthAt: (columns, points) => {
      const growth = new Float64Array(points);
      for (let from = 0; from < points; from += pointsAtATime) {
        const own = growth.subarray(from, from + pointsAtATime);
        const part = columns.map((column) =>
          column instanceof Float64Array
            ? column.subarray(from, from + own.length)
            : column.slice(from, from + own.length),
        );
        solve(part, own);
      }
      return growth;
    },
  };
}

/** Numbers of the matrices of one request to the kernel: they stay in the cache next to the cores. */
const numbersAtATime = 1 << 16;

/** Matrices with entries that are 0 at some points, or that do not close side by side. */
class OtherMatrices {
  readonly #plan: YearPlan;
  readonly #start: StartVectors | null;
  #opened: { readonly solver: ManySolver; readonly matrices: Float64Array } | null = null;

  constructor(plan: YearPlan, start: StartVectors | null) {
    this.#plan = plan;
    this.#start = start;
  }

  /** Writes the growth at these points into `out`. */
  solve(rates: readonly Float64Array[], points: readonly number[], out: Float64Array): void {
    const { order, fill } = this.#plan;
    const size = order * order;
    const atATime = Math.max(2, Math.floor(numbersAtATime / size) & ~1);
    for (let from = 0; from < points.length; from += atATime) {
      const own = points.slice(from, from + atATime);
      // Every point writes the same cells, and no other is ever written.
      this.#opened ??= { solver: openManySolver(), matrices: new Float64Array(atATime * size) };
      const { solver, matrices } = this.#opened;
      own.forEach((point, k) => {
        fill(rates, point, matrices.subarray(k * size, (k + 1) * size));
      });
      const whole = matrices.subarray(0, own.length * size);
      const { growthRate } = solver.solve({ matrices: whole, order, ...(this.#start ? { start: this.#start } : {}) });
      own.forEach((point, k) => (out[point] = growthRate[k] ?? NaN));
    }
  }
}

/** Whether every year is the same, and no share of its own rests on growth. */
function isSame({ variation, catastrophes, phases }: Compiled['model']): boolean {
  if (variation !== null || catastrophes.length > 0) return false;
  return phases.every((phase) => phase.kind !== 'ageing' || phase.stages === undefined);
}

/** Vectors of the base matrix, where both are positive throughout: it is then irreducible. */
function startOf(compiled: Compiled, order: number): StartVectors | null {
  const { right, left } = leading(buildBlock(compiled, 'zero').matrix);
  if (right?.length !== order || left === null) return null;
  const positive = (vector: Float64Array): boolean => vector.every((value) => value > 0);
  return positive(right) && positive(left) ? { right, left } : null;
}
