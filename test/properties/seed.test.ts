// One seed decides all chance: the same seed gives the same bytes, another seed others, and the path knows none.
import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { followPath, runModel } from '../../src/pipeline.ts';
import { compileText } from '../pipeline/compile-text.ts';

const text = readFileSync(new URL('../../models/reed-hare.yaml', import.meta.url), 'utf8');

function resultsOf(seed: number): { readonly run: string; readonly path: string; readonly hash: string } {
  const compiled = compileText(text, { seed, replicates: 48, years: 20 });
  const results = runModel(compiled);
  const run = JSON.stringify({ ...results, hash: '', seed: 0 });
  return { run, path: JSON.stringify({ ...followPath(compiled), growth: null, hash: '' }), hash: results.hash };
}

test('the same seed gives the same bytes', () => {
  expect(resultsOf(7)).toEqual(resultsOf(7));
});

test('every bit of the seed counts, also those above 32', () => {
  const seeds = [0, 1, 2, 7, 2 ** 31, 2 ** 32, 2 ** 32 + 7, 2 ** 52, Number.MAX_SAFE_INTEGER];
  const results = seeds.map(resultsOf);
  expect(new Set(results.map(({ run }) => run)).size).toBe(seeds.length);
  expect(new Set(results.map(({ hash }) => hash)).size).toBe(seeds.length);
});

test('the path without chance is the same for every seed', () => {
  expect(resultsOf(1).path).toBe(resultsOf(2).path);
});
