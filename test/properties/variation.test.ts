// Year-to-year variation as the kernel draws it: means and SDs, correlations in space, between rates and in time, and which
// draws a change leaves as they were. Bounds are 5.8 standard errors: 1e-8 a comparison, about 60 comparisons in all.
import { expect, test } from 'vitest';
import { weatherFacts } from '../../src/analysis/weather.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { correlationBound, correlationOf, meanOf, runWeather, sdOf } from './weather.ts';

const replicates = 40_000;

function text(variation: string, { patches = ['A', 'B', 'C'], rates = '' } = {}): string {
  const places = patches.map((name, i) => `  - { name: ${name}, at: [${i * i * 10}, 0], cover: ${1 / (i + 1)} }`);
  return `skein: 1
study: { title: Weather }
years: 40
position: plane
unit: km
patches:
${places.join('\n')}
counts: females
classes: [young, adult]
oldest: open-ended
parameters: { litter: 2, s: 0.5 }
${rates === '' ? 'survival: { young: 0.5, adult: 0.8 }\nbirths: { adult: 2 }' : rates}
year: [count, breeding, survival, ageing]
start: { table: { A: { adult: 1 } } }
variation:
${variation}
`;
}

test.each([
  ['beta', 0.8, 0.1],
  ['beta', 0.8, 0.35],
  ['logit-normal', 0.8, 0.1],
  ['logit-normal', 0.8, 0.3],
])('a %s share with mean %d has the SD %d', (shape, mean, sd) => {
  const compiled = compileText(text(`  survival: { adult: { sd: ${sd}, shape: ${shape} } }\n  between-patches: 0`));
  const values = runWeather(compiled, replicates).of('survival of adult', 'B');
  expectMoments(values, mean, sd);
  expect(Math.max(...values)).toBeLessThanOrEqual(1 + 1e-12);
});

test.each([
  ['lognormal', 2, 0.5],
  ['gamma', 2, 0.5],
  ['gamma', 2, 2],
])('%s young with mean %d have the SD %d', (shape, mean, sd) => {
  const compiled = compileText(text(`  births: { adult: { sd: ${sd}, shape: ${shape} } }\n  between-patches: 0`));
  expectMoments(runWeather(compiled, replicates).of('births of adult', 'C'), mean, sd);
});

function expectMoments(values: Float64Array, mean: number, sd: number): void {
  const n = values.length;
  expect(Math.abs(meanOf(values) - mean)).toBeLessThan((5.8 * sd) / Math.sqrt(n));
  const squares = values.map((value) => (value - mean) ** 2);
  expect(Math.abs(meanOf(squares) - sd * sd)).toBeLessThan((5.8 * sdOf(squares)) / Math.sqrt(n));
}

/** Lognormal numbers on the scale of their normals. */
function logs(values: Float64Array): Float64Array {
  return values.map(Math.log);
}

test('correlations between patches follow distance, those between rates their table, and both together their product', () => {
  const compiled = compileText(
    text(
      `  survival: { young: { sd: 0.2 }, adult: { sd: 0.1 } }
  births: { adult: { sd: 0.8 } }
  between-rates: { survival of adult: { births of adult: 0.6, survival of young: -0.3 } }
  between-patches: { range: 20 km }`,
    ),
  );
  const weather = runWeather(compiled, replicates);
  const births = ['A', 'B', 'C'].map((patch) => logs(weather.of('births of adult', patch)));
  for (const [a, b, km] of [
    [0, 1, 10],
    [0, 2, 40],
    [1, 2, 30],
  ] as const) {
    const r = Math.exp(-km / 20);
    expect(Math.abs(correlationOf(births[a]!, births[b]!) - r)).toBeLessThan(correlationBound(r, replicates));
  }
  const facts = weatherFacts(compiled.model.variation!, compiled.landscape);
  const pair = facts.betweenRates.find(({ names }) => names.join() === 'births of adult,survival of adult')!;
  expect(pair.given).toBe(0.6);
  const [survival, young] = [weather.of('survival of adult', 'A'), weather.of('births of adult', 'A')];
  const seen = correlationOf(survival, young);
  expect(Math.abs(seen - pair.realised)).toBeLessThan(2 * correlationBound(pair.realised, replicates));
  expect(pair.realised).toBeLessThan(0.6);
  const elsewhere = correlationOf(weather.of('survival of adult', 'B'), young);
  const both = pair.realised * Math.exp(-10 / 20);
  expect(Math.abs(elsewhere - both)).toBeLessThan(2 * correlationBound(both, replicates) + 0.01);
});

test('one correlation for all patches, and one for all rates', () => {
  const compiled = compileText(
    text(
      '  births: { adult: { sd: 0.8 } }\n  survival: { adult: { sd: 0.01 } }\n  between-patches: 0.5\n  between-rates: 0.4',
    ),
  );
  const weather = runWeather(compiled, replicates);
  const [a, b, c] = ['A', 'B', 'C'].map((patch) => logs(weather.of('births of adult', patch)));
  for (const [x, y] of [
    [a!, b!],
    [a!, c!],
    [b!, c!],
  ]) {
    expect(Math.abs(correlationOf(x!, y!) - 0.5)).toBeLessThan(correlationBound(0.5, replicates));
  }
  const together = correlationOf(a!, weather.of('survival of adult', 'A'));
  expect(Math.abs(together - 0.4)).toBeLessThan(correlationBound(0.4, replicates) + 0.005);
});

