// Two sexes, from a spec to paths, growth and draws.
import { describe, expect, test } from 'vitest';
import { runModel } from '../../src/pipeline.ts';
import { compileText, errorsOf } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';
import { largestDifference, leadingOf, pathOf } from '../pipeline/measure.ts';

const twoSexes = (mating: string, { births = '0.5', years = 200 } = {}) =>
  framed(
    `classes: { females: [filly, mare], males: [colt, stallion] }
oldest: open-ended
survival: { filly: 1, mare: 0.8, colt: 1, stallion: 0.7 }
births: { mare: ${births}, female-share: 0.5 }
mating: { ${mating} }
year: [count, breeding, survival, ageing]
start: { table: { Meadow: { mare: 10, stallion: 10 } } }
`,
    { years },
  ).replace('counts: females', 'counts: both sexes');

describe('mares and stallions with s = 0.8 and 0.7, brood 0.5, harmonic mean (derived)', () => {
  const compiled = compileText(twoSexes('form: harmonic mean, males: [stallion]'));

  test('settle at 6 mares of 10, with a growth rate of exactly 1', () => {
    const path = pathOf(compiled).map(([, mares, , stallions]) => [mares!, stallions!] as const);
    const [mares, stallions] = path.at(-1)!;
    expect(Math.abs(mares / (mares + stallions) - 0.6)).toBeLessThan(1e-9);
    expect(Math.abs(path.at(-1)![0] / path.at(-2)![0] - 1)).toBeLessThan(1e-9);
  });

  test('have that growth rate near zero in the block matrix, too', () => {
    expect(Math.abs(leadingOf(compiled).growthRate - 1)).toBeLessThan(1e-9);
  });
});

describe('the mating functions', () => {
  // derived by hand: 10 mares with 2 young each.
  test.each([
    ['form: female-dominant', 10, 20],
    ['form: harmonic mean, males: [stallion]', 10, 20],
    ['form: harmonic mean, males: [stallion], females-per-male: 4', 10, 32],
    ['form: harmonic mean, males: [stallion]', 0, 0],
    ['form: minimum, males: [stallion], females-per-male: 3', 2, 12],
    ['form: minimum, males: [stallion], females-per-male: 3', 10, 20],
    ['form: minimum, males: [stallion]', 0, 0],
    ['form: female-dominant', 0, 20],
  ])('%s with %i stallions: %f young', (mating, stallions, young) => {
    const text = twoSexes(mating, { births: '2', years: 1 }).replace(
      'stallion: 10 }',
      `stallion: ${String(stallions)} }`,
    );
    const [filly, mares, colt, males] = pathOf(compileText(text))[1]!;
    expect(
      largestDifference([filly!, mares!, colt!, males!], [0, 8 + young / 2, 0, stallions * 0.7 + young / 2]),
    ).toBeLessThan(1e-12);
  });

  test('with whole animals have the same mean', () => {
    const text = twoSexes('form: harmonic mean, males: [stallion], females-per-male: 4', { births: '2', years: 1 });
    const { mean, sd } = runModel(compileText(text, { replicates: 4000 })).abundance.whole[1]!;
    expect(Math.abs(mean - (8 + 7 + 32))).toBeLessThan((6 * sd) / Math.sqrt(4000));
  });
});

describe('what is said of the sexes', () => {
  const text = twoSexes('form: minimum, males: [stallion]');

  test.each([
    ['both must be counted', text.replace('both sexes', 'females')],
    ['names are of one sex', text.replace('[colt, stallion]', '[filly, stallion]').replace('colt: 1, ', '')],
    ['how many young are females', text.replace(', female-share: 0.5', '')],
    ['mating must be said', text.replace('mating: { form: minimum, males: [stallion] }\n', '')],
    ['which males mate', text.replace(', males: [stallion]', '')],
    ['mares are no males', text.replace('males: [stallion]', 'males: [mare]')],
    ['stallions bear no young', text.replace('births: { mare', 'births: { stallion')],
    ['young enter their own first class', text.replace('female-share: 0.5', 'female-share: 0.5, into: mare')],
    ['one sex needs no mating', text.replace(/classes: .*\n/u, 'classes: [filly, mare, colt, stallion]\n')],
  ])('%s', (_, wrong) => {
    expect(errorsOf(wrong)).toContain('sexes-shape');
  });

  test('each sex may have an end of its own', () => {
    const { phases } = compileText(
      text.replace('oldest: open-ended', 'oldest: { females: open-ended, males: terminal }'),
    ).model;
    const ageing = phases.find((phase) => phase.kind === 'ageing')!;
    expect(Array.from(ageing.kind === 'ageing' ? ageing.next : [])).toEqual([1, 1, 3, -1]);
  });

  test('a capacity is solved at the make-up at which the patch stands still', () => {
    const crowded = twoSexes('form: minimum, males: [stallion], females-per-male: 1', {
      births: '1.4',
      years: 400,
    }).replace(
      'start:',
      'crowding: { form: beverton-holt, changes: { survival: [filly, colt] }, counted: [mare, stallion], capacity: 50 }\nstart:',
    );
    const [, mares, , stallions] = pathOf(compileText(crowded)).at(-1)!;
    expect(Math.abs(mares! + stallions! - 50)).toBeLessThan(1e-6);
  });
});
