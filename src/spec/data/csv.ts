// CSV (RFC 4180) as cells that know their places. Where the first line has no comma, semicolons or tabs part the cells.
import type { Span } from '../expression/ast.ts';
import { plainValue } from '../text/scalar.ts';
import type { SourceScalar, SourceText } from '../text/source.ts';

export type Row = readonly SourceScalar[];

export type ReadCsv =
  | { readonly ok: true; readonly header: Row; readonly rows: readonly Row[] }
  | { readonly ok: false; readonly message: string; readonly span: Span };

/** Lines without a cell that holds anything are left out. */
export function readCsv(source: SourceText): ReadCsv {
  const separator = separatorOf(source.text);
  const rows: SourceScalar[][] = [];
  let row: SourceScalar[] = [];
  let at = 0;
  while (at <= source.text.length) {
    const cell = readCell(source.text, at, separator);
    if (!cell.ok) return { ok: false, message: cell.message, span: { offset: cell.offset, length: 1 } };
    row.push(cell.scalar);
    at = cell.next;
    if (cell.last) {
      if (row.some((one) => one.source !== '')) rows.push(row);
      row = [];
    }
  }
  const [header, ...others] = rows;
  if (header === undefined) return { ok: false, message: 'The file holds no table', span: { offset: 0, length: 1 } };
  return { ok: true, header, rows: others };
}

function separatorOf(text: string): string {
  const end = text.search(/[\r\n]/u);
  const first = end < 0 ? text : text.slice(0, end);
  if (first.includes(',')) return ',';
  return first.includes(';') ? ';' : first.includes('\t') ? '\t' : ',';
}

type Cell =
  | { readonly ok: true; readonly scalar: SourceScalar; readonly next: number; readonly last: boolean }
  | { readonly ok: false; readonly message: string; readonly offset: number };

function readCell(text: string, from: number, separator: string): Cell {
  let start = from;
  while (text.charAt(start) === ' ') start++;
  return text.charAt(start) === '"' ? quotedCell(text, start, separator) : plainCell(text, start, separator);
}

function plainCell(text: string, start: number, separator: string): Cell {
  let end = start;
  while (end < text.length && text.charAt(end) !== separator && !isBreak(text, end)) end++;
  const written = text.slice(start, end).trimEnd();
  const span = { offset: start, length: written.length };
  return ended(text, end, { kind: 'scalar', value: plainValue(written), source: written, plain: true, span });
}

/** Two quotes within quotes stand for one. */
function quotedCell(text: string, start: number, separator: string): Cell {
  let end = start + 1;
  for (;;) {
    end = text.indexOf('"', end);
    if (end < 0) return { ok: false, message: 'This quote is not closed', offset: start };
    if (text.charAt(end + 1) !== '"') break;
    end += 2;
  }
  const source = text.slice(start + 1, end).replaceAll('""', '"');
  const span = { offset: start, length: end + 1 - start };
  let after = end + 1;
  while (text.charAt(after) === ' ') after++;
  if (after < text.length && text.charAt(after) !== separator && !isBreak(text, after)) {
    return { ok: false, message: 'Something follows after the quotes of a cell', offset: after };
  }
  return ended(text, after, { kind: 'scalar', value: source, source, plain: false, span });
}

function isBreak(text: string, at: number): boolean {
  return text.charAt(at) === '\n' || text.charAt(at) === '\r';
}

function ended(text: string, end: number, scalar: SourceScalar): Cell {
  const last = end >= text.length || isBreak(text, end);
  const width = text.startsWith('\r\n', end) ? 2 : 1;
  return { ok: true, scalar, next: end + width, last };
}
