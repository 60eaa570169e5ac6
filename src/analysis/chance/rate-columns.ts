// Where each rate that varies acts in the maps of the year: a column of one phase, at one place.
import { phaseMap } from '../../compile/phase-map.ts';
import { runYear, type Compiled } from '../../compile/year-map.ts';
import { principalPart } from '../../numeric/principal-part.ts';
import { sparseFromTriplets, type SparseMatrix } from '../../numeric/sparse.ts';
import { productOf } from '../../compile/year-map.ts';
import type { VariedRate } from './varied-rates.ts';

/** M + δ · column · e_placeᵀ is the map of the phase where the rate is 1 + δ of itself. */
export interface RateColumn {
  readonly rate: VariedRate;
  readonly phase: number;
  readonly place: number;
  readonly rows: Int32Array;
  readonly values: Float64Array;
}

/** The maps of the year at `state`, and the columns of the rates in them. */
export interface VariedYear {
  readonly maps: readonly SparseMatrix[];
  readonly columns: readonly RateColumn[];
}

export function variedYear(compiled: Compiled, state: Float64Array, rates: readonly VariedRate[]): VariedYear {
  const { model, landscape } = compiled;
  const { maps, multipliers, before } = runYear(compiled, state);
  const n = model.classes.length;
  const parts = new Map<string, SparseMatrix>();
  const partOf = ({ phase, part }: VariedRate): SparseMatrix => {
    const which = part === 'births' ? 'births' : 'fates';
    const key = `${phase} ${which}`;
    const request = { model, landscape, step: 1, multipliers, state: before[phase] ?? state, part: which } as const;
    const made = parts.get(key) ?? phaseMap(phase, request);
    parts.set(key, made);
    return made;
  };
  const columns = rates.map((rate): RateColumn => {
    const place = rate.patch * n + rate.class;
    const column = columnOf(partOf(rate), place);
    return { rate, phase: rate.phase, place, ...(rate.part === 'leaving' ? withoutStaying(column, place) : column) };
  });
  return { maps, columns };
}

interface Column {
  readonly rows: Int32Array;
  readonly values: Float64Array;
}

function columnOf({ columnStart, rowIndex, values }: SparseMatrix, place: number): Column {
  const [start, end] = [columnStart[place] ?? 0, columnStart[place + 1] ?? 0];
  return { rows: rowIndex.slice(start, end), values: values.slice(start, end) };
}

/** Those who leave do not stay: the column of a dispersal less that of staying. */
function withoutStaying({ rows, values }: Column, place: number): Column {
  const at = rows.indexOf(place);
  if (at < 0) return { rows: Int32Array.of(...rows, place), values: Float64Array.of(...values, -1) };
  return { rows, values: values.map((value, k) => (k === at ? value - 1 : value)) };
}

/** The maps with every rate at the mean of its years, which for rates made from several numbers is not the rate at their means. */
export function atMeanRates({ maps, columns }: VariedYear): readonly SparseMatrix[] {
  return maps.map((map, phase) => {
    const moved = columns.filter((one) => one.phase === phase && one.rate.meanShift !== 0);
    return moved.length === 0 ? map : plus(map, moved);
  });
}

function plus(map: SparseMatrix, moved: readonly RateColumn[]): SparseMatrix {
  const [rowIndex, columnIndex, values]: [number[], number[], number[]] = [[], [], []];
  for (let j = 0; j < map.columns; j++) {
    for (let k = map.columnStart[j] ?? 0; k < (map.columnStart[j + 1] ?? 0); k++) {
      rowIndex.push(map.rowIndex[k] ?? 0);
      columnIndex.push(j);
      values.push(map.values[k] ?? 0);
    }
  }
  for (const { rate, place, rows, values: column } of moved) {
    column.forEach((value, k) => {
      rowIndex.push(rows[k] ?? 0);
      columnIndex.push(place);
      values.push(rate.meanShift * value);
    });
  }
  return sparseFromTriplets({ rows: map.rows, columns: map.columns, rowIndex, columnIndex, values });
}

/** Over the states of the count. */
export function matrixOf(maps: readonly SparseMatrix[], places: readonly number[]): SparseMatrix {
  return principalPart(productOf(maps), places);
}
