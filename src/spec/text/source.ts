// A file as text, and the tree of its values with the place of each.
import type { Place } from '../../diagnostic/diagnostic.ts';
import type { Span } from '../expression/ast.ts';

export interface SourceText {
  readonly file: string;
  readonly text: string;
  /** Offset of the first character of each line. */
  readonly lineStarts: readonly number[];
}

export type Plain = string | number | boolean | null;

/** What a data file holds has a text of its own; all below it is from there, too. */
interface FromFile {
  readonly file?: SourceText;
}

export interface SourceScalar extends FromFile {
  readonly kind: 'scalar';
  readonly value: Plain;
  /** Exactly as written, without quotes. */
  readonly source: string;
  /** Written without quotes, on one line. */
  readonly plain: boolean;
  readonly span: Span;
}
export interface SourceList extends FromFile {
  readonly kind: 'list';
  readonly items: readonly SourceNode[];
  readonly span: Span;
}
export interface SourceEntry extends FromFile {
  readonly key: string;
  readonly keySpan: Span;
  /** Written without quotes. */
  readonly plain: boolean;
  readonly value: SourceNode;
}
export interface SourceMap extends FromFile {
  readonly kind: 'map';
  readonly entries: readonly SourceEntry[];
  readonly span: Span;
}
/** Something that was refused already: whatever stands here is not judged again. */
export interface SourceHole extends FromFile {
  readonly kind: 'hole';
  readonly span: Span;
}
export type SourceNode = SourceScalar | SourceList | SourceMap | SourceHole;

export function sourceText(file: string, text: string): SourceText {
  const lineStarts = [0];
  for (let at = text.indexOf('\n'); at >= 0; at = text.indexOf('\n', at + 1)) lineStarts.push(at + 1);
  return { file, text, lineStarts };
}

/** The place of a stretch of text; it ends with its first line, and is at least one character long. */
export function placeAt(source: SourceText, span: Span): Place {
  const offset = Math.min(Math.max(0, span.offset), source.text.length);
  const line = lineOf(source.lineStarts, offset);
  const start = source.lineStarts[line] ?? 0;
  const end = (source.lineStarts[line + 1] ?? source.text.length + 1) - 1;
  const text = source.text.slice(start, source.text.charAt(end - 1) === '\r' ? end - 1 : end);
  const length = Math.max(1, Math.min(span.length, start + text.length - offset));
  return { file: source.file, line: line + 1, column: offset - start + 1, length, text };
}

/** The line of an offset, from 0. */
export function lineAt(source: SourceText, offset: number): number {
  return lineOf(source.lineStarts, offset);
}

/** Index of the last line that starts at or before the offset, by bisection. */
function lineOf(lineStarts: readonly number[], offset: number): number {
  let low = 0;
  let high = lineStarts.length - 1;
  while (low < high) {
    const middle = Math.ceil((low + high) / 2);
    if ((lineStarts[middle] ?? 0) <= offset) low = middle;
    else high = middle - 1;
  }
  return low;
}

/** The place of a stretch inside the text of a scalar; the whole scalar where quotes or escapes come between. */
export function spanWithin(scalar: SourceScalar, inner: Span, source: SourceText): Span {
  const written = source.text.slice(scalar.span.offset, scalar.span.offset + scalar.span.length);
  const lead = written === scalar.source ? 0 : written.slice(1, -1) === scalar.source ? 1 : undefined;
  if (lead === undefined) return scalar.span;
  return { offset: scalar.span.offset + lead + inner.offset, length: Math.max(1, inner.length) };
}
