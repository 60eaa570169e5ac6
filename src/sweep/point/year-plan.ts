// The block projection matrix near zero as a plan of multiplications over rates that move: which entries of each phase follow
// which rate along a line, and which products make up which entry of the year. Made once, and gone through at every point.
import { keptStates } from '../../compile/block.ts';
import type { Multipliers } from '../../compile/multipliers.ts';
import { phaseMap } from '../../compile/phase-map.ts';
import { runYear, type Compiled } from '../../compile/year-map.ts';
import type { SparseMatrix } from '../../numeric/sparse.ts';
import { withRates, type MovingRates } from './moving-rates.ts';

export interface YearPlan {
  /** States of the matrix. */
  readonly order: number;
  /** Writes the matrix of the values of the rates, row by row, into `out`, which is 0 before. */
  fill(values: Float64Array, out: Float64Array): void;
}

/** Entry `at` of a phase is constant[at] + slope[at] · value[source[at]]; −1 for no source. */
interface PhaseEntries {
  readonly rows: Int32Array;
  readonly columns: Int32Array;
  readonly constant: Float64Array;
  readonly slope: Float64Array;
  readonly source: Int32Array;
}

/** Null where an entry does not follow one rate along a line. */
export function planYear(moving: MovingRates, compiled: Compiled): YearPlan | null {
  const size = compiled.model.patches.length * compiled.model.classes.length;
  const { multipliers } = runYear(compiled, new Float64Array(size));
  const phases: PhaseEntries[] = [];
  for (let phase = 0; phase < compiled.model.phases.length; phase++) {
    const entries = entriesOf(moving, compiled, { phase, multipliers });
    if (entries === null) return null;
    phases.push(entries);
  }
  return planned(phases, keptStates(compiled), size);
}

interface PhaseAt {
  readonly phase: number;
  readonly multipliers: Multipliers;
}

function entriesOf(moving: MovingRates, compiled: Compiled, { phase, multipliers }: PhaseAt): PhaseEntries | null {
  const { model, landscape } = compiled;
  const size = model.patches.length * model.classes.length;
  const mapWith = (rates: MovingRates['rates'], value: number): Map<number, number> => {
    const values = new Float64Array(1).fill(value);
    const own = rates.map((rate) => ({ ...rate, source: 0 }));
    const changed = withRates(model, own, values);
    return cellsOf(phaseMap(phase, { model: changed, landscape, step: 1, multipliers, state: null }), size);
  };
  const base = mapWith([], 0);
  const cells = new Map([...base].map(([cell, value]) => [cell, { constant: value, slope: 0, source: -1 }]));
  for (const rate of moving.rates.filter((one) => one.phase === phase)) {
    const [none, one, half] = [mapWith([rate], 0), mapWith([rate], 1), mapWith([rate], 0.5)];
    for (const cell of new Set([...none.keys(), ...one.keys()])) {
      const [constant, end] = [none.get(cell) ?? 0, one.get(cell) ?? 0];
      if (constant === end) continue;
      const slope = end - constant;
      if (Math.abs((half.get(cell) ?? 0) - (constant + slope / 2)) > 1e-15 * (1 + Math.abs(slope))) return null;
      if ((cells.get(cell)?.source ?? -1) >= 0) return null;
      cells.set(cell, { constant, slope, source: rate.source });
    }
  }
  const all = [...cells].sort(([a], [b]) => a - b);
  return {
    columns: Int32Array.from(all, ([cell]) => Math.floor(cell / size)),
    rows: Int32Array.from(all, ([cell]) => cell % size),
    constant: Float64Array.from(all, ([, one]) => one.constant),
    slope: Float64Array.from(all, ([, one]) => one.slope),
    source: Int32Array.from(all, ([, one]) => one.source),
  };
}

/** By column * size + row. */
function cellsOf({ columns, columnStart, rowIndex, values }: SparseMatrix, size: number): Map<number, number> {
  const cells = new Map<number, number>();
  for (let j = 0; j < columns; j++) {
    for (let k = columnStart[j] ?? 0; k < (columnStart[j + 1] ?? 0); k++)
      cells.set(j * size + (rowIndex[k] ?? 0), values[k] ?? 0);
  }
  return cells;
}

