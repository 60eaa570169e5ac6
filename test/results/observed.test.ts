// Counts of the past are held against the same classes, patches and years of the runs.
import { describe, expect, test } from 'vitest';
import { runModel } from '../../src/pipeline.ts';
import { compileModel } from '../golden/models.ts';
import { compileText } from '../pipeline/compile-text.ts';

/** Ten animals of each class that neither die nor breed nor move in one patch, and 100 in another: what is counted is sure. */
const still = (observed: string): string => `
skein: 1
study: { title: Stones, invented: true }
first-year: 2001
years: 4
patches: [{ name: Zeta }, { name: Alpha }]
counts: females
classes: [small, large]
oldest: open-ended
survival: { small: 1, large: 1 }
births: { large: 0 }
year: [count, survival, breeding]
start: { table: { Zeta: { small: 10, large: 10 }, Alpha: { small: 100, large: 0 } } }
observed: ${observed}
run: { replicates: 24, seed: 1 }
`;

function observedOf(observed: string) {
  return runModel(compileText(still(observed))).observed!;
}

describe('counts of the past', () => {
  test('lie below, within or above what the runs have of the classes that were counted', () => {
    const { counts, compared, outside, beyondError, abundance, classes } = observedOf(
      '{ counts: { Zeta: { 1999: 3, 2000: 9, 2001: 10, 2002: 9, 2003: 11 } }, of: [large] }',
    );
    expect(classes).toEqual(['large']);
    expect(counts.filter(({ patch }) => patch === 'Zeta').map(({ lies }) => lies)).toEqual([
      null,
      null,
      'within',
      'below',
      'above',
    ]);
    expect([compared, outside, beyondError]).toEqual([3, 2, null]);
    expect(abundance.map(({ patch }) => patch)).toEqual([null, 'Zeta']);
    expect(abundance[1]!.byYear.map(({ year, mean }) => [year, mean])).toEqual(
      [2000, 2001, 2002, 2003, 2004].map((y) => [y, 10]),
    );
  });

  test('with an error lie outside for sure only where all of their own 95 % interval does', () => {
    const { counts, outside, beyondError } = observedOf(
      '{ counts: { Zeta: { 2001: 16, 2002: 32, 2003: 5 }, Alpha: { 2001: 100 } }, of: [small, large], error: 0.25 }',
    );
    // 20 animals: 16 (8.2 to 23.8) reaches them, 32 (16.3 to 47.7) does, 5 (2.6 to 7.5) does not.
    expect(counts.filter(({ patch }) => patch === 'Zeta').map(({ beyondError: sure }) => sure)).toEqual([
      false,
      false,
      true,
    ]);
    expect([outside, beyondError]).toEqual([3, 1]);
  });

  test('are added up in the years in which every counted patch was counted, and patches stand in the order of the model', () => {
    const { counts, abundance } = observedOf('{ counts: { Alpha: { 2001: 90, 2003: 95 }, Zeta: { 2001: 22 } } }');
    expect(abundance.map(({ patch }) => patch)).toEqual([null, 'Zeta', 'Alpha']);
    expect(counts.filter(({ patch }) => patch === null)).toEqual([
      { patch: null, year: 2001, animals: 112, lies: 'below', beyondError: null },
    ]);
    expect(abundance[0]!.byYear.every(({ mean, sd }) => mean === 120 && sd === 0)).toBe(true);
  });

  test('change no other number of a run, takes and moves included', () => {
    const text = still('{ counts: { Zeta: { 2001: 10 } } }')
      .replace(
        'year: [count, survival, breeding]',
        'year: [count, survival, breeding, bag]\nbag: { kind: take, classes: all, number: 2.5, counted: each patch }',
      )
      .replace('large: 1 }', 'large: 0.7 }');
    const { observed, ...counted } = runModel(compileText(text));
    const { hash, ...without } = runModel(compileText(text.replace(/observed: .*\n/, '')));
    expect(observed!.abundance[1]!.byYear).toEqual(counted.abundance.patches[0]!.byYear);
    expect(counted).toEqual({ ...without, hash: counted.hash });
    expect(hash).not.toBe(counted.hash);
  });

  test('of the example from before its first year are shown, and none is called outside', () => {
    const { counts, compared, abundance } = runModel(compileModel('dune-toad', { replicates: 16, years: 3 })).observed!;
    expect(counts.length).toBeGreaterThan(10);
    expect(compared).toBe(0);
    expect(new Set(counts.map(({ lies }) => lies))).toEqual(new Set([null]));
    expect(abundance.length).toBeGreaterThan(3);
  });
});
