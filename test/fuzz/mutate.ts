// Texts with pieces cut out and put in, with the marks that are hardest on a reader.
import fc from 'fast-check';

const yaml = [
  '{',
  '}',
  '[',
  ']',
  ':',
  ': ',
  ',',
  '#',
  ' #',
  '- ',
  '?',
  '&a',
  '*a',
  '!x',
  '|',
  '>',
  '"',
  "'",
  '%',
  '@',
  '\t',
];
const lines = ['\n', '\r\n', '  ', '\n\n', '---', '...', '<<: ', '\u0000', '\uFEFF', '\u2028', ';'];
const words = [
  '(',
  ')',
  'min(',
  '1e999',
  '1e6',
  '__proto__',
  'constructor',
  'kind: dispersal',
  '~',
  'null',
  '0x',
  '0',
  '-',
  '-1',
];
const others = [
  '🐇',
  '\u0301',
  '\uD83D',
  '+',
  '^',
  '\\',
  '`',
  'year',
  'between: steps',
  'all',
  'file: x.csv',
  '99',
  '.',
  '/ 0',
];

export const marks: readonly string[] = [...yaml, ...lines, ...words, ...others];

export interface Cut {
  readonly at: number;
  readonly length: number;
  readonly insert: string;
}

export const anyCut: fc.Arbitrary<Cut> = fc.record({
  at: fc.double({ min: 0, max: 1, noNaN: true }),
  length: fc.nat(12),
  insert: fc.constantFrom('', ...marks),
});

export function mutate(text: string, cuts: readonly Cut[]): string {
  return cuts.reduce((now, { at, length, insert }) => {
    const from = Math.floor(at * now.length);
    return now.slice(0, from) + insert + now.slice(from + length);
  }, text);
}

/** The next digit after a place becomes another one: often the text still means something. */
export function changeDigit(text: string, at: number, digit: number): string {
  const from = Math.floor(at * text.length);
  const next = text.slice(from).search(/\d/u);
  return next < 0 ? text : text.slice(0, from + next) + String(digit) + text.slice(from + next + 1);
}
