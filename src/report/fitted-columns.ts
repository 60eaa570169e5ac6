// Tables for readers at a terminal: nothing is cut and no line runs on. What is too wide is broken, first in its head, then in
// the names of its rows; columns that still do not fit stand below, under the names once more.
import { brokenTo, columnsUnder, room, wide, type TextStyle } from './terminal.ts';

type Cells = readonly string[];

/** Names of rows are not made narrower than this for the sake of further columns beside them. */
const narrowest = 24;

/** The first column to the left, the others to the right. */
export function fittedColumns(head: Cells, rows: readonly Cells[], style: TextStyle): string {
  const natural = head.map((_, c) => widest([head, ...rows], c));
  if (sumOf(natural) <= room(style)) return columnsUnder([head], rows, style);
  const least = head.map((name, c) => Math.max(widest(rows, c), ...name.split(' ').map(wide)));
  const widths = narrowed(natural, least, room(style));
  const longest = Math.max(...rows.flatMap(([name = '']) => name.split(' ').map(wide)));
  const wanted = Math.max(narrowest, longest, room(style) - sumOf(widths.slice(1)) - 2);
  const name = Math.min(natural[0] ?? 0, wanted, room(style) - Math.max(...widths.slice(1)) - 2);
  return groupsOf(widths.slice(1), room(style) - name)
    .map((columns) => {
      const pick = (cells: Cells): Cells => [cells[0] ?? '', ...columns.map((c) => cells[c + 1] ?? '')];
      const to = [name, ...columns.map((c) => widths[c + 1] ?? 0)];
      const below = rows.flatMap((row) => linesOf(pick(row), to, 'above'));
      return columnsUnder(linesOf(pick(head), to, 'below'), below, style);
    })
    .join('\n\n');
}

/** The head that gives most room is broken first, until all fits or every head but the first is broken. */
function narrowed(natural: readonly number[], least: readonly number[], within: number): readonly number[] {
  const widths = [...natural];
  const saved = (c: number): number => (natural[c] ?? 0) - (least[c] ?? 0);
  const order = [...natural.keys()].slice(1).sort((a, b) => saved(b) - saved(a));
  for (const c of order) if (sumOf(widths) > within) widths[c] = least[c] ?? 0;
  return widths;
}

/** Columns side by side, as many as there is room for; each takes two spaces more. */
function groupsOf(widths: readonly number[], within: number): readonly (readonly number[])[] {
  const groups: number[][] = [];
  let left = 0;
  widths.forEach((width, c) => {
    const last = groups.at(-1);
    if (last === undefined || width + 2 > left) {
      groups.push([c]);
      left = within;
    } else last.push(c);
    left -= width + 2;
  });
  return groups;
}

/** One row as several lines; shorter cells stand `above` or `below`. The second line of a name is set in. */
function linesOf(cells: Cells, widths: readonly number[], stand: 'above' | 'below'): readonly Cells[] {
  const broken = cells.map((cell, c) => linesOfCell(cell, widths[c] ?? 0, c === 0 ? '  ' : ''));
  const lines = Math.max(...broken.map(({ length }) => length));
  return Array.from({ length: lines }, (_, line) =>
    broken.map((cell) => cell[stand === 'above' ? line : line - lines + cell.length] ?? ''),
  );
}

function linesOfCell(text: string, width: number, indent: string): Cells {
  if (wide(text) <= width) return [text];
  return brokenTo(text, width - indent.length).map((line, i) => (i === 0 ? line : indent + line));
}

function widest(rows: readonly Cells[], c: number): number {
  return Math.max(0, ...rows.map((row) => wide(row[c] ?? '')));
}

function sumOf(widths: readonly number[]): number {
  return widths.reduce((sum, width) => sum + width + 2, -2);
}
