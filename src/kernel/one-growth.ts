// One small life cycle that the kernel does not solve: a reducible one, or one whose bounds did not close.
import { leading } from '../numeric/leading.ts';
import { sparseFromDense } from '../numeric/sparse.ts';

export interface OneGrowth {
  readonly growthRate: number;
  readonly error: number;
  /** 0 where it is reducible. */
  readonly period: number;
  /** NaN where they are not unique. */
  readonly right: Float64Array;
  readonly left: Float64Array;
  readonly elasticities: () => Float64Array;
  /** Why there are no vectors. */
  readonly reason?: string;
}

/** What `leading` promises of the growth, with room. */
const statedError = 1e-12;

/** `values` [row][column]; `index` names the matrix in errors. Errors: throws RangeError at an entry that is no number from 0. */
export function slowly(values: Float64Array, order: number, index: number): OneGrowth {
  const bad = values.findIndex((value) => !(value >= 0 && value < Infinity));
  if (bad >= 0) {
    const place = `row ${Math.floor(bad / order) + 1}, column ${(bad % order) + 1}`;
    throw new RangeError(`Matrix ${index} has ${values[bad]} in ${place}; a projection matrix holds numbers from 0.`);
  }
  const found = leading(sparseFromDense({ rows: order, columns: order, values }));
  const none = new Float64Array(order).fill(NaN);
  const right = found.right ?? none;
  const left = found.left ?? none;
  return {
    growthRate: found.growthRate,
    error: found.growthRate === 0 ? 0 : statedError,
    period: found.irreducible ? found.period : 0,
    right,
    left,
    elasticities: () => elasticitiesOf(values, right, left, found.growthRate),
    ...(found.reason === undefined ? {} : { reason: found.reason }),
  };
}

function elasticitiesOf(
  values: Float64Array,
  right: Float64Array,
  left: Float64Array,
  growthRate: number,
): Float64Array {
  const order = right.length;
  let product = 0;
  right.forEach((value, i) => (product += value * (left[i] ?? 0)));
  return values.map((value, k) => {
    const weight = ((left[Math.floor(k / order)] ?? 0) * (right[k % order] ?? 0)) / (product * growthRate);
    return value * weight;
  });
}
