// The block projection matrix where births depend on who meets whom: that of small changes around the settled make-up of few.
import { principalPart } from '../../numeric/principal-part.ts';
import { multiply, weightedSum } from '../../numeric/sparse-product.ts';
import { sparseFromTriplets, type SparseMatrix } from '../../numeric/sparse.ts';
import type { BlockMatrix } from '../block-matrix.ts';
import { buildBlock } from '../block.ts';
import { dependsOnMakeUp } from '../make-up.ts';
import { multipliersAtRest } from '../multipliers.ts';
import { nearZero, productOf, type Compiled } from '../year-map.ts';
import { birthFactorSlope } from './birth-factors.ts';

/**
 * With almost nobody there the year f is homogeneous, so its Jacobian J at the make-up w has J w = f(w) = λ w: growth and stable
 * distribution are those of A(w), and the left vector of J is what one more animal of either sex is worth, which that of A(w) is not.
 * Null where births do not depend on the make-up, and where one more animal can lower the next count.
 */
export function linearisedBlock(compiled: Compiled): BlockMatrix | null {
  if (!dependsOnMakeUp(compiled.model)) return null;
  const block = buildBlock(compiled, 'zero');
  let state = nearZero(compiled);
  const phaseMaps = block.phaseMaps.map(({ phase, map }, index) => {
    const whole = weightedSum([1, map], [1, meetingSlope(compiled, index, state)]);
    state = multiply(map, state);
    return { phase, map: whole };
  });
  if (phaseMaps.some(({ map }) => map.values.some((value) => value < 0))) return null;
  const n = compiled.model.classes.length;
  const places = block.states.map((one) => one.patch * n + one.class);
  return { ...block, matrix: principalPart(productOf(phaseMaps.map(({ map }) => map)), places), phaseMaps };
}

/** What the births of all are changed by, through the mating function, for each more animal of a class. */
function meetingSlope({ model }: Compiled, index: number, state: Float64Array): SparseMatrix {
  const phase = model.phases[index];
  const n = model.classes.length;
  const [rowIndex, columnIndex, values]: [number[], number[], number[]] = [[], [], []];
  for (let column = 0; phase?.kind === 'breeding' && column < state.length; column++) {
    const patch = Math.floor(column / n);
    const animals = state.subarray(patch * n, patch * n + n);
    const animalSlopes = new Float64Array(n);
    animalSlopes[column % n] = 1;
    const request = { model, phase: index, patch, step: 1, multipliers: multipliersAtRest(model), animals };
    const slope = birthFactorSlope({ phase, request, animalSlopes, slopes: [] });
    for (let to = 0; to < n; to++) {
      let young = 0;
      for (let from = 0; from < n; from++) young += (slope[to * n + from] ?? 0) * (animals[from] ?? 0);
      rowIndex.push(patch * n + to);
      columnIndex.push(column);
      values.push(young);
    }
  }
  return sparseFromTriplets({ rows: state.length, columns: state.length, rowIndex, columnIndex, values });
}
