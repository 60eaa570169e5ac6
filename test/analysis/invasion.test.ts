// The matrix that a few newcomers grow by, wherever the matrix of the analysis itself is taken.
import { describe, expect, test } from 'vitest';
import { analyseModel } from '../../src/analysis/analyse-model.ts';
import { analysisText } from '../../src/report/analysis/analysis-text.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { compileModel } from '../golden/models.ts';
import { framed } from '../pipeline/frame.ts';

const crowded = framed(
  `classes: [young, adult]
demography: { fates: [[0, 0], [0.3, 0.8]], births: [[0, 1.2], [0, 0]] }
year: [count, demography]
crowding: { form: beverton-holt, changes: { births: [adult] }, counted: [adult], capacity: 40 }
start: { table: { Meadow: { adult: 10 } } }
`,
);

const analysed = (text: string, at: 'zero' | 'equilibrium' | 'start' = 'zero') =>
  analyseModel(compileText(text), { at }).value!;
const valuesOf = ({ invasion }: ReturnType<typeof analysed>) =>
  invasion!.entries.map(({ from, to, value }) => [from.class, to.class, value]);

describe('two stages with crowded births (derived: λ² = 0.8 λ + 0.36)', () => {
  test.each(['zero', 'start', 'equilibrium'] as const)('at %s it is the same matrix, without crowding', (at) => {
    const found = analysed(crowded, at);
    expect(valuesOf(found)).toEqual([
      ['young', 'adult', 0.3],
      ['adult', 'young', 1.2],
      ['adult', 'adult', 0.8],
    ]);
    expect(found.invasion!.growthRate).toBeCloseTo(1.1211102550927978, 12);
    expect(found.invasion!.factors).toEqual([{ crowding: 'crowding', least: 1, most: 1 }]);
    const shares = found.invasion!.makeUp!.map(({ share }) => share);
    expect(shares[0]! / shares[1]!).toBeCloseTo(1.2 / 1.1211102550927978, 12);
  });

  test('the analysed matrix is another one where numbers stand still', () => {
    const births = analysed(crowded, 'equilibrium').entries!.find(({ to }) => to.class === 'young')!;
    // 0.3 f = 0.2.
    expect(births.value).toBeCloseTo(2 / 3, 9);
  });

  test('in words', () => {
    const text = analysisText(analysed(crowded, 'equilibrium'), { colour: false, width: 100 });
    expect(text).toMatch(/A few newcomers, where nobody is: their number grows by 12.1 % a year/);
    expect(text).toMatch(/the species can come in/);
    expect(text).toContain('Among so few, crowding takes nothing from the rates it acts on.');
  });
});

test('where chance leads the other way the text does not promise that they can come in', () => {
  const found = analyseModel(compileModel('dry-springs'), { at: 'zero' }).value!;
  expect(found.invasion!.growthRate).toBeGreaterThan(1);
  const text = analysisText(found, { colour: false, width: 1000 }).replaceAll(/\s+/g, ' ');
  expect(text).toContain('so most that come in die out');
  expect(text).not.toContain('the species can come in');
});

test('an Allee factor leaves nothing near zero: 0.8 is what survival alone makes of a few (derived)', () => {
  const found = analysed(
    crowded.replace(
      'start:',
      'mates: { kind: crowding, form: allee, changes: { births: [adult] }, counted: [adult], allee-half: 1 }\nstart:',
    ),
    'start',
  );
  expect(found.invasion!.growthRate).toBeCloseTo(0.8, 12);
  expect(found.invasion!.factors).toEqual([
    { crowding: 'crowding', least: 1, most: 1 },
    { crowding: 'mates', least: 0, most: 0 },
  ]);
  expect(analysisText(found, { colour: false, width: 100 })).toMatch(/so a few die out by\s+themselves/);
});

// Derived: harmonic mean with one class of each sex; see the closed form of the growth of two sexes.
test('with two sexes it is that of the make-up of few, and births of both sexes are those of that make-up', () => {
  const found = analysed(
    `skein: 1
study: { title: Pairs }
years: 5
patches: [{ name: A }]
counts: both sexes
classes: { females: [girl, woman], males: [boy, man] }
oldest: { females: open-ended, males: open-ended }
survival: { girl: 1, woman: 0.8, boy: 1, man: 0.7 }
births: { woman: 0.5, female-share: 0.5 }
mating: { form: harmonic mean, males: [man], females-per-male: 1 }
year: [count, breeding, survival, ageing]
crowding: { form: ricker, changes: { survival: [girl, boy] }, counted: [woman, man], capacity: 40, where-declining: none }
start: { table: { A: { woman: 10, man: 10 } } }
`,
    'start',
  );
  expect(found.invasion!.growthRate).toBeCloseTo(1, 9);
  expect(found.invasion!.makeUp!.map(({ share }) => share)).toEqual([expect.closeTo(0.6, 8), expect.closeTo(0.4, 8)]);
});

test('patches in which a few last by themselves are told apart', () => {
  const found = analysed(
    framed(
      `classes: [animal]
oldest: open-ended
survival: { animal: [0.9, 0.5] }
births: { animal: 0.4 }
year: [count, breeding, survival, flight]
flight: { kind: dispersal, classes: [animal], shares: { Good: { Poor: 0.1 } } }
crowding: { form: ricker, changes: { survival: [animal] }, counted: [animal], capacity: 50, where-declining: none }
start: { table: { Good: { animal: 10 }, Poor: { animal: 10 } } }
`,
      { patches: '[{ name: Good, keep: 0.9 }, { name: Poor, keep: 0.5 }]' },
    ).replace('[0.9, 0.5]', 'keep'),
    'start',
  );
  expect(found.invasion!.patches).toEqual([
    { patch: 'Good', growthAlone: expect.closeTo(1.4 * 0.9 * 0.9, 12) },
    { patch: 'Poor', growthAlone: expect.closeTo(1.4 * 0.5, 12) },
  ]);
  expect(analysisText(found, { colour: false, width: 100 })).toContain('a few would increase in mean years in Good');
});

test('where nothing depends on numbers there is no other matrix, and it says so', () => {
  const text = crowded
    .split('\n')
    .filter((line) => !line.startsWith('crowding'))
    .join('\n');
  const found = analysed(text);
  expect(found.invasion).toBeNull();
  expect(found.reasons['invasion']).toMatch(/by the same matrix/);
});
