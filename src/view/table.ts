// A table of numbers that scrolls in its own frame where it is wider than the page, for the keyboard too.
import { mark, type Content, type Markup } from './markup.ts';

export interface Table {
  readonly caption: string;
  /** The first column names the row. */
  readonly head: readonly string[];
  readonly rows: readonly Row[];
  /** Columns that hold words, counted from 1 for the first after the name. */
  readonly words?: readonly number[];
}

export type Row = readonly [name: string, ...cells: Content[]];

export function drawTable({ caption, head, rows, words = [] }: Table): Markup {
  const heads = head.map((name, i) =>
    words.includes(i)
      ? mark`<th scope="col" class="words"><bdi>${name}</bdi></th>`
      : mark`<th scope="col"><bdi>${name}</bdi></th>`,
  );
  const body = rows.map(([name, ...cells]) => {
    const drawn = cells.map((cell, i) =>
      words.includes(i + 1) ? mark`<td class="words">${cell}</td>` : mark`<td>${cell}</td>`,
    );
    return mark`<tr><th scope="row"><bdi>${name}</bdi></th>${drawn}</tr>`;
  });
  const table = mark`<table><caption>${caption}</caption><thead><tr>${heads}</tr></thead><tbody>${body}</tbody></table>`;
  return scrolling(caption, table, rows.length > mostRows);
}

/** Longer tables are laid out only where they come near the window. */
const mostRows = 100;

export function scrolling(label: string, content: Content, long = false): Markup {
  const kind = long ? 'scroll long' : 'scroll';
  return mark`<div class="${kind}" tabindex="0" role="region" aria-label="${label}">${content}</div>`;
}
