// How the animals after a year move with each animal before it: exact, one direction after the other.
import type { DenseMatrix, SparseMatrix } from '../../numeric/sparse.ts';
import type { Compiled } from '../year-map.ts';
import { walkYear } from './year-slope.ts';

/**
 * ∂after/∂before over the places named (indices p * C + c), entry (i, j) at i * size + j. Where births depend on the sexes, the year
 * is homogeneous: then J n = A(n) n, and the left vector of J tells what an animal of either sex is worth.
 * Cost: a year for each place.
 */
export function yearJacobian(compiled: Compiled, animals: Float64Array, places: readonly number[]): DenseMatrix {
  const { model } = compiled;
  const none = new Float64Array(model.patches.length);
  const request = {
    compiled,
    slopes: {
      phases: model.phases.map(() => null),
      crowding: model.crowding.map(() => ({ capacity: none, alleeHalf: none, shapeNumber: 0 })),
      missed: [],
    },
    coefficientSlopes: model.crowding.map(() => none),
  };
  const size = places.length;
  const values = new Float64Array(size * size);
  let maps: readonly SparseMatrix[] | undefined;
  places.forEach((place, j) => {
    const slopes = new Float64Array(animals.length);
    slopes[place] = 1;
    const walked: SparseMatrix[] = [];
    const known = maps === undefined ? request : { ...request, maps };
    const after = walkYear(known, { animals, slopes }, (map) => walked.push(map)).slopes;
    maps ??= walked;
    places.forEach((to, i) => (values[i * size + j] = after[to] ?? 0));
  });
  return { rows: size, columns: size, values };
}
