// Published matrices written as `demography`: the block matrix is the published one, and its growth, its stable structure and
// its path come out of the whole pipeline.
import { describe, expect, test } from 'vitest';
import { bernardelli, killerWhale, loggerhead, teasel, twoStage, williamson } from '../numeric/published.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { framed, rowsText } from '../pipeline/frame.ts';
import { blockRows, largestDifference, leadingOf, pathOf } from '../pipeline/measure.ts';

type Rows = readonly (readonly number[])[];

interface Published {
  readonly classes: string;
  readonly rows: Rows;
  /** Which entries are young; the others are fates. */
  readonly isYoung: (row: number, column: number) => boolean;
  /** Animals of each class at the start. */
  readonly start?: string;
}

function specOf({ classes, rows, isYoung, start = 'first: 10' }: Published): string {
  const part = (young: boolean): string =>
    rowsText(rows.map((row, i) => row.map((value, j) => (isYoung(i, j) === young ? value : 0))));
  return framed(`classes: ${classes}
demography:
  fates: ${part(false)}
  births: ${part(true)}
year: [count, demography]
start: { table: { Meadow: { ${start} } } }
`);
}

const inFirstRow = (row: number): boolean => row === 0;

const turtle = {
  classes: '[first, small juvenile, large juvenile, subadult, novice, remigrant, mature]',
  rows: loggerhead,
  isYoung: inFirstRow,
};

describe('loggerhead turtle (Crouse, Crowder & Caswell 1987; entries from a university worksheet, digits recomputed)', () => {
  const compiled = compileText(specOf(turtle));
  const { growthRate, right, left } = leadingOf(compiled);

  test('the block matrix is the published matrix', () => {
    expect(blockRows(compiled)).toEqual(loggerhead);
  });

  test('declines to 0.945 of itself a year', () => {
    expect(growthRate).toBeCloseTo(0.94503098, 8);
    expect(Math.log(growthRate)).toBeCloseTo(-0.05653757, 7);
  });

  test('stable structure in percent and reproductive values', () => {
    const percent = right!.map((share) => share * 100);
    const shares = [20.650484, 66.975032, 11.45997, 0.662371, 0.036307, 0.031084, 0.184751];
    expect(largestDifference(percent, shares)).toBeLessThan(6e-7);
    const values = [1, 1.400668, 5.995523, 115.844511, 568.780852, 507.37304, 587.669314];
    expect(largestDifference(left!, values)).toBeLessThan(6e-7);
  });
});

describe('killer whale (Brault & Caswell 1993; entries from a university worksheet, digits recomputed)', () => {
  const whale = { classes: '[first, juvenile, mature, past breeding]', rows: killerWhale, isYoung: inFirstRow };
  const compiled = compileText(specOf(whale));
  const found = leadingOf(compiled);

  test('the block matrix is the published matrix', () => {
    expect(blockRows(compiled)).toEqual(killerWhale);
  });

  test('grows by 2.5 % a year; those past breeding have no reproductive value', () => {
    expect(found.growthRate).toBeCloseTo(1.02544133, 8);
    expect(largestDifference(found.right!, [0.036972, 0.316071, 0.32291, 0.324047])).toBeLessThan(6e-7);
    expect(largestDifference(found.left!, [1, 1.049045, 1.57132, 0])).toBeLessThan(6e-7);
    expect(found.irreducible).toBe(false);
  });
});

describe('three ages with a defective second eigenvalue (from memory of Williamson 1959; digits recomputed)', () => {
  const start = 'first: 1, second: 1, third: 1';
  const compiled = compileText(
    specOf({ classes: '[first, second, third]', rows: williamson, isYoung: inFirstRow, start }),
  );

  test('doubles a year, with shares 24 : 4 : 1', () => {
    const { growthRate, right, left } = leadingOf(compiled);
    expect(growthRate).toBeCloseTo(2, 10);
    expect(largestDifference(right!, [24 / 29, 4 / 29, 1 / 29])).toBeLessThan(1e-10);
    expect(largestDifference(left!, [1, 6, 6])).toBeLessThan(1e-9);
  });

  test('the first five counts from one animal of each age', () => {
    const path = pathOf(compiled);
    const wanted = [
      [1, 1, 1],
      [21, 1 / 3, 1 / 2],
      [9, 7, 1 / 6],
      [65, 3, 3.5],
      [69, 65 / 3, 1.5],
      [213, 23, 65 / 6],
    ];
    wanted.forEach((row, t) => expect(largestDifference(path[t]!, row)).toBeLessThan(1e-10));
  });
});

