// --out: tidy tables with their dictionary, the results, and what decides them.
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { csvParse } from 'd3';
import { describe, expect, test } from 'vitest';
import { filesIn, folder, ponds, skein } from './skein.ts';

const words = ['run', ponds, '--replicates', '40', '--years', '6', '--seed', '3'];

describe('skein run --out', () => {
  const read = (cwd: string, name: string): string => readFileSync(join(cwd, 'out', name), 'utf8');

  test('writes these files, the same bytes each time, over what was there', () => {
    const cwd = folder();
    const first = skein([...words, '--out', 'out'], { cwd });
    expect(first.code).toBe(0);
    const names = filesIn(join(cwd, 'out'));
    const tables = [
      'abundance',
      'chances_by_year',
      'lowest_count',
      'outcomes',
      'parameters',
      'patches',
      'patches_in_use',
      'when_first',
    ];
    expect(names).toEqual(
      [
        ...tables.flatMap((name) => [`${name}.csv`, `${name}.parquet`]),
        ...['dictionary.csv', 'log.json', 'results.json', 'run.json'],
      ].sort(),
    );
    const others = names.filter((name) => name !== 'log.json');
    const before = others.map((name) => read(cwd, name));
    expect(skein([...words, '--out', 'out'], { cwd })).toEqual(first);
    expect(others.map((name) => read(cwd, name))).toEqual(before);
    expect(filesIn(join(cwd, 'out'))).toEqual(names);
  });

  test('tables say what the JSON says, one row an observation', () => {
    const cwd = folder();
    const { out } = skein([...words, '--json', '--out', 'out'], { cwd });
    expect(read(cwd, 'results.json')).toBe(out);
    const results = JSON.parse(out);
    const rows = csvParse(read(cwd, 'abundance.csv'));
    expect(rows).toHaveLength(7 * 3);
    const whole = rows.filter((row) => row['patch'] === '');
    expect(whole.map((row) => Number(row['mean']))).toEqual(
      results.abundance.whole.map((one: { readonly mean: number }) => one.mean),
    );
    const chances = csvParse(read(cwd, 'outcomes.csv')).filter((row) => row['when'] === 'ever');
    expect(chances.map((row) => Number(row['probability']))).toEqual(
      results.outcomes.map((one: { readonly ever: { readonly probability: number } }) => one.ever.probability),
    );
  });

  test('the dictionary has every column of every table', () => {
    const cwd = folder();
    skein([...words, '--out', 'out'], { cwd });
    const listed = csvParse(read(cwd, 'dictionary.csv'));
    expect(listed.every((row) => row['meaning'] !== '')).toBe(true);
    const tables = filesIn(join(cwd, 'out')).filter((name) => name.endsWith('.csv') && name !== 'dictionary.csv');
    for (const name of tables) {
      const own = listed.filter((row) => `${row['table']}.csv` === name).map((row) => row['column']);
      expect(csvParse(read(cwd, name)).columns).toEqual(own);
    }
  });

  test('run.json holds only what decides the result, and its spec runs again to the same', () => {
    const cwd = folder();
    const { out } = skein([...words, '--json', '--out', 'out'], { cwd });
    const { format, hash, spec, ...others } = JSON.parse(read(cwd, 'run.json'));
    expect(format).toBe('skein-inputs/1');
    expect(hash).toBe(JSON.parse(out).hash);
    expect(Object.keys(others).sort()).toEqual(['command', 'model', 'tool']);
    const again = skein(['run', '-', '--json'], { cwd, input: JSON.stringify(spec) });
    expect(again.out).toBe(out);
  });
});

test('skein path --out writes the path', () => {
  const cwd = folder();
  const { code, out } = skein(['path', ponds, '--years', '4', '--json', '--out', 'out'], { cwd });
  expect(code).toBe(0);
  expect(filesIn(join(cwd, 'out'))).toEqual([
    ...['dictionary.csv', 'log.json', 'path.csv', 'path.parquet', 'results.json', 'run.json'],
  ]);
  const rows = csvParse(readFileSync(join(cwd, 'out/path.csv'), 'utf8'));
  expect(rows.map((row) => Number(row['animals']))).toEqual(
    JSON.parse(out).abundance.map((one: { readonly animals: number }) => one.animals),
  );
});
