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
const lineHeight = 16;
const fontSize = 13;

export function key(entries: readonly KeyEntry[], left: number, top: number, width: number): Key {
  let [x, y, high] = [0, 0, entries.length === 0 ? 0 : rowHeight];
  const placed = entries.map((entry) => {
    const lines = linesOf(entry.words, width - entry.width - 8);
    const needed = entry.width + 8 + Math.max(...lines.map((line) => textWidth(line, fontSize)));
    if (x > 0 && x + needed > width) [x, y, high] = [0, y + high, rowHeight];
    const texts = lines.map(
      (line, i) => mark`<text x="${entry.width + 8}" y="${4.5 + i * lineHeight}" fill="${ink}">${line}</text>`,
    );
    const at = mark`<g transform="translate(${left + x} ${top + y + rowHeight / 2})">${entry.sample}
${texts}</g>`;
    high = Math.max(high, rowHeight + (lines.length - 1) * lineHeight);
    x += needed + 22;
    return at;
  });
  return { markup: mark`<g>${placed}</g>`, height: y + high };
}

/** Widths are estimates on the wide side; a line that barely passes is not broken. */
const slack = 0.95;

/** Broken between words where they find no room beside the sample. */
function linesOf(words: string, width: number): readonly string[] {
  const lines: string[] = [];
  for (const word of words.split(' ')) {
    const last = lines.at(-1);
    const longer = last === undefined ? word : `${last} ${word}`;
    if (last !== undefined && textWidth(longer, fontSize) * slack > width) lines.push(word);
    else lines.splice(-1, 1, longer);
  }
  return lines;
}