describe('three ages of which the last breeds once and dies (from memory of Bernardelli 1941; A³ = I is derived)', () => {
  const start = 'first: 6, second: 4, third: 3';
  const compiled = compileText(
    specOf({ classes: '[first, second, third]', rows: bernardelli, isYoung: inFirstRow, start }),
  );

  test('returns to where it was every third year', () => {
    const path = pathOf(compiled);
    expect(path[0]).toEqual([6, 4, 3]);
    for (const t of [3, 6, 18]) expect(largestDifference(path[t]!, [6, 4, 3])).toBeLessThan(1e-12);
    expect(largestDifference(path[1]!, [18, 3, 4 / 3])).toBeLessThan(1e-12);
  });

  test('irreducible with period 3 and growth 1', () => {
    const found = leadingOf(compiled);
    expect(found.growthRate).toBeCloseTo(1, 12);
    expect(found).toMatchObject({ irreducible: true, primitive: false, period: 3 });
  });
});

describe('teasel (Werner & Caswell 1977, from memory of Caswell 2001; digits recomputed)', () => {
  const compiled = compileText(
    specOf({
      classes: '[first, dormant 2, small, medium, large, flowering]',
      rows: teasel,
      // Seeds of flowering plants that are dormant or have grown into a rosette within the year.
      isYoung: (_row, column) => column === 5,
    }),
  );

  test('the block matrix is the published matrix, young in four of its rows', () => {
    expect(blockRows(compiled)).toEqual(teasel);
  });

  test('grows by a factor of 2.334 a year', () => {
    const { growthRate, right } = leadingOf(compiled);
    expect(growthRate).toBeCloseTo(2.33388017, 8);
    const shares = [0.63772, 0.263954, 0.012155, 0.069313, 0.012241, 0.004617];
    expect(largestDifference(right!, shares)).toBeLessThan(6e-7);
  });
});

describe('two stages, as a Leslie matrix and entry by entry (derived closed form)', () => {
  const leslie = framed(`classes: [young, adult]
oldest: open-ended
demography: { survival: [0.3, 0.8], fecundity: [0, 1.2] }
year: [count, demography]
start: { total: 100 }
`);

  test('both give the same matrix and λ = (0.8 + √(0.64 + 1.44)) / 2', () => {
    const entries = compileText(specOf({ classes: '[first, adult]', rows: twoStage, isYoung: inFirstRow }));
    const compiled = compileText(leslie);
    expect(blockRows(compiled)).toEqual(twoStage);
    expect(blockRows(entries)).toEqual(twoStage);
    expect(leadingOf(compiled).growthRate).toBeCloseTo((0.8 + Math.sqrt(0.64 + 1.44)) / 2, 12);
  });

  test('a terminal oldest class loses its stay, as written', () => {
    const text = leslie.replace('open-ended', 'terminal').replace('[0.3, 0.8]', '[0.3]');
    expect(blockRows(compileText(text))).toEqual([
      [0, 1.2],
      [0.3, 0],
    ]);
  });
});

test('what a patch does not write of its own matrix, fates or births, is as everywhere', () => {
  const text = (own: string) =>
    framed(
      `classes: [young, old]
demography: { fates: [[0, 0], [0.3, 0.8]], births: [[0, 1.2], [0, 0]] }
in: { B: { demography: { ${own} } } }
year: [count, demography]
start: { total: 50 }
`,
      { patches: '[{ name: A }, { name: B }]' },
    );
  const ofB = (own: string) =>
    blockRows(compileText(text(own)))
      .slice(2)
      .map((row) => row.slice(2));
  expect(ofB('births: [[0, 0.9], [0, 0]]')).toEqual([
    [0, 0.9],
    [0.3, 0.8],
  ]);
  expect(ofB('fates: [[0, 0], [0.2, 0.7]]')).toEqual([
    [0, 1.2],
    [0.2, 0.7],
  ]);
});
