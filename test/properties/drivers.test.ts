// Rates that read drivers or the year and vary by chance as well, and drivers whose years are drawn. Bounds are 5.8 standard errors.
import { expect, test } from 'vitest';
import { modelYears } from '../../src/analysis/chance/model-years.ts';
import { runYear } from '../../src/compile/year-map.ts';
import { compileText, tryText } from '../pipeline/compile-text.ts';
import { correlationOf, meanOf, runWeather, sdOf } from './weather.ts';

const replicates = 40_000;
const rain = [0.6, 1.0, 1.3, 0.9];

interface Parts {
  readonly survival?: string;
  readonly births?: string;
  readonly future?: string;
  readonly variation?: string;
  readonly rest?: string;
  readonly values?: string;
}

function text({ survival = '0.5', births = '2', future = 'repeat', variation = '', rest = '', values }: Parts): string {
  const series = (name: string, by: number) =>
    `    ${name}: { ${rain.map((one, i) => `${2020 + i}: ${one * by}`).join(', ')} }`;
  return `skein: 1
study: { title: Drivers }
first-year: 2027
years: 6
patches:
  - { name: A, depth: 1 }
  - { name: B, depth: 2 }
counts: females
classes: [adult]
oldest: open-ended
parameters: { s: 0.5 }
drivers:
  values:
${values ?? `${series('rain', 1)}\n${series('snow', 10)}`}
  future: ${future}
survival: { adult: "${survival}" }
births: { adult: "${births}" }
year: [count, breeding, survival, ageing]
start: { table: { A: { adult: 100 }, B: { adult: 100 } } }
${variation === '' ? '' : `variation:\n${variation}\n`}${rest}`;
}

function expectMean(values: Float64Array, mean: number): void {
  expect(Math.abs(meanOf(values) - mean)).toBeLessThan((5.8 * sdOf(values)) / Math.sqrt(values.length) + 1e-12);
}

test('a varied parameter times a driver of the calendar has in each year the mean and the SD times the driver', () => {
  const compiled = compileText(text({ survival: 's * rain', variation: '  s: { sd: 0.05 }\n  between-patches: 0' }));
  const weather = runWeather(compiled, replicates, 6);
  for (const [step, drop] of [0.6, 1, 1.3, 0.9, 0.6, 1].entries()) {
    const factors = weather.ofResponse('survival of adult', 'A', step + 1);
    const rates = factors.map((one) => one * 0.5 * drop);
    expectMean(rates, 0.5 * drop);
    expect(Math.abs(sdOf(rates) / (0.05 * drop) - 1)).toBeLessThan(5.8 / Math.sqrt(2 * replicates));
  }
});

test('a rate that varies by itself keeps its SD while its mean follows year and driver; a cv goes with the mean', () => {
  const survival = '0.4 * rain + 0.01 * (year - 2027)';
  for (const [how, sdAt] of [
    ['sd: 0.06', () => 0.06],
    ['cv: 10 %', (mean: number) => 0.1 * mean],
  ] as const) {
    const compiled = compileText(
      text({ survival, variation: `  survival: { adult: { ${how} } }\n  between-patches: 0` }),
    );
    const { varied } = compiled.model.variation!;
    const weather = runWeather(compiled, replicates, 6);
    for (let step = 1; step <= 6; step++) {
      const mean = 0.4 * rain[(step - 1) % 4]! + 0.01 * (step - 1);
      const first = varied[0]!.mean.epochs[0]![1]!;
      // The helper gives values on the scale of the first year.
      const rates = weather.of('survival of adult', 'B', step).map((one) => (one * mean) / first);
      expectMean(rates, mean);
      const squares = rates.map((one) => (one - mean) ** 2);
      expect(Math.abs(meanOf(squares) - sdAt(mean) ** 2)).toBeLessThan((5.8 * sdOf(squares)) / Math.sqrt(replicates));
    }
  }
});

