// The block projection matrix near zero as a plan of multiplications over rates that move: which entries of each phase follow
// which rate along a line, and which products make up which entry of the year. Made once, and gone through at every point.
import { keptStates } from '../../compile/block.ts';
import type { Multipliers } from '../../compile/multipliers.ts';
import { phaseMap } from '../../compile/phase-map.ts';
import { runYear, type Compiled } from '../../compile/year-map.ts';
import type { AlikeMatrices } from '../../kernel/alike-program.ts';
import type { SparseMatrix } from '../../numeric/sparse.ts';
import { withRates, type MovingRates } from './moving-rates.ts';

export interface YearPlan extends AlikeMatrices {
  /** Writes the matrix of a row of the columns of the rates, row by row, into `out`, which is 0 before. */
  fill(rates: readonly Float64Array[], point: number, out: Float64Array): void;
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
  return planned({ phases, kept: keptStates(compiled), size, sources: moving.sources });
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
  readonly moving: AlikeMatrices['moving'][number][] = [];
  readonly sums: AlikeMatrices['sums'][number][] = [];

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
    const others = products.filter(([left, right]) => !this.isNothing(left) && !this.isNothing(right));
    if (others.length === 0) this.#fixed.add(target);
    else this.sums.push({ target, products: others });
    return target;
  }

  /** Whether it is 0 at every point. */
  isNothing(at: number): boolean {
    return this.start[at] === 0 && this.#fixed.has(at);
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

interface Planning {
  readonly phases: readonly PhaseEntries[];
  /** States of the matrix. */
  readonly kept: readonly number[];
  /** States in all. */
  readonly size: number;
  readonly sources: number;
}

function planned({ phases, kept, size, sources }: Planning): YearPlan {
  const tape = new Tape();
  const [first, ...others] = phases.map((phase): Cells => ({ ...phase, places: tape.put(phase) }));
  if (first === undefined) throw new RangeError('A year has at least one phase.');
  const year = others.reduce((before, phase) => multiplied(tape, phase, before, size), first);
  const at = new Map(kept.map((state, i) => [state, i]));
  const entries = Array.from(year.rows, (own, i) => {
    const [row = -1, column = -1] = [at.get(own), at.get(year.columns[i] ?? -1)];
    return { row, column, place: year.places[i] ?? 0 };
  }).filter(({ row, column, place }) => row >= 0 && column >= 0 && !tape.isNothing(place));
  const { moving, sums } = tape;
  const matrices = { order: kept.length, sources, start: Float64Array.from(tape.start), moving, sums, entries };
  return { ...matrices, fill: filling(matrices) };
}

/** As the kernel does it, for the few points that it does not solve. */
function filling({ order, start, moving, sums, entries }: AlikeMatrices): YearPlan['fill'] {
  const numbers = start.slice();
  return (rates, point, out) => {
    for (const { at, constant, slope, source } of moving)
      numbers[at] = constant + slope * (rates[source]?.[point] ?? 0);
    for (const { target, products } of sums) {
      let sum = 0;
      for (const [left, right] of products) sum += (numbers[left] ?? 0) * (numbers[right] ?? 0);
      numbers[target] = sum;
    }
    for (const { row, column, place } of entries) out[row * order + column] = numbers[place] ?? 0;
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
