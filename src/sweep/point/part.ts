// What the points of one part came to, column by column.
import type { Design } from '../design/design.ts';
import type { Columns } from '../design/factor.ts';
import type { PartPlace } from '../manifest.ts';
import type { Evaluator } from './evaluate.ts';

export interface PartColumns extends PartPlace {
  /** By factor. */
  readonly values: Columns;
  /** By number that is asked for; NaN for what is missing. */
  readonly numbers: readonly Float64Array<ArrayBuffer>[];
  /** Why no model can have the values of a point, by its place in the part. */
  readonly failures: ReadonlyMap<number, string>;
}

export interface PartRequest {
  readonly design: Design;
  readonly evaluator: Evaluator;
}

export function workPart({ design, evaluator }: PartRequest, { first, count }: PartPlace): PartColumns {
  const values = design.columns(first, count);
  const { numbers, failures } = evaluator.all(values, count);
  return { first, count, values, numbers: numbers.map(finiteOnly), failures };
}

function finiteOnly(column: Float64Array<ArrayBuffer>): Float64Array<ArrayBuffer> {
  for (let i = 0; i < column.length; i++) if (!Number.isFinite(column[i])) column[i] = NaN;
  return column;
}
