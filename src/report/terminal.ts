// Text for a terminal of any width: wrapped, in columns, plain where there is no colour. Names cannot send control codes.

export interface TextStyle {
  readonly colour: boolean;
  /** Characters in a line. */
  readonly width: number;
}

/** Latin letters and the signs of print, each as wide as another: most text, and tables of all scripts take a while to load. */
const plain = /^[ -~\u00a0-\u00ac\u00ae-\u02ff\u2010-\u2027]*$/;

/** Control and formatting characters become visible marks, so that a name can neither hide nor repaint anything. */
export function printable(text: string): string {
  if (plain.test(text)) return text;
  return text.replace(/[\p{Cc}\p{Cf}\p{Cs}\u2028\u2029]/gu, '\uFFFD');
}

export function bold(text: string, { colour }: TextStyle): string {
  return colour ? `\u001b[1m${text}\u001b[22m` : text;
}

export function dim(text: string, { colour }: TextStyle): string {
  return colour ? `\u001b[2m${text}\u001b[22m` : text;
}

/** Breaks at spaces; a word longer than the line stands alone. */
export function wrap(text: string, style: TextStyle, indent = ''): string {
  return brokenTo(printable(text), room(style) - wide(indent))
    .map((line) => indent + line)
    .join('\n');
}

/** Lines no wider than this, where no single word is; a number and its % are one word. */
export function brokenTo(text: string, width: number): readonly string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(/ (?!%)/u)) {
    if (line !== '' && wide(line) + 1 + wide(word) > width) {
      lines.push(line);
      line = word;
    } else line = line === '' ? word : `${line} ${word}`;
  }
  return [...lines, line];
}

/** Columns as wide as their contents, the first to the left, the others to the right; the first is cut when all is too wide. */
export function columnsOf(head: readonly string[], rows: readonly (readonly string[])[], style: TextStyle): string {
  return columnsUnder([head], rows, style);
}

/** The same under a head of several lines. */
export function columnsUnder(
  heads: readonly (readonly string[])[],
  rows: readonly (readonly string[])[],
  style: TextStyle,
): string {
  const table = [...heads, ...rows].map((row) => row.map(printable));
  const widths = (table[0] ?? []).map((_, c) => Math.max(...table.map((row) => wide(row[c] ?? ''))));
  const others = widths.slice(1).reduce((sum, width) => sum + width + 2, 0);
  const first = Math.max(8, Math.min(widths[0] ?? 0, room(style) - others));
  return table
    .map((row, r) => {
      const cells = row.map((cell, c) => (c === 0 ? padEnd(cut(cell, first), first) : padStart(cell, widths[c] ?? 0)));
      return r < heads.length ? dim(cells.join('  ').trimEnd(), style) : cells.join('  ').trimEnd();
    })
    .join('\n');
}

/** Spaces that may not break have done their work once lines are broken. */
export function joinBlocks(blocks: readonly string[]): string {
  return `${blocks.filter((block) => block !== '').join('\n\n')}\n`.replaceAll('\u00a0', ' ');
}

/** Terminals that say nothing of their width, or zero, get 80. */
export function room({ width }: TextStyle): number {
  return width >= 20 ? Math.min(width, 100) : 80;
}

function cut(text: string, width: number): string {
  const characters = [...text];
  while (wide(characters.join('')) > width) characters.pop();
  return characters.length === [...text].length ? text : `${[...characters].slice(0, -1).join('')}…`;
}

function padEnd(text: string, width: number): string {
  return text + ' '.repeat(Math.max(0, width - wide(text)));
}

function padStart(text: string, width: number): string {
  return ' '.repeat(Math.max(0, width - wide(text))) + text;
}

/** Cells that a text takes: marks that combine take none, wide scripts two. */
export function wide(text: string): number {
  if (plain.test(text)) return text.length;
  let cells = 0;
  for (const character of text) {
    if (/\p{M}/u.test(character)) continue;
    cells += /[\p{Script=Han}\p{Script=Hiragana}\p{Script=Katakana}\p{Script=Hangul}\p{Emoji_Presentation}]/u.test(
      character,
    )
      ? 2
      : 1;
  }
  return cells;
}