test('drawn years: each given year with the same chance, one for all drivers and patches, and independent in time', () => {
  const compiled = compileText(text({ survival: 'rain / 2', births: 'snow / 5', future: 'resample-years' }));
  const weather = runWeather(compiled, replicates, 3);
  const base = meanOf(Float64Array.from(rain)) / 2;
  const of = (step: number, patch = 'A') => weather.ofResponse('survival of adult', patch, step).map((x) => x * base);
  for (let step = 1; step <= 3; step++) {
    const values = of(step);
    for (const one of rain) {
      const share = values.filter((value) => Math.abs(value - one / 2) < 1e-12).length / replicates;
      expect(Math.abs(share - 0.25)).toBeLessThan(5.8 * Math.sqrt((0.25 * 0.75) / replicates));
    }
    expect(of(step, 'B')).toEqual(values);
    const births = weather.ofResponse('births of adult', 'B', step);
    births.forEach((factor, r) => expect(factor * 4 * base).toBeCloseTo(4 * values[r]!, 10));
  }
  expect(Math.abs(correlationOf(of(1), of(2)))).toBeLessThan(5.8 / Math.sqrt(replicates));
  expect(Math.abs(correlationOf(of(1), of(3)))).toBeLessThan(5.8 / Math.sqrt(replicates));
});

test('the map takes the mean of the expression over the given years, not the expression at the mean driver', () => {
  const compiled = compileText(text({ survival: '0.4', births: 'rain ^ 2 * depth', future: 'resample-years' }));
  const square = rain.reduce((sum, one) => sum + one * one, 0) / 4;
  const after = (start: Float64Array): Float64Array => runYear(compiled, start).after;
  expect([after(Float64Array.of(1, 0))[0], after(Float64Array.of(0, 1))[1]]).toEqual([
    expect.closeTo(0.4 * (1 + square), 12),
    expect.closeTo(0.4 * (1 + 2 * square), 12),
  ]);
});

test('what varies beside drawn years leaves them as they were, and a further driver moves none', () => {
  const alone = compileText(text({ births: 'rain', future: 'resample-years' }));
  const beside = compileText(
    text({
      births: 'rain',
      future: 'resample-years',
      values: `    aaa: { ${rain.map((_, i) => `${2020 + i}: 1`).join(', ')} }\n    rain: { ${rain.map((one, i) => `${2020 + i}: ${one}`).join(', ')} }`,
      variation: '  survival: { adult: { sd: 0.1 } }\n  between-patches: 0.5',
    }),
  );
  const [a, b] = [runWeather(alone, 160, 6), runWeather(beside, 160, 6)];
  for (let step = 1; step <= 6; step++)
    expect(b.ofResponse('births of adult', 'A', step)).toEqual(a.ofResponse('births of adult', 'A', step));
});

test.each([
  ['a drawn driver in an SD', {}, 'varies-elsewhere'],
  ['a drawn driver behind a parameter that varies', {}, 'varies-elsewhere'],
  ['a drawn driver in a rate that varies', { survival: 'rain / 2' }, 'varied-twice'],
  ['a rate above 1 in a given year', { survival: 'rain * 0.8' }, 'impossible-variation'],
  ['a driver with a year missing', { values: '    rain: { 2020: 1, 2021: 1 }\n    snow: { 2020: 1 }' }, 'driver-years'],
] as const)('%s is refused', (what, parts, code) => {
  const variation = what.includes('rate that varies')
    ? '  survival: { adult: { sd: 0.05 } }\n  between-patches: 0'
    : '';
  let wrong = text({ future: 'resample-years', variation, ...parts });
  if (what.includes('SD')) wrong += 'variation: { survival: { adult: { sd: 0.1 * rain } }, between-patches: 0 }\n';
  if (what.includes('behind')) {
    wrong = wrong.replace('s: 0.5', 's: 0.5 * rain') + 'variation: { s: { sd: 0.01 }, between-patches: 0 }\n';
  }
  const codes = tryText(wrong).diagnostics.flatMap((one) => (one.severity === 'error' ? [one.code] : []));
  expect(codes).toContain(code);
});

test('a rate that is 0 at the means and above it in other years is refused, since it is scaled from its mean', () => {
  const { diagnostics } = tryText(
    text({ births: 'max(0, s - 0.5)', variation: '  s: { sd: 0.1 }\n  between-patches: 0' }),
  );
  expect(diagnostics.map(({ message }) => message)).toContain(
    'In a rare year births of adult in A is not possible: it is 0 at the means, and above it in other years',
  );
});

test('growth where years differ reads the driver of the first year', () => {
  const variation = '  s: { sd: 0.05 }\n  between-patches: 0.5';
  const alone = (survival: string): string =>
    text({ survival, variation }).replace('  - { name: B, depth: 2 }\n', '').replace(', B: { adult: 100 }', '');
  const [driven, plain] = ['s * rain', 's * 0.6'].map((one) => modelYears(compileText(alone(one))).value);
  expect(driven).not.toBeNull();
  expect(driven!.logGrowth).toBeCloseTo(plain!.logGrowth, 12);
});
