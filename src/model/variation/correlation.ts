// Correlations as a number or as a table; an impossible table goes to the nearest possible one, and says so.
import { cholesky } from '../../numeric/cholesky.ts';
import { nearestCorrelation } from '../../numeric/nearest-correlation.ts';
import type { DenseMatrix } from '../../numeric/sparse.ts';
import type { SpecPath } from '../../spec/document.ts';
import type { Finding } from '../../spec/finding.ts';
import type { Correlation } from '../chance.ts';
import { fail, tellUnknown, type Context } from '../context.ts';

/** A change of one correlation by more than this is more than a repair of rounding or of a rough table. */
const largestRepair = 0.15;

export interface CorrelationRequest {
  readonly path: SpecPath;
  /** What the names are: `patch`, or `number that varies`. */
  readonly what: string;
  readonly names: readonly string[];
}

export function evenCorrelation(
  context: Context,
  value: number,
  { path, what, names }: CorrelationRequest,
): Correlation {
  const n = names.length;
  const least = n < 2 ? -1 : -1 / (n - 1);
  if (value < least - 1e-12) {
    fail(context, 'impossible-correlation', path, {
      message: `${n} of them cannot all have a correlation of ${value} with one another`,
      details: {
        found: String(value),
        expected: `at least ${Number(least.toFixed(6))}`,
        reason: `One for each ${what}.`,
      },
    });
  }
  if (value >= 0) return { of: value, repaired: 0 };
  return { of: matrixOf(n, () => value), repaired: 0 };
}

export type Pairs = Readonly<Record<string, Readonly<Record<string, number>>>>;

export function correlationTable(context: Context, pairs: Pairs, request: CorrelationRequest): Correlation {
  const { names, path, what } = request;
  const given = new Map<string, number>();
  for (const [left, row] of Object.entries(pairs)) {
    const a = nameIndex(context, left, request, [...path, left]);
    for (const [right, value] of Object.entries(row)) {
      const at = [...path, left, right];
      const b = nameIndex(context, right, request, at);
      if (a < 0 || b < 0) continue;
      const key = `${Math.min(a, b)} ${Math.max(a, b)}`;
      const before = given.get(key) ?? value;
      if (before !== value || (a === b && value !== 1)) {
        fail(context, 'impossible-correlation', at, {
          message: a === b ? `A ${what} has a correlation of 1 with itself` : `This pair has two correlations`,
          details: { found: `${before} and ${value}`, expected: 'one number for each pair' },
        });
      }
      given.set(key, value);
    }
  }
  const matrix = matrixOf(names.length, (a, b) => given.get(`${Math.min(a, b)} ${Math.max(a, b)}`) ?? 0);
  const { correlation, finding } = possibleCorrelation(matrix, request);
  if (finding !== null) context.findings.push(finding);
  return correlation;
}

function nameIndex(context: Context, name: string, { names, what }: CorrelationRequest, path: SpecPath): number {
  const index = names.indexOf(name);
  if (index < 0) tellUnknown(context, { code: 'unknown-varied', what, name, known: names, path, part: 'key' });
  return index;
}

/** Symmetric, with 1 in the diagonal. */
export function matrixOf(n: number, entry: (a: number, b: number) => number): DenseMatrix {
  const values = new Float64Array(n * n);
  for (let a = 0; a < n; a++) {
    for (let b = 0; b < n; b++) values[a * n + b] = a === b ? 1 : entry(Math.min(a, b), Math.max(a, b));
  }
  return { rows: n, columns: n, values };
}

export interface Possible {
  readonly correlation: { readonly of: DenseMatrix; readonly repaired: number };
  /** A warning of a repair, or an error where it would be large. */
  readonly finding: Finding | null;
}

/** As it is, or moved to the nearest correlation matrix (Higham 2002) with a warning; a large move is refused. */
export function possibleCorrelation(matrix: DenseMatrix, request: CorrelationRequest): Possible {
  if (cholesky(matrix) !== null) return { correlation: { of: matrix, repaired: 0 }, finding: null };
  const nearest = nearestCorrelation(matrix);
  const changes = nearest.matrix.values.map((value, i) => Math.abs(value - (matrix.values[i] ?? 0)));
  const worst = changes.reduce((best, change, i) => (change > (changes[best] ?? 0) ? i : best), 0);
  return {
    correlation: { of: nearest.matrix, repaired: nearest.distance },
    finding: repairFinding(request, {
      worst,
      before: matrix.values[worst] ?? 0,
      after: nearest.matrix.values[worst] ?? 0,
      distance: nearest.distance,
    }),
  };
}

interface Repair {
  readonly worst: number;
  readonly before: number;
  readonly after: number;
  readonly distance: number;
}

function repairFinding({ path, what, names }: CorrelationRequest, { worst, before, after, distance }: Repair): Finding {
  const n = names.length;
  const pair = `${names[Math.floor(worst / n)] ?? ''} and ${names[worst % n] ?? ''}`;
  const moved = `from ${Number(before.toFixed(4))} to ${Number(after.toFixed(4))}`;
  const refused = Math.abs(after - before) > largestRepair;
  const reason = `Higham (2002); the root of the sum of squared changes is ${distance.toFixed(4)}. One for each ${what}.`;
  return {
    severity: refused ? 'error' : 'warning',
    code: refused ? 'impossible-correlation' : 'repaired-correlation',
    message: refused
      ? `Nothing can be correlated like this: the nearest possible table would change ${pair} ${moved}`
      : `Nothing can be correlated quite like this, so the nearest possible table is used; it changes ${pair} most, ${moved}`,
    path,
    part: 'key',
    details: { reason, ...(refused ? { fix: 'Look for the pairs that contradict each other.' } : {}) },
  };
}
