// A published matrix with everything that the analysis says of one population.
import { entrySensitivities, vectorsOf } from '../../src/analysis/sensitivity.ts';
import { spectrum } from '../../src/analysis/spectrum.ts';
import { leading } from '../../src/numeric/leading.ts';
import { forEachEntry, sparseFromRows } from '../../src/numeric/sparse.ts';

export type Rows = readonly (readonly number[])[];

/** Births are what the first row holds, but for the stay of the first class; the rest are fates. */
export function split(rows: Rows) {
  const births = rows.map((row, i) => row.map((value) => (i === 0 ? value : 0)));
  const fates = rows.map((row, i) => row.map((value) => (i === 0 ? 0 : value)));
  return { fates: sparseFromRows(fates), births: sparseFromRows(births) };
}

export function analysed(rows: Rows) {
  const matrix = sparseFromRows(rows);
  const found = leading(matrix);
  const vectors = vectorsOf(found)!;
  const { sensitivity, elasticity } = entrySensitivities(matrix, vectors);
  const at = (values: Float64Array, row: number, column: number): number => {
    let result = 0;
    forEachEntry(matrix, (i, j, _value, k) => {
      if (i === row - 1 && j === column - 1) result = values[k]!;
    });
    return result;
  };
  return {
    found,
    vectors,
    spectrum: spectrum(matrix, found)!,
    S: (row: number, column: number) => at(sensitivity, row, column),
    E: (row: number, column: number) => at(elasticity, row, column),
  };
}
