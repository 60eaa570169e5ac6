// Growth at many points at a time: the rates that move, the matrix they make, and the kernel that solves a part at once.
import { buildBlock } from '../../compile/block.ts';
import type { Compiled } from '../../compile/year-map.ts';
import { openManySolver, type ManyRequest } from '../../kernel/many-growths.ts';
import { buildLandscape } from '../../landscape/build.ts';
import { leading } from '../../numeric/leading.ts';
import type { Spec } from '../../spec/schema/spec.ts';
import type { Factor, Value } from '../design/factor.ts';
import { movingRates } from './moving-rates.ts';
import { planYear } from './year-plan.ts';

export interface ManyPoints {
  /** One growth rate a point; NaN where a point has to be compiled by itself, to say what stands against it. */
  growthAt(points: readonly (readonly Value[])[]): Float64Array;
}

/** Numbers of the matrices of one request to the kernel: they stay in the cache next to the cores. */
const numbersAtATime = 1 << 16;

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
  const { order } = plan;
  const start = startOf(compiled, order);
  const solver = openManySolver();
  const size = order * order;
  const atATime = Math.max(2, Math.floor(numbersAtATime / size) & ~1);
  // Every point writes the same cells, and no other is ever written.
  const matrices = new Float64Array(atATime * size);
  const growthAt = (points: readonly (readonly Value[])[]): Float64Array => {
    const out = new Float64Array(points.length).fill(NaN);
    const known: number[] = [];
    const solve = (): void => {
      const { growthRate } = solver.solve({ matrices: matrices.subarray(0, known.length * size), order, ...start });
      known.forEach((point, k) => (out[point] = growthRate[k] ?? NaN));
      known.length = 0;
    };
    for (const [point, values] of points.entries()) {
      const rates = moving.valuesAt(values);
      if (rates === null) continue;
      plan.fill(rates, matrices.subarray(known.length * size, (known.length + 1) * size));
      if (known.push(point) === atATime) solve();
    }
    if (known.length > 0) solve();
    return out;
  };
  return { growthAt };
}

/** Whether every year is the same, and no share of its own rests on growth. */
function isSame({ variation, catastrophes, phases }: Compiled['model']): boolean {
  if (variation !== null || catastrophes.length > 0) return false;
  return phases.every((phase) => phase.kind !== 'ageing' || phase.stages === undefined);
}

/** Vectors of the base matrix, where both are positive throughout. */
function startOf(compiled: Compiled, order: number): Pick<ManyRequest, 'start'> {
  const { right, left } = leading(buildBlock(compiled, 'zero').matrix);
  if (right?.length !== order || left === null) return {};
  const positive = (vector: Float64Array): boolean => vector.every((value) => value > 0);
  return positive(right) && positive(left) ? { start: { right, left } } : {};
}
