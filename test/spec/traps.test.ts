// What YAML makes of innocent words is told with the advice to quote, or does not matter here.
import { expect, test } from 'vitest';
import type { Diagnostic } from '../../src/diagnostic/diagnostic.ts';
import { readSpec } from '../../src/spec/read.ts';

const base = (changes: Readonly<Record<string, string>>): string =>
  Object.entries({
    ...{ skein: '1', study: '{ title: Fens }', years: '10', patches: '[{ name: Fen }]', counts: 'females' },
    ...{ classes: '[young, old]', year: '[count, survival]', start: '{ total: 8 }', ...changes },
  })
    .map(([key, value]) => `${key}: ${value}\n`)
    .join('');

function told(changes: Readonly<Record<string, string>>): readonly Diagnostic[] {
  return readSpec(base(changes), 'fens.yaml').diagnostics;
}

function only(changes: Readonly<Record<string, string>>): Diagnostic {
  const list = told(changes);
  expect(list).toHaveLength(1);
  return list[0]!;
}

test('the plain spec has no mistake', () => {
  expect(told({})).toEqual([]);
});

const numbersAsNames: readonly (readonly [string, string])[] = [
  ['007', 'Write "007"'],
  ['1e3', 'Write "1e3"'],
  ['2.10', 'Write "2.10"'],
  ['-5', 'Write "-5"'],
  ['true', 'Write "true"'],
];

test.each(numbersAsNames)('the name %s needs quotes', (name, fix) => {
  const one = only({ classes: `[young, ${name}]` });
  expect([one.code, one.found, one.nearest]).toEqual(['needs-quotes', name, undefined]);
  expect(one.fix?.toLowerCase()).toContain(fix.toLowerCase());
});

test('the same names in quotes are names', () => {
  expect(told({ classes: '["007", "1e3", "no", "true", "+80", "1_000"]' })).toEqual([]);
});

test('a key keeps the digits that its author wrote', () => {
  const { document } = readSpec(base({ classes: '["007"]', survival: '{ 007: 0.5 }' }), 'fens.yaml');
  expect(Object.keys(document?.spec.survival ?? {})).toEqual(['007']);
});

test.each(['no', 'Off', 'yes', 'y', 'ON', 'null', '~', 'True'])('the key %s is read, with advice', (word) => {
  const one = only({ survival: `{ ${word}: 0.5 }` });
  expect([one.severity, one.code, one.fix]).toEqual(['warning', 'quote-word', `Write "${word}".`]);
});

test.each(['+80', '+0.5', '+1e3'])('%s is no number, and may be a change', (number) => {
  expect(only({ years: number }).code).toBe('relative-change');
  expect(only({ survival: `{ old: ${number} }` }).fix).toContain('{ add: ');
});

test.each(['1_000', '0x1F', '0o17', '.inf', '-.INF', '.nan'])('%s is no number', (number) => {
  expect(only({ years: number }).code).toBe('number-format');
  expect(only({ survival: `{ old: ${number} }` }).code).toBe('number-format');
});

test('numbers in the usual forms are numbers', () => {
  const { document } = readSpec(base({ years: '1e3', survival: '{ young: .5, old: 007e-2 }' }), 'fens.yaml');
  expect(document?.spec.years).toBe(1000);
  expect(document?.spec.survival).toEqual({ young: 0.5, old: 0.07 });
});

test('a number beyond all numbers is outside its limits', () => {
  expect(only({ start: '{ total: 1e999 }' }).code).toBe('out-of-range');
});

const cut: readonly (readonly [string, string])[] = [
  ['{ young: min(1, 0.5), old: 0.2 }', 'min(1, 0.5)'],
  ['{ old: max(0.1, min(0.2, 0.3)) }', 'max(0.1, min(0.2, 0.3))'],
  ['{ old: 1 - min(0.2, x, y) * 2 }', '1 - min(0.2, x, y) * 2'],
];

test.each(cut)('in %s a comma cuts an expression', (section, whole) => {
  const one = only({ survival: section });
  expect([one.code, one.fix]).toEqual(['comma-in-braces', `Put quotes around it: "${whole}".`]);
  expect(told({ survival: section.replace(whole, `"${whole}"`) })).toEqual([]);
});

test('a comma cuts in a list, too', () => {
  const one = only({ demography: '{ fates: [[0, min(0.1, x)], [0.2, 0.3]] }' });
  expect([one.code, one.fix]).toEqual(['comma-in-braces', 'Put quotes around it: "min(0.1, x)".']);
});

test('outside braces a comma does no harm', () => {
  expect(readSpec(`${base({})}survival:\n  old: min(1, 0.5)\n`, 'fens.yaml').diagnostics).toEqual([]);
});

test('# inside a name is told, a comment is not', () => {
  const patches = (line: string): readonly string[] =>
    readSpec(`${base({}).replace(/^patches.*\n/mu, '')}patches:\n  - name: ${line}\n`, 'fens.yaml').diagnostics.map(
      (one) => one.code,
    );
  expect(patches('North #2')).toEqual(['comment-in-name']);
  expect(patches('North # the second')).toEqual([]);
  expect(patches('"North #2"')).toEqual([]);
  expect(patches('North#2')).toEqual([]);
});

test('a key twice is an error in every section', () => {
  expect(only({ survival: '{ old: 0.1, old: 0.2 }' }).code).toBe('duplicate-key');
  expect(readSpec(`${base({})}years: 3\n`, 'fens.yaml').diagnostics.map((one) => one.code)).toEqual(['duplicate-key']);
});

test('anchors, aliases, tags and merge keys are refused and not followed', () => {
  const codes = (value: string): readonly string[] => told({ survival: value }).map((one) => one.code);
  expect(codes('&a { old: *a }')).toEqual(['yaml-alias', 'yaml-alias']);
  expect(codes('{ old: !!js/function "x" }')).toEqual(['yaml-tag']);
  expect(codes('{ <<: { old: 0.1 } }')).toEqual(['yaml-merge']);
});

test('a near miss of a key of a patch is told', () => {
  const one = only({ patches: '[{ name: Fen, capasity: 3 }]' });
  expect([one.severity, one.code, one.nearest]).toEqual(['warning', 'near-key', 'capacity']);
});
