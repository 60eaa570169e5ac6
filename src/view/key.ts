// Rows of small samples with their words, wrapped to the width of the figure.
import { textWidth } from './figure.ts';
import { mark, type Markup } from './markup.ts';
import { ink } from './palette.ts';

export interface KeyEntry {
  /** Draws the sample around (0, 0), its left end, within `width`. */
  readonly sample: Markup;
  readonly width: number;
  readonly words: string;
}

export interface Key {
  readonly markup: Markup;
  readonly height: number;
}

const rowHeight = 24;

export function key(entries: readonly KeyEntry[], left: number, top: number, width: number): Key {
  let [x, row] = [0, 0];
  const placed = entries.map((entry) => {
    const needed = entry.width + 8 + textWidth(entry.words, 13) + 22;
    if (x > 0 && x + needed - 22 > width) [x, row] = [0, row + 1];
    const at = mark`<g transform="translate(${left + x} ${top + (row + 0.5) * rowHeight})">${entry.sample}
<text x="${entry.width + 8}" y="4.5" fill="${ink}">${entry.words}</text></g>`;
    x += needed;
    return at;
  });
  return { markup: mark`<g>${placed}</g>`, height: entries.length === 0 ? 0 : (row + 1) * rowHeight };
}