/** out[target[i]] += left[from[i]] · right[with[i]]. */
interface Products {
  readonly left: Int32Array;
  readonly right: Int32Array;
  readonly target: Int32Array;
  readonly count: number;
}

function planned(phases: readonly PhaseEntries[], kept: readonly number[], size: number): YearPlan {
  const [first, ...others] = phases;
  if (first === undefined) throw new RangeError('A year has at least one phase.');
  let pattern: Pattern = first;
  const steps = others.map((phase) => {
    const { products, result } = multiplied(phase, pattern, size);
    pattern = result;
    return products;
  });
  const place = new Map(kept.map((state, i) => [state, i]));
  const order = kept.length;
  const cells = Array.from(pattern.rows, (row, i) => {
    const [r, c] = [place.get(row), place.get(pattern.columns[i] ?? -1)];
    return r === undefined || c === undefined ? -1 : r * order + c;
  });
  const buffers = phases.map(({ rows }) => new Float64Array(rows.length));
  const results = steps.map(({ count }) => new Float64Array(count));
  return {
    order,
    fill: (values, out) => {
      phases.forEach((phase, p) => {
        fillPhase(phase, values, buffers[p]);
      });
      let right = buffers[0];
      steps.forEach((step, s) => {
        const into = results[s];
        multiplyBy(step, { left: buffers[s + 1], right, into });
        right = into;
      });
      for (let i = 0; i < cells.length; i++) {
        const cell = cells[i] ?? -1;
        if (cell >= 0) out[cell] = right?.[i] ?? 0;
      }
    },
  };
}

interface Pattern {
  readonly rows: Int32Array;
  readonly columns: Int32Array;
}

/** Left · right, both column by column. */
function multiplied(
  left: Pattern,
  right: Pattern,
  size: number,
): { readonly products: Products; readonly result: Pattern } {
  const byColumn = Array.from({ length: size }, (): number[] => []);
  left.columns.forEach((column, i) => byColumn[column]?.push(i));
  const targets = new Map<number, number>();
  const made: [number, number, number][] = [];
  right.rows.forEach((row, r) => {
    for (const l of byColumn[row] ?? []) {
      const cell = (right.columns[r] ?? 0) * size + (left.rows[l] ?? 0);
      const target = targets.get(cell) ?? targets.size;
      targets.set(cell, target);
      made.push([l, r, target]);
    }
  });
  const cells = [...targets.keys()];
  const pick = (k: 0 | 1 | 2): Int32Array => Int32Array.from(made, (one) => one[k]);
  return {
    products: { left: pick(0), right: pick(1), target: pick(2), count: cells.length },
    result: {
      rows: Int32Array.from(cells, (cell) => cell % size),
      columns: Int32Array.from(cells, (cell) => Math.floor(cell / size)),
    },
  };
}

function fillPhase(
  { constant, slope, source }: PhaseEntries,
  values: Float64Array,
  into: Float64Array | undefined,
): void {
  if (into === undefined) return;
  for (let i = 0; i < constant.length; i++) {
    const from = source[i] ?? -1;
    into[i] = (constant[i] ?? 0) + (from < 0 ? 0 : (slope[i] ?? 0) * (values[from] ?? 0));
  }
}

interface Factors {
  readonly left: Float64Array | undefined;
  readonly right: Float64Array | undefined;
  readonly into: Float64Array | undefined;
}

function multiplyBy({ left, right, target }: Products, factors: Factors): void {
  const [a, b, out] = [factors.left, factors.right, factors.into];
  if (a === undefined || b === undefined || out === undefined) return;
  out.fill(0);
  for (let i = 0; i < target.length; i++) {
    const at = target[i] ?? 0;
    out[at] = (out[at] ?? 0) + (a[left[i] ?? 0] ?? 0) * (b[right[i] ?? 0] ?? 0);
  }
}
