// Takes, moves and releases, from a spec to paths, runs and what is reported of them (derived by hand).
import { describe, expect, test } from 'vitest';
import { runModel } from '../../src/pipeline.ts';
import { compileText, errorsOf } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';
import { blockRows, largestDifference, pathOf } from '../pipeline/measure.ts';

const herd = (section: string, { years = 3, phase = 'deed' } = {}) =>
  framed(
    `first-year: 2030
classes: [young, adult]
survival: { young: 1, adult: 1 }
year: [${phase}, survival, count]
${section}
start: { table: { A: { young: 12, adult: 30 }, B: { young: 4, adult: 2 } } }
`,
    { patches: '[{ name: A, room: 20 }, { name: B, room: 5 }, { name: C, room: 1 }]', years },
  );

const firstYear = (section: string) => pathOf(compileText(herd(section, { years: 1 })))[1]!;

describe('the path without chance', () => {
  test.each([
    ['deed: { kind: take, classes: all, number: 21, in: A }', [6, 15, 4, 2, 0, 0]],
    ['deed: { kind: take, number: { adult: 10 }, counted: each patch }', [12, 20, 4, 0, 0, 0]],
    ['deed: { kind: take, classes: [adult], number: 8, counted: as a whole }', [12, 22.5, 4, 1.5, 0, 0]],
    ['deed: { kind: take, classes: all, share: 10 %, counted: each patch }', [10.8, 27, 3.6, 1.8, 0, 0]],
    [
      'deed: { kind: take, classes: [adult], share-of-excess: 0.5, over: room, counted: each patch }',
      [12, 25, 4, 2, 0, 0],
    ],
    [
      'deed: { kind: take, classes: [adult], share-of-excess: 0.5, over: 16, counted: as a whole }',
      [12, 22.5, 4, 1.5, 0, 0],
    ],
    [
      'deed: { kind: move, from: A, to: C, number: { adult: 10 }, handling-survival: 0.9, first-year-survival: 0.5 }',
      [12, 20, 4, 2, 0, 4.5],
    ],
    [
      'deed: { kind: move, from: [A, B], to: C, classes: [young], share: 0.5, counted: each patch }',
      [6, 30, 2, 2, 8, 0],
    ],
    ['deed: { kind: take, classes: [adult], number: all, in: A }', [12, 0, 4, 2, 0, 0]],
    ['deed: { kind: take, number: { young: all, adult: all }, counted: each patch }', [0, 0, 0, 0, 0, 0]],
    [
      'deed: { kind: move, from: A, to: C, classes: all, number: 21, handling-survival: { adult: 0.5 }, homing: 0.2 }',
      [6 + 1.2, 15 + 1.5, 4, 2, 4.8, 6],
    ],
    ['deed: { kind: add, in: [B, C], number: { adult: 4 }, first-year-survival: 0.75 }', [12, 30, 4, 5, 0, 3]],
  ])('%s', (section, wanted) => {
    expect(largestDifference(firstYear(section), wanted)).toBeLessThan(1e-12);
  });

  test('does a thing in its years only', () => {
    const years = (written: string) =>
      pathOf(compileText(herd(`deed: { kind: take, number: { adult: 5 }, in: A, years: ${written} }`))).map(
        (row) => row[1]!,
      );
    expect(years('[2031]')).toEqual([30, 30, 25, 25]);
    expect(years('{ from: 2031 }')).toEqual([30, 30, 25, 20]);
    expect(years('{ until: 2031 }')).toEqual([30, 25, 20, 20]);
  });
});

describe('the block matrix near zero', () => {
  test('holds shares, but neither numbers nor releases', () => {
    const of = (section: string) => blockRows(compileText(herd(section)))[1]![1];
    expect(of('deed: { kind: take, share: { adult: 0.2 }, counted: each patch }')).toBe(0.8);
    expect(of('deed: { kind: take, number: { adult: 3 }, counted: each patch }')).toBe(1);
    expect(of('deed: { kind: add, in: A, number: { adult: 3 } }')).toBe(1);
  });
});

describe('what is reported', () => {
  const results = (section: string) => runModel(compileText(herd(section), { replicates: 400 })).handled[0]!;

  test('of a take beyond what there is: shortfall', () => {
    const { byYear, inAll } = results('deed: { kind: take, number: { adult: 12 }, in: A }');
    expect(byYear.map(({ handled }) => handled.mean)).toEqual([12, 12, 6]);
    expect(byYear.map(({ shortfall }) => shortfall.mean)).toEqual([0, 0, 6]);
    expect(byYear.map(({ year }) => year)).toEqual([2030, 2031, 2032]);
    expect([inAll.handled.mean, inAll.shortfall.mean, inAll.died.mean]).toEqual([30, 6, 0]);
  });

  test('of a move: those caught, and those that did not live through it', () => {
    const { does, inAll } = results(
      'deed: { kind: move, from: A, to: C, number: { adult: 10 }, handling-survival: 0.9 }',
    );
    expect(does).toBe('move');
    expect(inAll.handled.mean).toBe(30);
    expect(Math.abs(inAll.died.mean - 3)).toBeLessThan((5 * Math.sqrt(2.7)) / 20);
  });

  test('with a caution of its own', () => {
    const { cautions } = runModel(
      compileText(herd('deed: { kind: add, in: A, number: { adult: 3 } }'), { replicates: 16 }),
    );
    expect(cautions.join(' ')).toMatch(/wildlife authority.*IUCN\/SSC \(2013\)/);
  });
});

test('the luck of a phase stays when a take that takes nobody is added', () => {
  const whole = (section: string, year: string) => {
    const text = herd(section, { phase: year }).replace('adult: 1 }', 'adult: 0.7 }');
    return runModel(compileText(text, { replicates: 64 })).abundance;
  };
  const without = whole('deed: { kind: take, share: { adult: 0.3 }, counted: each patch }', 'deed');
  const nobody =
    'deed: { kind: take, share: { adult: 0.3 }, counted: each patch }\nnone: { kind: take, number: { adult: 0 }, in: A }';
  expect(whole(nobody, 'none, deed')).toEqual(without);
});

describe('mistakes', () => {
  test.each([
    'deed: { kind: take, number: { adult: 3 } }',
    'deed: { kind: take, number: 3, in: A }',
    'deed: { kind: take, classes: [adult], in: A }',
    'deed: { kind: take, classes: [adult], in: A, number: 3, share: 0.1 }',
    'deed: { kind: take, classes: [adult], in: A, share-of-excess: 0.1 }',
    'deed: { kind: take, classes: [adult], in: A, number: 1, over: 3 }',
    'deed: { kind: move, from: [A, B], to: B, number: { adult: 3 }, counted: each patch }',
  ])('%s', (section) => {
    expect(errorsOf(herd(section))).toEqual(['handling-shape']);
  });

  test('attributes of patches cannot be read where all are one', () => {
    const text = 'deed: { kind: take, classes: [adult], share-of-excess: 0.1, over: room, counted: as a whole }';
    expect(errorsOf(herd(text))).toContain('unknown-name');
  });

  test('years must be looked at', () => {
    expect(errorsOf(herd('deed: { kind: take, number: { adult: 3 }, in: A, years: [2029, 2030] }'))).toEqual([
      'year-outside',
    ]);
    expect(errorsOf(herd('deed: { kind: take, number: { adult: 3 }, in: A, years: { from: 2033 } }'))).toEqual([
      'year-outside',
    ]);
  });
});
