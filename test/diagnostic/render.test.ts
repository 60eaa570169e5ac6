// A rendered mistake shows its line with the caret beneath the right characters, and nothing in it can harm a terminal.
import fc from 'fast-check';
import { expect, test } from 'vitest';
import type { Diagnostic } from '../../src/diagnostic/diagnostic.ts';
import { excerptOf } from '../../src/diagnostic/excerpt.ts';
import { renderDiagnostics } from '../../src/diagnostic/render.ts';
import { visible, widthOf } from '../../src/diagnostic/visible.ts';

const place = (text: string, column: number, length: number) => ({ file: 'a.yaml', line: 7, column, length, text });
const mistake = (more: Partial<Diagnostic>): Diagnostic => ({
  severity: 'error',
  code: 'unknown-key',
  message: 'No',
  ...more,
});
const plain = (list: readonly Diagnostic[], width = 60): string => renderDiagnostics(list, { colour: false, width });

test('all details stand in their order', () => {
  const one = mistake({
    ...{ message: '`survial` is not a key', place: place('survial: 1', 1, 7), found: 'survial', expected: 'a key' },
    ...{ nearest: 'survival', fix: 'Write it.', reason: 'It is so.' },
  });
  expect(plain([one])).toBe(
    [
      ...['a.yaml:7:1 error unknown-key', '  `survial` is not a key.', '', '  7 | survial: 1', '    | ^^^^^^^', ''],
      ...['  found     survial', '  expected  a key', '  nearest   survival', '  to do     Write it.'],
      ...['  because   It is so.', '', '1 error', ''],
    ].join('\n'),
  );
});

test('no mistakes make no text, and several are counted by severity', () => {
  expect(plain([])).toBe('');
  const text = plain([mistake({}), mistake({}), mistake({ severity: 'warning' }), mistake({ severity: 'note' })]);
  expect(text.endsWith('\n2 errors, 1 warning, 1 note\n')).toBe(true);
});

test('colour is there only where it is wanted', () => {
  const one = mistake({ place: place('a: 1', 1, 1) });
  expect(renderDiagnostics([one], { colour: true, width: 80 })).toContain('\u001B[31m');
  expect(plain([one])).not.toContain('\u001B');
});

test('the caret stands beneath wide and hidden characters as they are shown', () => {
  expect(excerptOf(place('北沼: x', 5, 1), 60)).toEqual({ line: '北沼: x', carets: '      ^' });
  expect(excerptOf(place('a\u0000b', 3, 1), 60)).toEqual({ line: 'a\\u{0}b', carets: '      ^' });
  expect(excerptOf(place('e\u0301a', 3, 1), 60)).toEqual({ line: 'e\u0301a', carets: ' ^' });
  expect(excerptOf(place('\ta', 2, 1), 60)).toEqual({ line: '→a', carets: ' ^' });
});

test('a long line is cut around the mistake', () => {
  const text = `${'a'.repeat(5000)}WRONG${'b'.repeat(5000)}`;
  const { line, carets } = excerptOf(place(text, 5001, 5), 40);
  expect(line).toMatch(/^…a+WRONGb+…$/u);
  expect(line.slice(carets.indexOf('^'), carets.length)).toBe('WRONG');
  expect(line.length).toBeLessThanOrEqual(40);
});

test('a long mistake is cut at its end', () => {
  const { line, carets } = excerptOf(place('x'.repeat(500), 1, 500), 40);
  expect(widthOf(line)).toBeLessThanOrEqual(40);
  expect(carets.trim()).toMatch(/^\^+$/u);
});

test('nothing of a user moves the cursor or turns the line', () => {
  const evil = '\u001B[2J\u0007\r\u202Eabc\u2066\u200B\u009B1m';
  const text = plain([mistake({ message: evil, found: evil, fix: evil, place: place(evil, 3, 2) })]);
  expect(text).not.toMatch(/[^\P{C}\n]/u);
  expect(visible('\u202Ex')).toBe('\\u{202e}x');
});

test('any line and any mistake in it fit the width', () => {
  const anyLine = fc.string({ unit: 'binary', maxLength: 200 });
  fc.assert(
    fc.property(anyLine, fc.nat(210), fc.integer({ min: 1, max: 300 }), fc.integer({ min: 20, max: 120 }), (...all) => {
      const [text, column, length, width] = all;
      const { line, carets } = excerptOf(place(text, Math.min(column, text.length) + 1, length), width);
      expect(widthOf(line)).toBeLessThanOrEqual(width);
      expect(carets.length).toBeLessThanOrEqual(width);
      expect(carets).toMatch(/^ *\^+$/u);
    }),
    { seed: 4209, numRuns: 1000 },
  );
});
