// Metapopulation capacity: one number for how well a network of patches holds together, and what each patch adds to it.
import { leading } from '../numeric/leading.ts';
import { sparseFromDense } from '../numeric/sparse.ts';

export interface Network {
  readonly areasKm2: ArrayLike<number>;
  /** How much of the movement to a patch next door comes as far as from j to i: e^(−d/α), or another kernel over itself at 0. P×P at i * P + j. */
  readonly reach: ArrayLike<number>;
}

export interface MetapopulationCapacity {
  /** λ_M in km⁴: the network lasts where it exceeds extinction over colonisation. */
  readonly capacity: number;
  /** λ_M x_i² with |x| = 1: what each patch adds; they sum to the capacity. Null where the network falls apart. */
  readonly patchValues: Float64Array | null;
}

/** Leading eigenvalue of M with M_ij = reach_ij A_i A_j, M_ii = 0 (Hanski & Ovaskainen 2000). Symmetric. */
export function metapopulationCapacity({ areasKm2, reach }: Network): MetapopulationCapacity {
  const size = areasKm2.length;
  const values = new Float64Array(size * size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < size; j++) {
      if (i === j) continue;
      values[i * size + j] = (reach[i * size + j] ?? 0) * (areasKm2[i] ?? 0) * (areasKm2[j] ?? 0);
    }
  }
  const found = leading(sparseFromDense({ rows: size, columns: size, values }));
  const squares = found.right?.map((x) => x * x) ?? null;
  const length = squares?.reduce((sum, square) => sum + square, 0) ?? 1;
  return {
    capacity: found.growthRate,
    patchValues: squares?.map((square) => (found.growthRate * square) / length) ?? null,
  };
}
