// Texts made to hurt are refused with a place, in little work.
import { expect, test } from 'vitest';
import { readSpec } from '../../src/spec/read.ts';

const deep = 10_000;
const bomb = Array.from(
  { length: 30 },
  (_, i) => `a${String(i)}: &a${String(i)} [*a${String(i - 1)}, *a${String(i - 1)}]`,
);

const texts: Readonly<Record<string, string>> = {
  'brackets that never close': `a: ${'['.repeat(deep)}`,
  'brackets that close': `a: ${'['.repeat(deep)}${']'.repeat(deep)}`,
  'sections in braces': `a: ${'{a: '.repeat(deep)}`,
  'lists in lists': '- '.repeat(deep),
  'keys of keys': '? '.repeat(deep),
  'sections by indenting': Array.from({ length: 1000 }, (_, i) => `${' '.repeat(i)}a:`).join('\n'),
  'fifty megabytes': `a: ${'x'.repeat(50_000_000)}`,
  'many marks': `a: [${'1,'.repeat(400_000)}]`,
  'many commas': `a: [${','.repeat(20_000)}]`,
  'many quotes': '"'.repeat(10_001),
  'many tabs': '\t'.repeat(100_000),
  'many anchors': `a: ${'&a '.repeat(5_000)}`,
  'many documents': '---\n'.repeat(5_000),
  'a bomb of aliases': bomb.join('\n'),
  'a circle of aliases': 'a: &a [*a]',
  'a long key': `${'k'.repeat(100_000)}: 1`,
  'many unknown keys': Array.from({ length: 5_000 }, (_, i) => `key${String(i)}: 1`).join('\n'),
  nothing: '',
  blanks: ' \n\t\n ',
  zeros: '\u0000'.repeat(100),
  'half a character': 'a: \uD800',
  'old line ends': 'a: 1\rb: 2\r',
  'deep expression': `survival: { a: ${'('.repeat(5_000)} }`,
};

test.each(Object.keys(texts))('%s', (what) => {
  const text = texts[what] ?? '';
  const { document, diagnostics } = readSpec(text, 'bad.yaml');
  expect(document).toBeUndefined();
  expect(diagnostics.some((one) => one.severity === 'error')).toBe(true);
  const lines = text.split('\n');
  for (const { place } of diagnostics) {
    expect(place?.line).toBeLessThanOrEqual(lines.length);
    expect(place?.column).toBeLessThanOrEqual((lines[(place?.line ?? 0) - 1] ?? '').length + 1);
  }
});

test('four thousand patches in one file are read', () => {
  const patches = Array.from(
    { length: 4000 },
    (_, i) => `  - { name: p${String(i)}, at: [${String(i)}, 2], area: 3 ha }`,
  );
  const head = 'skein: 1\nstudy: { title: Many }\nyears: 1\ncounts: females\nclasses: [a]\nyear: [count]\n';
  const { document } = readSpec(`${head}start: { total: 1 }\npatches:\n${patches.join('\n')}\n`, 'many.yaml');
  expect(document?.spec.patches).toHaveLength(4000);
  expect(document?.locate(['patches', 3999, 'name'])).toMatchObject({ line: 4008, column: 13 });
});
