// What goes where: data to standard output, words for people to standard error, colours to terminals only.
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { hare, ponds, root, skein } from './skein.ts';

const json = [
  { words: ['check', ponds, '--json'], format: 'skein-check/1' },
  { words: ['show', ponds, 'model', '--json'], format: 'skein-model/1' },
  { words: ['show', ponds, 'landscape', '--json'], format: 'skein-landscape/1' },
  { words: ['show', ponds, 'matrix', '--json'], format: 'skein-matrix/1' },
  { words: ['show', ponds, 'packed', '--json'], format: 'skein-packed/1' },
  { words: ['path', ponds, '--json'], format: 'skein-path/1' },
  { words: ['run', ponds, '--replicates', '20', '--json'], format: 'skein-run/1' },
];

describe('--json', () => {
  test.each(json)('skein $words is one object and nothing else', ({ words, format }) => {
    const { code, out, err } = skein(words);
    expect({ code, err }).toEqual({ code: 0, err: '' });
    expect(JSON.parse(out)).toMatchObject({ format });
    expect(out.endsWith('}\n')).toBe(true);
    expect(out).not.toContain('\u001b');
  });

  test('the spec as JSON is a model again, with the same results', () => {
    const spec = skein(['show', ponds, 'spec', '--json']);
    const words = ['--replicates', '20', '--json'];
    const again = skein(['run', '-', ...words], { input: spec.out });
    expect(again.code).toBe(0);
    expect(again.out).toBe(skein(['run', ponds, ...words]).out);
  });

  test('of a wrong model: the mistakes with their places, and exit code 1', () => {
    const { code, out, err } = skein(['check', '-', '--json'], { input: 'skein: 1\nstudy: {}\n' });
    expect({ code, err }).toEqual({ code: 1, err: '' });
    const { diagnostics } = JSON.parse(out);
    const place = expect.objectContaining({ file: 'standard input', line: 2 });
    expect(diagnostics).toContainEqual(expect.objectContaining({ severity: 'error', code: 'missing-key', place }));
  });
});

describe('text', () => {
  test('a pipe gets no colours and no progress', () => {
    for (const words of [
      ['check', hare],
      ['run', hare, '--replicates', '20'],
      ['path', hare],
    ]) {
      const { code, out, err } = skein(words);
      expect({ code, err }).toEqual({ code: 0, err: '' });
      expect(out).not.toContain('\u001b');
      expect(out.startsWith('Reed hare on the Harrow Levels\n')).toBe(true);
    }
  });

  test('mistakes go to standard error alone', () => {
    const { code, out, err } = skein(['run', '-'], { input: 'skein: 1\n' });
    expect({ code, out }).toEqual({ code: 1, out: '' });
    expect(err).toMatch(/^standard input:1:1 error missing-key\n/);
    expect(err).not.toContain('\u001b');
  });

  test('a spec printed and read again prints the same', () => {
    const first = skein(['show', hare, 'spec']);
    const second = skein(['show', '-', 'spec'], { input: first.out });
    expect(second).toEqual(first);
  });
});

describe('- is standard input', () => {
  const text = readFileSync(join(root, ponds), 'utf8');

  test('the same text gives the same run', () => {
    const words = ['--replicates', '20', '--json'];
    expect(skein(['run', '-', ...words], { input: text })).toEqual(skein(['run', ponds, ...words]));
  });

  test('a report on standard output is the page and nothing else', () => {
    const { code, out, err } = skein(['report', '-', '--replicates', '20', '-o', '-'], { input: text });
    expect({ code, err }).toEqual({ code: 0, err: '' });
    expect(out).toMatch(/^<!doctype html>/i);
    expect(out.trimEnd().endsWith('</html>')).toBe(true);
  });
});
