// However much is wrong, a hundred of each are kept, and an error is never lost behind warnings.
import { expect, test } from 'vitest';
import { Collector } from '../../src/diagnostic/collector.ts';
import type { Diagnostic, Severity } from '../../src/diagnostic/diagnostic.ts';
import { readSpec } from '../../src/spec/read.ts';

const at = (line: number, severity: Severity): Diagnostic => ({
  ...{ severity, code: 'unknown-key', message: 'No' },
  place: { file: 'a.yaml', line, column: 1, length: 1, text: 'a' },
});

test('a few are told in the order of the file', () => {
  const found = new Collector();
  found.add(at(3, 'error'), at(1, 'warning'), at(2, 'error'));
  expect(found.told().map((one) => one.place?.line)).toEqual([1, 2, 3]);
  expect([found.errors, found.full]).toEqual([2, false]);
});

test('many are cut, and that is told', () => {
  const found = new Collector();
  for (let line = 1; line <= 500; line++) found.add(at(line, line === 500 ? 'error' : 'warning'));
  const told = found.told();
  expect(told.filter((one) => one.severity === 'warning')).toHaveLength(100);
  expect(told.filter((one) => one.severity === 'error').map((one) => one.place?.line)).toEqual([500]);
  expect(told.at(-1)?.code).toBe('many-mistakes');
});

test('errors behind many warnings are found in a text, too', () => {
  const comments = Array.from(
    { length: 300 },
    (_, i) => `- { name: fen ${String(i)} } #2\n- name: North #${String(i)}\n`,
  ).join('');
  const text = (end: string): string =>
    `skein: 1\nstudy: { title: x }\nyears: 1\npatches:\n${comments}counts: females\nclasses: [a]\nyear: [count]\n${end}`;
  expect(readSpec(text('start: { total: 1 }\n'), 'a.yaml').document?.spec.patches).toHaveLength(600);
  const aliased = readSpec(text('start: { total: *x }\n'), 'a.yaml');
  expect([aliased.document, aliased.diagnostics.some((one) => one.code === 'yaml-alias')]).toEqual([undefined, true]);
  const twice = readSpec(text('start: { total: 1 }\nyears: 2\n'), 'a.yaml');
  expect([twice.document, twice.diagnostics.some((one) => one.code === 'duplicate-key')]).toEqual([undefined, true]);
  const shaped = readSpec(text('start: { total: -1 }\n'), 'a.yaml');
  expect([shaped.document, shaped.diagnostics.some((one) => one.code === 'out-of-range')]).toEqual([undefined, true]);
});
