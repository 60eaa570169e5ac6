// Texts changed at random never crash the reader, and whatever it tells has a place inside the file.
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { renderDiagnostics } from '../../src/diagnostic/render.ts';
import { readSpec } from '../../src/spec/read.ts';
import { wholeText } from './whole.ts';

const marks = [
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
marks.push(
  '\n',
  '\r\n',
  '  ',
  '\n\n',
  '---',
  '...',
  '<<: ',
  '\u0000',
  '\uFEFF',
  '\u2028',
  '(',
  ')',
  'min(',
  '1e999',
  '__proto__',
);
marks.push('constructor', 'kind: dispersal', '~', '🐇', '\u0301', '\uD83D', '+', '^', '\\', '`', 'null', '0x', '-');

const anyCut = fc.record({
  at: fc.double({ min: 0, max: 1, noNaN: true }),
  length: fc.nat(12),
  insert: fc.constantFrom('', ...marks),
});

function mutate(
  text: string,
  cuts: readonly { readonly at: number; readonly length: number; readonly insert: string }[],
): string {
  return cuts.reduce((now, { at, length, insert }) => {
    const from = Math.floor(at * now.length);
    return now.slice(0, from) + insert + now.slice(from + length);
  }, text);
}

function check(text: string): void {
  const { document, diagnostics } = readSpec(text, 'fuzz.yaml');
  expect(document === undefined).toBe(diagnostics.some((one) => one.severity === 'error'));
  const lines = (text.startsWith('\uFEFF') ? text.slice(1) : text).split('\n');
  let before = 0;
  for (const { place } of diagnostics) {
    if (place === undefined) throw new Error('A mistake has no place.');
    const line = lines[place.line - 1];
    expect(line?.replace(/\r$/u, '')).toBe(place.text);
    expect(place.column).toBeGreaterThanOrEqual(1);
    expect(place.column).toBeLessThanOrEqual(place.text.length + 1);
    expect(place.line).toBeGreaterThanOrEqual(before);
    before = place.line;
  }
  expect(renderDiagnostics(diagnostics, { colour: false, width: 80 })).not.toMatch(/[^\P{C}\n\u200C\u200D]/u);
}

test('the whole spec with pieces cut out and put in', () => {
  fc.assert(
    fc.property(fc.array(anyCut, { minLength: 1, maxLength: 4 }), (cuts) => {
      check(mutate(wholeText, cuts));
    }),
    { seed: 4206, numRuns: 300 },
  );
});

const small = wholeText
  .split('\n')
  .filter((line) => /^(?:skein|years|counts|survival|births|start|room)/u.test(line))
  .join('\n');

test('a few lines with many pieces cut out and put in', () => {
  fc.assert(
    fc.property(fc.array(anyCut, { minLength: 1, maxLength: 8 }), (cuts) => {
      check(mutate(small, cuts));
    }),
    { seed: 4207, numRuns: 1200 },
  );
});

test('texts made of marks alone', () => {
  fc.assert(
    fc.property(fc.array(fc.constantFrom(...marks, 'a', '1', ' ', 'skein: 1'), { maxLength: 40 }), (pieces) => {
      check(pieces.join(''));
    }),
    { seed: 4208, numRuns: 1500 },
  );
});