test('all alike or each its own', () => {
  const alike = runWeather(compileText(text('  births: { adult: { sd: 0.8 } }\n  between-patches: 1')), 160);
  expect(alike.of('births of adult', 'A')).toEqual(alike.of('births of adult', 'C'));
  const own = runWeather(compileText(text('  births: { adult: { sd: 0.8 } }\n  between-patches: 0')), replicates);
  const seen = correlationOf(logs(own.of('births of adult', 'A')), logs(own.of('births of adult', 'B')));
  expect(Math.abs(seen)).toBeLessThan(correlationBound(0, replicates));
});

test('carry-over of 0.6 has the whole spread from the first year and a correlation of 0.216 over three (derived: 0.6³)', () => {
  const compiled = compileText(
    text('  births: { adult: { sd: 0.2 } }\n  between-patches: 0.5\n  autocorrelation: 0.6'),
  );
  const weather = runWeather(compiled, replicates, 5);
  const years = [1, 2, 3, 4, 5].map((step) => logs(weather.of('births of adult', 'B', step)));
  const sigma = Math.sqrt(Math.log(1 + 0.01));
  for (const year of years) expect(Math.abs(sdOf(year) / sigma - 1)).toBeLessThan(5.8 / Math.sqrt(2 * replicates));
  for (const [lag, r] of [
    [1, 0.6],
    [2, 0.36],
    [3, 0.216],
  ] as const) {
    expect(Math.abs(correlationOf(years[0]!, years[lag]!) - r)).toBeLessThan(correlationBound(r, replicates));
  }
});

test('a sum of 50 carried-over years has the variance 7.70 (derived: AR(1), 0.6, variance 0.04)', () => {
  const compiled = compileText(
    text('  births: { adult: { sd: 0.2 } }\n  between-patches: 1\n  autocorrelation: 0.6').replace(
      'years: 40',
      'years: 50',
    ),
  );
  const n = 8000;
  const weather = runWeather(compiled, n, 50);
  const sigma = Math.sqrt(Math.log(1 + 0.01));
  const sums = new Float64Array(n);
  for (let step = 1; step <= 50; step++) {
    logs(weather.of('births of adult', 'A', step)).forEach((value, r) => {
      sums[r]! += (0.2 * (value - Math.log(2) + (sigma * sigma) / 2)) / sigma;
    });
  }
  expect(Math.abs(sdOf(sums) ** 2 / 7.7 - 1)).toBeLessThan(5.8 * Math.sqrt(2 / n) + 0.001);
});

const expressions = `survival: { young: "min(0.9 * s * cover, 0.8)", adult: if s > 0.55 then 0.9 else 0.7 }
births: { adult: 0.3 + litter ^ 1.5 / (1 + year * 0) - exp(-litter) }`;

test('a rate that rests on parameters is worked out anew every year, in each patch', () => {
  const compiled = compileText(
    text('  litter: { sd: 0.4 }\n  s: { sd: 0.1 }\n  between-patches: 0.3\n  between-rates: 0.5', {
      rates: expressions,
    }),
  );
  const weather = runWeather(compiled, 320);
  for (const [patch, cover] of [
    ['A', 1],
    ['B', 1 / 2],
    ['C', 1 / 3],
  ] as const) {
    const [s, litter] = [weather.of('s', patch), weather.of('litter', patch)];
    const base = Math.min(0.9 * 0.5 * cover, 0.8);
    weather.ofResponse('survival of young', patch).forEach((value, r) => {
      expect(value * base).toBeCloseTo(Math.min(0.9 * s[r]! * cover, 0.8), 12);
    });
    weather.ofResponse('survival of adult', patch).forEach((value, r) => {
      expect(value * 0.7).toBeCloseTo(s[r]! > 0.55 ? 0.9 : 0.7, 12);
    });
    const young = (x: number): number => 0.3 + x ** 1.5 - Math.exp(-x);
    weather.ofResponse('births of adult', patch).forEach((value, r) => {
      expect(value * young(2)).toBeCloseTo(young(litter[r]!), 11);
    });
  }
});

test('a further patch, a further number that varies and another SD leave all other years as they were', () => {
  const before = runWeather(
    compileText(text('  births: { adult: { sd: 0.8 } }\n  between-patches: 0.4\n  between-rates: 0.2')),
    160,
    3,
  );
  const more = `  births: { adult: { sd: 0.8 } }
  survival: { adult: { sd: 0.1 } }
  between-patches: 0.4
  between-rates: 0.2`;
  const after = runWeather(compileText(text(more, { patches: ['A', 'B', 'C', 'AA'] })), 160, 3);
  for (const step of [1, 2, 3]) {
    for (const patch of ['A', 'B', 'C']) {
      expect(after.of('births of adult', patch, step)).toEqual(before.of('births of adult', patch, step));
    }
  }
});
