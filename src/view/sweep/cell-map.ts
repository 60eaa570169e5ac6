// Cells over two numbers: shaded by a measure with a line where it goes through a level, or named by the scenario that is best.
import { figure, fitText } from '../figure.ts';
import { mark, type Markup } from '../markup.ts';
import { ink, inkOn, paper, ramp, softInk, umber } from '../palette.ts';

export interface CellMap {
  readonly title: string;
  readonly description: string;
  readonly x: { readonly name: string; readonly labels: readonly string[] };
  readonly y: { readonly name: string; readonly labels: readonly string[] };
  /** At y * columns + x; null where nothing is known. */
  readonly cells: readonly (Cell | null)[];
  /** What short words in the cells stand for, a line each. */
  readonly legend?: readonly string[];
}

export interface Cell {
  /** 0 to 1, light to dark. */
  readonly shade: number;
  readonly words: string;
  /** Stands in the cell where the words have no room. */
  readonly short?: string;
  /** Cells of different sides have a line between them. */
  readonly side: number;
}

const left = 84;
const top = 12;

export function drawCells({ title, description, x, y, cells, legend = [] }: CellMap): Markup {
  const [columns, rows] = [x.labels.length, y.labels.length];
  const wide = Math.max(26, Math.min(64, Math.floor(620 / columns)));
  const high = Math.max(22, Math.min(40, Math.floor(400 / rows)));
  const size = { width: left + columns * wide + 12, height: top + rows * high + 58 + legend.length * 17 };
  const at = (column: number, row: number) => ({ cx: left + column * wide, cy: top + (rows - 1 - row) * high });
  const drawn = cells.map((cell, i) => {
    const { cx, cy } = at(i % columns, Math.floor(i / columns));
    if (cell === null) return null;
    return mark`<g><title>${cell.words}</title><rect x="${cx}" y="${cy}" width="${wide}" height="${high}" fill="${ramp(cell.shade)}" stroke="${paper}"/>
<text x="${cx + wide / 2}" y="${cy + high / 2 + 4}" text-anchor="middle" font-size="11" fill="${inkOn(cell.shade)}">${fitText(cell.short ?? cell.words, 11, wide - 4)}</text></g>`;
  });
  const lines = cells.flatMap((cell, i) => {
    const [column, row] = [i % columns, Math.floor(i / columns)];
    const { cx, cy } = at(column, row);
    const right = column + 1 < columns ? cells[i + 1] : null;
    const above = cells[i + columns];
    const edge = (x1: number, y1: number, x2: number, y2: number) =>
      mark`<line x1="${x1}" y1="${y1}" x2="${x2}" y2="${y2}" stroke="${umber}" stroke-width="3.5" stroke-linecap="square"/>`;
    return [
      ...(cell && right && right.side !== cell.side ? [edge(cx + wide, cy, cx + wide, cy + high)] : []),
      ...(cell && above && above.side !== cell.side ? [edge(cx, cy, cx + wide, cy)] : []),
    ];
  });
  const foot = top + rows * high;
  const xs = x.labels.map(
    (label, c) =>
      mark`<text x="${left + (c + 0.5) * wide}" y="${foot + 17}" text-anchor="middle" font-size="11" fill="${softInk}">${fitText(label, 11, wide - 2)}</text>`,
  );
  const ys = y.labels.map(
    (label, r) =>
      mark`<text x="${left - 6}" y="${top + (rows - r - 0.5) * high + 4}" text-anchor="end" font-size="11" fill="${softInk}">${fitText(label, 11, left - 30)}</text>`,
  );
  const names = mark`<text x="${left + (columns * wide) / 2}" y="${foot + 40}" text-anchor="middle" fill="${ink}">${x.name}</text>
<text x="14" y="${top + (rows * high) / 2}" text-anchor="middle" fill="${ink}" transform="rotate(-90 14 ${top + (rows * high) / 2})">${y.name}</text>`;
  const told = legend.map(
    (line, i) =>
      mark`<text x="${left}" y="${foot + 64 + i * 17}" font-size="12" fill="${ink}">${fitText(line, 12, size.width - left - 4)}</text>`,
  );
  return figure(size, { title, description }, mark`${drawn}${lines}${xs}${ys}${names}${told}`);
}
