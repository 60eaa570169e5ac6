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

/**
 * Numbers stand on one tape: first the entries of all phases, then what is multiplied from them. A product is written to its place,
 * or added to what is there already; one with an entry that is always 1 needs no place of its own.
 */
class Tape {
  readonly start: number[] = [];
  readonly moving: {
    readonly at: number;
    readonly constant: number;
    readonly slope: number;
    readonly source: number;
  }[] = [];
  readonly left: number[] = [];
  readonly right: number[] = [];
  readonly target: number[] = [];
  readonly adds: number[] = [];

  /** Places of the entries of a phase. */
  put({ constant, slope, source }: PhaseEntries): Int32Array {
    return Int32Array.from(constant, (value, i) => {
      const at = this.start.push(value) - 1;
      const own = { at, constant: value, slope: slope[i] ?? 0, source: source[i] ?? -1 };
      if (own.source >= 0) this.moving.push(own);
      else this.#fixed.add(at);
      return at;
    });
  }

  readonly #fixed = new Set<number>();

  /** Place of the sum of products of two places each. */
  sum(products: readonly (readonly [left: number, right: number])[]): number {
    const [only] = products;
    if (products.length === 1 && only !== undefined) {
      const [left, right] = only;
      if (this.#isOne(left)) return right;
      if (this.#isOne(right)) return left;
    }
    const target = this.start.push(0) - 1;
    products.forEach(([left, right], i) => {
      this.left.push(left);
      this.right.push(right);
      this.target.push(target);
      this.adds.push(i === 0 ? 0 : 1);
    });
    return target;
  }

  #isOne(at: number): boolean {
    return this.start[at] === 1 && this.#fixed.has(at);
  }
}

interface Cells {
  readonly rows: Int32Array;
  readonly columns: Int32Array;
  /** Where each stands on the tape. */
  readonly places: Int32Array;
}

function planned(phases: readonly PhaseEntries[], kept: readonly number[], size: number): YearPlan {
  const tape = new Tape();
  const [first, ...others] = phases.map((phase): Cells => ({ ...phase, places: tape.put(phase) }));
  if (first === undefined) throw new RangeError('A year has at least one phase.');
  const year = others.reduce((before, phase) => multiplied(tape, phase, before, size), first);
  const place = new Map(kept.map((state, i) => [state, i]));
  const order = kept.length;
  const written = Array.from(year.rows, (row, i) => {
    const [r, c] = [place.get(row), place.get(year.columns[i] ?? -1)];
    return { from: year.places[i] ?? 0, cell: r === undefined || c === undefined ? -1 : r * order + c };
  }).filter(({ cell }) => cell >= 0);
  return { order, fill: filling(tape, written) };
}

function filling(tape: Tape, written: readonly { readonly from: number; readonly cell: number }[]): YearPlan['fill'] {
  const { moving } = tape;
  const numbers = Float64Array.from(tape.start);
  const [left, right, target] = [Int32Array.from(tape.left), Int32Array.from(tape.right), Int32Array.from(tape.target)];
  const adds = Int32Array.from(tape.adds);
  const [from, cell] = [Int32Array.from(written, (one) => one.from), Int32Array.from(written, (one) => one.cell)];
  return (values, out) => {
    for (const { at, constant, slope, source } of moving) numbers[at] = constant + slope * (values[source] ?? 0);
    for (let i = 0; i < target.length; i++) {
      const product = (numbers[left[i] ?? 0] ?? 0) * (numbers[right[i] ?? 0] ?? 0);
      const at = target[i] ?? 0;
      numbers[at] = adds[i] === 1 ? (numbers[at] ?? 0) + product : product;
    }
    for (let i = 0; i < cell.length; i++) out[cell[i] ?? 0] = numbers[from[i] ?? 0] ?? 0;
  };
}

/** Left · right, both column by column. */
function multiplied(tape: Tape, left: Cells, right: Cells, size: number): Cells {
  const byColumn = Array.from({ length: size }, (): number[] => []);
  left.columns.forEach((column, i) => byColumn[column]?.push(i));
  const sums = new Map<number, (readonly [number, number])[]>();
  right.rows.forEach((row, r) => {
    for (const l of byColumn[row] ?? []) {
      const cell = (right.columns[r] ?? 0) * size + (left.rows[l] ?? 0);
      const products = sums.get(cell) ?? [];
      products.push([left.places[l] ?? 0, right.places[r] ?? 0]);
      sums.set(cell, products);
    }
  });
  const cells = [...sums];
  return {
    rows: Int32Array.from(cells, ([cell]) => cell % size),
    columns: Int32Array.from(cells, ([cell]) => Math.floor(cell / size)),
    places: Int32Array.from(cells, ([, products]) => tape.sum(products)),
  };
}
