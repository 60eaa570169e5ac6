// A spec without mistakes is read as it was written, and every value can be found again in its text.
import { expect, test } from 'vitest';
import type { Diagnostic, Place } from '../../src/diagnostic/diagnostic.ts';
import type { SpecDocument } from '../../src/spec/document.ts';
import { readSpec } from '../../src/spec/read.ts';
import { wholeText } from './whole.ts';

function read(text: string): SpecDocument {
  const { document, diagnostics } = readSpec(text, 'hare.yaml');
  expect(diagnostics).toEqual([]);
  if (document === undefined) throw new Error('There is no document.');
  return document;
}

function told(text: string): readonly string[] {
  return readSpec(text, 'hare.yaml').diagnostics.map((one) => `${String(one.place?.line)} ${one.code}`);
}

test('a spec that uses every key is read without a word', () => {
  const { spec } = read(wholeText);
  expect(spec.years).toBe(50);
  expect(spec.patches[1]).toEqual({ name: 'Saltmarsh', at: [-10, 0.5], capacity: 0 });
  expect(spec.patches[0]?.['cover' as 'name']).toBe(0.4);
  expect(spec.parameters?.['natal_leaving']).toBe('22 %');
  expect(spec.births).toEqual({ yearling: '0.4 * litter', adult: 'litter', 'female-share': 0.5, into: 'newborn' });
  expect(spec.demography).toEqual({
    fates: [
      [0, 0, 0],
      [0.3, 0, 0],
      [0, 'min(0.5, cover)', 0.8],
    ],
  });
});

test('sections of the author’s own stand under `named`, and only there', () => {
  const { spec } = read(wholeText);
  expect(Object.keys(spec.named)).toEqual([
    'natal',
    'roaming',
    'room',
    'bag',
    'moves',
    'release',
    'mates',
    'second brood',
    'late brood',
    'moult',
    'wandering',
    'flood',
  ]);
  expect(spec.named['room']).toEqual({
    kind: 'ceiling',
    counted: ['adult'],
    capacity: '2 * capacity',
    takes: 'at random',
  });
  expect(Object.keys(spec)).not.toContain('room');
});

test('JSON is read as well', () => {
  const { spec } = read(wholeText);
  const { named, ...core } = spec;
  expect(read(JSON.stringify({ ...core, ...named }, null, 1)).spec).toEqual(spec);
});

test('line ends of Windows and a byte order mark change nothing', () => {
  const { spec, locate } = read(wholeText);
  const other = read(`\uFEFF${wholeText.replaceAll('\n', '\r\n')}`);
  expect(other.spec).toEqual(spec);
  expect(other.locate(['years'])).toEqual(locate(['years']));
  expect(other.locate(['skein'], 'key').column).toBe(1);
});

test('names of users are not mistaken for methods of objects', () => {
  const { spec } = read(wholeText);
  expect(spec.survival?.['constructor']).toBeUndefined();
  expect(spec.named['toString']).toBeUndefined();
});

/** What stands at a place, and the number of its line. */
function shown({ line, column, length, text }: Place): readonly [number, string] {
  expect(wholeText.split('\n')[line - 1]).toBe(text);
  return [line, text.slice(column - 1, column - 1 + length)];
}

test('a value is found at its place, a key at its own', () => {
  const { locate } = read(wholeText);
  expect(shown(locate(['patches', 0, 'area']))).toEqual([16, '140 ha']);
  expect(shown(locate(['patches', 0, 'area'], 'key'))).toEqual([16, 'area']);
  expect(shown(locate(['patches', 0, 'at', 1]))).toEqual([16, '9.1']);
  expect(shown(locate(['patches', 1, 'name']))).toEqual([17, 'Saltmarsh']);
  expect(shown(locate(['natal', 'kernel', 'mean']))).toEqual([43, '4 km']);
  expect(shown(locate(['named', 'natal', 'kernel', 'mean']))).toEqual([43, '4 km']);
  expect(shown(locate(['demography', 'fates', 2, 1]))).toEqual([32, '"min(0.5, cover)"']);
});

test('a section is shown by its key, and what is not in the text by what encloses it', () => {
  const { locate } = read(wholeText);
  expect(shown(locate(['natal']))).toEqual([37, 'natal']);
  expect(shown(locate(['natal', 'kernel', 'scale']))).toEqual([43, 'kernel']);
  expect(locate(['nowhere', 'at', 'all'])).toMatchObject({ line: 1, column: 1 });
  expect(locate([])).toMatchObject({ line: 1, column: 1 });
});

test('all mistakes of a file come at once, in its order', () => {
  const text = wholeText
    .replace('run:', 'runs:')
    .replace('years: 50', 'years: 0')
    .replace('natal_leaving: 22 %', 'natal_leaving: 22 &')
    .replace('kind: ceiling', 'kind: roof')
    .replace('status: draft', 'status: drafted');
  expect(told(text)).toEqual([
    ...['8 unknown-word', '11 out-of-range', '29 expression-character', '53 unknown-kind', '70 unknown-key'],
  ]);
});

test('a mistake in a section that may look in several ways is told for the one that is meant', () => {
  const start = (line: string): readonly string[] => told(wholeText.replace(/^start: .*$/mu, line));
  expect(start('start: { total: -1 }')).toEqual(['61 out-of-range']);
  expect(start('start: { counted: { North fen: 1 }, of: [adult], rest: some }')).toEqual(['61 unknown-word']);
  expect(start('start: { table: { North fen: { adult: many } } }')).toEqual(['61 wrong-type']);
  expect(start('start: 80')).toEqual(['61 wrong-type']);
  expect(start('start:')).toEqual(['61 missing-value']);
});

test('where percent are not taken, the share is told', () => {
  const { diagnostics } = readSpec(wholeText.replace(/^run: .*$/mu, 'run: { precision: 2 % }'), 'test.yaml');
  expect(diagnostics.map(({ code, fix }) => [code, fix])).toEqual([['wrong-type', 'Write it as a share: 0.02.']]);
});

test('an expression in quotes has its mistake at the right character', () => {
  const { diagnostics } = readSpec(wholeText.replace('"min(0.5, cover)"', '"min(0.5, cover"'), 'hare.yaml');
  const [one] = diagnostics as [Diagnostic];
  expect(one.place?.text.slice(0, (one.place.column ?? 0) - 1).endsWith('"min(0.5, cover')).toBe(true);
});
