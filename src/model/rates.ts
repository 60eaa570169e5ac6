// Rates by patch and class, for each stretch of steps in which they are constant.
import type { SpecPath } from '../spec/document.ts';
import { fail, type Context } from './context.ts';
import { byYears } from './epochs.ts';
import type { RateTable } from './model.ts';
import type { Where } from './numbers.ts';

/** Where one number of a table is written. */
export interface Written {
  readonly expression: number | string;
  readonly path: SpecPath;
  /** What to call it in an error, such as `survival of adult`. */
  readonly what: string;
}

export type Bounds = 'share' | 'from zero';

export interface TableRequest {
  /** Numbers in one patch. */
  readonly size: number;
  readonly bounds: Bounds;
  /** Null stands for 0. */
  written(patch: number, index: number): Written | null;
}

/** Evaluates a table for every patch, and for every year where an expression reads `year`. */
export function buildTable(context: Context, request: TableRequest): RateTable {
  const varies = tableVaries(context, request);
  const { epochs, epochOf } = byYears(context, varies, (year) => fillTable(context, request, year));
  return { epochs, epochOf, ...writtenOf(context, request) };
}

/** Kept where any number is an expression: parameters that vary are looked for there. */
function writtenOf(context: Context, { size, written }: TableRequest): Pick<RateTable, 'written'> {
  const all = context.patches.flatMap((_, p) =>
    Array.from({ length: size }, (_unused, i) => {
      const own = written(p, i);
      return typeof own?.expression === 'string' ? own : null;
    }),
  );
  return all.every((one) => one === null) ? {} : { written: all };
}

/** The scope of a patch in a year. */
export function whereIn(context: Context, patch: number, year: number): Where {
  const attributes = context.attributes[patch];
  const name = context.patches[patch]?.name;
  return {
    year,
    ...(attributes === undefined ? {} : { attributes }),
    ...(name === undefined ? {} : { patch: name }),
  };
}

/** Every number is asked, since a number that is never asked counts as read once and for all. */
function tableVaries(context: Context, request: TableRequest): boolean {
  let varies = false;
  for (let p = 0; p < context.patches.length; p++) {
    for (let i = 0; i < request.size; i++) {
      const written = request.written(p, i);
      if (written !== null && context.numbers.varies(written.expression, written.path)) varies = true;
    }
  }
  return varies;
}

function fillTable(context: Context, request: TableRequest, year: number): Float64Array {
  const table = new Float64Array(context.patches.length * request.size);
  for (let p = 0; p < context.patches.length; p++) {
    const where = whereIn(context, p, year);
    for (let i = 0; i < request.size; i++) {
      const written = request.written(p, i);
      if (written === null) continue;
      const value = context.numbers.value(written.expression, written.path, where);
      if (withinBounds(context, written, { value, bounds: request.bounds, patch: where.patch })) {
        table[p * request.size + i] = value;
      }
    }
  }
  return table;
}

interface Bounded {
  readonly value: number;
  readonly bounds: Bounds;
  readonly patch: string | undefined;
}

/** True where a number lies in its bounds; tells it once for each place in the text where it does not. */
export function withinBounds(context: Context, written: Written, { value, bounds, patch }: Bounded): boolean {
  if (Number.isNaN(value)) return false;
  if (value >= 0 && (bounds === 'from zero' || value <= 1)) return true;
  const key = JSON.stringify(written.path);
  if (context.toldBounds.has(key)) return false;
  context.toldBounds.add(key);
  const where = patch === undefined || context.patches.length === 1 ? '' : ` in ${patch}`;
  const percent = bounds === 'share' && value > 1 && value <= 100;
  fail(context, bounds === 'share' ? 'share-out-of-range' : 'negative-rate', written.path, {
    message: `The ${written.what}${where} is ${value}`,
    details: {
      expected: bounds === 'share' ? 'a share between 0 and 1' : 'a number from 0',
      ...(percent ? { fix: `If percent was meant, write ${value} % or ${value / 100}.` } : {}),
    },
  });
  return false;
}
