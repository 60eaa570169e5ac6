// Metapopulation capacity: one number for how well a network of patches holds together, and what each patch adds to it.
import { exp } from '../machine/pinned.ts';
import { leading } from '../numeric/leading.ts';
import { sparseFromDense } from '../numeric/sparse.ts';

export interface Network {
  readonly areasKm2: ArrayLike<number>;
  /** Kilometres, P×P. */
  readonly distanceKm: ArrayLike<number>;
  /** Mean of the exponential that movement falls off with along a line. */
  readonly meanDistanceKm: number;
}

export interface MetapopulationCapacity {
  /** λ_M in km⁴: the network lasts where it exceeds extinction over colonisation. */
  readonly capacity: number;
  /** λ_M x_i² with |x| = 1: what each patch adds; they sum to the capacity. Null where the network falls apart. */
  readonly patchValues: Float64Array | null;
}

/** Leading eigenvalue of M with M_ij = e^(−d_ij/mean) A_i A_j, M_ii = 0 (Hanski & Ovaskainen 2000). Symmetric. */
export function metapopulationCapacity({ areasKm2, distanceKm, meanDistanceKm }: Network): MetapopulationCapacity {
  const size = areasKm2.length;
  const values = new Float64Array(size * size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < size; j++) {
      if (i === j) continue;
      const reach = exp(-(distanceKm[i * size + j] ?? 0) / meanDistanceKm);
      values[i * size + j] = reach * (areasKm2[i] ?? 0) * (areasKm2[j] ?? 0);
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
