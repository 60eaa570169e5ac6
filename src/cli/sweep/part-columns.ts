// The columns of a part back from its file.
import type { FactorColumn } from '../../sweep/design/factor.ts';
import type { Manifest, PartPlace } from '../../sweep/manifest.ts';
import type { PartColumns } from '../../sweep/point/part.ts';

/** Errors: rejects where the bytes are no such file. */
export async function columnsOfPart(
  { columns, design }: Pick<Manifest, 'columns' | 'design'>,
  { first, count }: PartPlace,
  bytes: Uint8Array,
): Promise<PartColumns> {
  const read = new Map<string, unknown[]>();
  const { parquetRead } = await import('hyparquet');
  await parquetRead({
    file: new Uint8Array(bytes).buffer,
    onChunk: ({ columnName, columnData }) => {
      const before = read.get(columnName) ?? [];
      for (let i = 0; i < columnData.length; i++) before.push(columnData[i]);
      read.set(columnName, before);
    },
  });
  const cells = columns.map(({ name, type }): FactorColumn => {
    const own = read.get(name) ?? [];
    if (own.length !== count) throw new Error(`it has ${own.length} points instead of ${count}`);
    if (type === 'text') return own.map((cell) => (typeof cell === 'string' ? cell : ''));
    return Float64Array.from(own, (cell) => (typeof cell === 'number' ? cell : NaN));
  });
  const factors = design.factors.length;
  const numbers = cells.slice(1 + factors, -1).map((column) => Float64Array.from(column, Number));
  const reasons = Array.from(cells.at(-1) ?? [], String);
  const failures = new Map([...reasons.entries()].filter(([, reason]) => reason !== ''));
  return { first, count, values: cells.slice(1, 1 + factors), numbers, failures };
}
