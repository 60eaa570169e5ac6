// One part of a sweep as the bytes of a Parquet file: the same part has the same bytes wherever it is made.
import { parquetWriteBuffer } from 'hyparquet-writer';
import type { Design } from '../../sweep/design/design.ts';
import type { Value } from '../../sweep/design/factor.ts';
import type { Manifest, PartPlace, SweepColumn } from '../../sweep/manifest.ts';
import type { Evaluator, PointResult } from '../../sweep/point/evaluate.ts';

const types = { integer: 'INT32', number: 'DOUBLE', text: 'STRING' } as const;

export interface PartRequest {
  readonly design: Design;
  readonly evaluator: Evaluator;
  readonly manifest: Pick<Manifest, 'columns' | 'hash'>;
}

export function makePart({ design, evaluator, manifest }: PartRequest, { first, count }: PartPlace): Uint8Array {
  const points = Array.from({ length: count }, (_, i) => design.at(first + i));
  const results = evaluator.all(points);
  const factors = design.plan.factors.length;
  const columnData = manifest.columns.map((column, c) => ({
    name: column.name,
    type: types[column.type],
    nullable: true,
    data: dataOf(column, cellsOf({ first, factors, column: c, points, results })),
  }));
  const kvMetadata = [
    { key: 'skein-sweep', value: manifest.hash },
    { key: 'skein-dictionary', value: JSON.stringify(manifest.columns) },
  ];
  return new Uint8Array(parquetWriteBuffer({ columnData, kvMetadata, createdBy: 'skein' }));
}

interface Cells {
  readonly first: number;
  readonly factors: number;
  readonly column: number;
  readonly points: readonly (readonly Value[])[];
  readonly results: readonly PointResult[];
}

/** Point, factors, numbers, failure. */
function cellsOf({ first, factors, column, points, results }: Cells): readonly (Value | null)[] {
  if (column === 0) return points.map((_, i) => first + i);
  if (column <= factors) return points.map((values) => values[column - 1] ?? null);
  const k = column - 1 - factors;
  const numbers = results[0]?.numbers.length ?? 0;
  if (k === numbers) return results.map(({ failure }) => (failure === '' ? null : failure));
  return results.map((result) => result.numbers[k] ?? null);
}

function dataOf({ type }: SweepColumn, cells: readonly (Value | null)[]): (Value | null)[] {
  if (type === 'text') return cells.map((cell) => (cell === null ? null : String(cell)));
  return cells.map((cell) => (typeof cell === 'number' && Number.isFinite(cell) ? cell : null));
}
