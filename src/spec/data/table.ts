// A named file as a table: rows of as many cells as the header, columns that are known.
import { nearestName } from '../../diagnostic/nearest.ts';
import { put, type Report } from '../shape/report.ts';
import type { SourceScalar } from '../text/source.ts';
import { readCsv, type Row } from './csv.ts';
import type { FileReader } from './reader.ts';

export interface Table {
  readonly header: Row;
  readonly rows: readonly Row[];
  /** Where mistakes in the file are put. */
  readonly report: Report;
}

export function readTable(name: SourceScalar, reader: FileReader): Table | undefined {
  const report = reader.open(name);
  if (report === undefined) return undefined;
  const read = readCsv(report.source);
  if (!read.ok) {
    put(
      report,
      { code: 'data-syntax', message: read.message, span: read.span },
      { expected: 'a table as CSV (RFC 4180)' },
    );
    return undefined;
  }
  const { header } = read;
  tellRepeatedColumns(header, report);
  const rows = read.rows.filter((row) => isWhole(row, header, report));
  return { header, rows, report };
}

function tellRepeatedColumns(header: Row, report: Report): void {
  header.forEach((cell, i) => {
    if (cell.source === '' && i > 0) {
      put(
        report,
        { code: 'csv-column', message: 'A column has no name', span: cell.span },
        { expected: 'a name in the first line' },
      );
    } else if (header.findIndex((one) => one.source === cell.source) !== i) {
      put(report, { code: 'csv-column', message: `The column \`${cell.source}\` stands twice`, span: cell.span });
    }
  });
}

function isWhole(row: Row, header: Row, report: Report): boolean {
  if (row.length === header.length || report.found.full) return row.length === header.length;
  const many = row.length > header.length;
  const cell = row[Math.min(row.length, header.length) - (many ? 0 : 1)] ?? row[0];
  if (cell === undefined) return false;
  put(
    report,
    { code: 'csv-row', message: `This row has too ${many ? 'many' : 'few'} cells`, span: cell.span },
    {
      found: String(row.length),
      expected: `${String(header.length)}, as the first line has`,
      ...(many ? { fix: 'Write a decimal point, not a comma, and put quotes around a cell that holds a comma.' } : {}),
    },
  );
  return false;
}

export interface Columns {
  readonly needed: readonly string[];
  /** May stand, too; undefined for any. */
  readonly others?: readonly string[];
}

/** The positions of the needed columns; undefined after telling which are missing. Unknown ones are told, too. */
export function columnsOf({ header, report }: Table, { needed, others }: Columns): readonly number[] | undefined {
  const known = [...needed, ...(others ?? [])];
  for (const cell of header) {
    if (others === undefined || known.includes(cell.source)) continue;
    const nearest = nearestName(cell.source, known);
    const expected = known.map((one) => `\`${one}\``).join(', ');
    put(
      report,
      { code: 'csv-column', message: `\`${cell.source}\` is no column of this table`, span: cell.span },
      { expected, nearest },
    );
  }
  const missing = needed.filter((name) => header.every((cell) => cell.source !== name));
  const [first] = header;
  for (const name of missing) {
    if (first === undefined) continue;
    put(
      report,
      { code: 'csv-column', message: `The column \`${name}\` is missing`, span: first.span },
      {
        found: header.map((cell) => cell.source).join(', '),
        nearest: nearestName(
          name,
          header.map((cell) => cell.source),
        ),
      },
    );
  }
  return missing.length > 0 ? undefined : needed.map((name) => header.findIndex((cell) => cell.source === name));
}
