// The points of a sweep as columns: what a summary needs of them, which is not all that the table holds.
import { lowerOf, perhapsBestOf, upperOf } from '../measures.ts';
import type { Manifest } from '../manifest.ts';

export interface Swept {
  readonly manifest: Manifest;
  /** By factor, in the order of the points. */
  readonly values: readonly (Float64Array | readonly string[])[];
  /** By name of the column; NaN for what is missing. */
  readonly numbers: ReadonlyMap<string, Float64Array>;
  /** By column of a measure under a scenario: 1 where the difference to the first scenario is above 0 for sure, −1 below, else 0. */
  readonly told: ReadonlyMap<string, Int8Array>;
  /** By the same: 1 where it is the best scenario, or cannot be told from it. */
  readonly perhapsBest: ReadonlyMap<string, Int8Array>;
  /** How many points failed for each reason. */
  readonly failures: ReadonlyMap<string, number>;
}

/** The name of a measure's column under a scenario. */
export function columnOf(name: string, scenario: string | null): string {
  return scenario === null ? name : `${name} [${scenario}]`;
}

type Cells = Float64Array | undefined;

/** Fills the columns of a summary with the points of one part after the other. */
export class SweptColumns {
  readonly numbers: ReadonlyMap<string, Float64Array>;
  readonly told: ReadonlyMap<string, Int8Array>;
  readonly perhapsBest: ReadonlyMap<string, Int8Array>;

  constructor({ quantities, columns, points }: Manifest) {
    const there = new Set(columns.map(({ name }) => name));
    const measures = quantities.map(({ name, scenario }) => columnOf(name, scenario));
    const read = measures.flatMap((name) => [name, `${name} (first half)`, `${name} (second half)`]);
    const marks = (beside: (column: string) => string) =>
      new Map(measures.filter((name) => there.has(beside(name))).map((name) => [name, new Int8Array(points)] as const));
    this.numbers = new Map(
      read.filter((name) => there.has(name)).map((name) => [name, new Float64Array(points).fill(NaN)] as const),
    );
    this.told = marks(lowerOf);
    this.perhapsBest = marks(perhapsBestOf);
  }

  /** `cells` of a column of the part whose first point is `first`. */
  take(cells: (name: string) => Cells, first: number, count: number): void {
    for (const [name, into] of this.numbers) {
      const own = cells(name);
      if (own !== undefined) into.set(own, first);
    }
    for (const [name, into] of this.told) {
      const [lower, upper] = [cells(lowerOf(name)), cells(upperOf(name))];
      for (let i = 0; i < count; i++) into[first + i] = numberIn(lower, i) > 0 ? 1 : numberIn(upper, i) < 0 ? -1 : 0;
    }
    for (const [name, into] of this.perhapsBest) {
      const own = cells(perhapsBestOf(name));
      for (let i = 0; i < count; i++) into[first + i] = numberIn(own, i) === 1 ? 1 : 0;
    }
  }
}

function numberIn(cells: Cells, i: number): number {
  return cells?.[i] ?? NaN;
}
