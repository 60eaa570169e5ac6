// The curve of freely drifting numbers: what the start counts for, and where there is no such curve and why.
import { describe, expect, test } from 'vitest';
import { analyseModel } from '../../src/analysis/analyse-model.ts';
import { fallingCurve, logDistanceOf } from '../../src/analysis/falling.ts';
import { analysisText } from '../../src/report/analysis/analysis-text.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';
import { compileModel } from '../golden/models.ts';

const analysed = (text: string) => analyseModel(compileText(text), { at: 'zero' }).value!;

test('animals of the start count by their worth: one of (w, v) = ((0.4, 0.6), (1, 2)) (derived)', () => {
  const vectors = { growthRate: 1, right: Float64Array.of(0.4, 0.6), left: Float64Array.of(1, 2) };
  const adults = { counted: Float64Array.of(0, 1), threshold: 3 };
  // Ten young are worth 10 / 1.6 animals made up as w, of which 0.6 are adults.
  expect(logDistanceOf(adults, vectors, Float64Array.of(10, 0))).toBeCloseTo(
    Math.log((10 / 1.6) * 0.6) - Math.log(3),
    12,
  );
  expect(logDistanceOf({ ...adults, counted: Float64Array.of(0, 0) }, vectors, Float64Array.of(10, 0))).toBe(-Infinity);
});

test('the curve never falls, and begins near nothing', () => {
  const curve = [...fallingCurve(30, Math.log(8), { drift: -0.05, variance: 0.02 })];
  expect(curve[0]).toBeLessThan(1e-9);
  curve.slice(1).forEach((value, t) => expect(value).toBeGreaterThanOrEqual(curve[t]!));
  expect(curve.at(-1)).toBeGreaterThan(0.1);
});

describe('two ranges of goats, many enough that luck hardly counts', () => {
  const found = analyseModel(compileModel('drifting'), { at: 'zero' }).value!;

  test('curve and simulated share agree to a few hundredths, and drift is that of the long run', () => {
    expect(found.fallingBelow!.map(({ outcome }) => outcome)).toEqual(['few nannies', 'halved']);
    for (const { years, drift, variance } of found.fallingBelow!) {
      expect(drift).toBe(found.stochasticGrowth!.simulated!.logGrowth);
      expect(variance).toBe(found.stochasticGrowth!.simulated!.yearlyVariance);
      expect(years).toHaveLength(40);
      const last = years.at(-1)!;
      expect(Math.abs(last.diffusion - last.simulated)).toBeLessThan(0.05);
      expect(last.lower).toBeLessThan(last.simulated);
      expect(last.simulated).toBeLessThan(last.upper);
    }
    // What the small-noise approximation says of the variance, within the error of 1600 stretches.
    const { approximation, simulated } = found.stochasticGrowth!;
    expect(Math.abs(simulated!.yearlyVariance / approximation!.yearlyVariance - 1)).toBeLessThan(0.2);
  });

  test('the text tells both', () => {
    expect(analysisText(found, { colour: false, width: 100 })).toMatch(/by +diffusion curve +simulated +95 % band/);
  });
});

const drifting = (more = '', year = '', outcome = 'of: all, below: 20'): string =>
  framed(`classes: [animal]
oldest: open-ended
survival: { animal: 0.8 }
births: { animal: 0.3 }
year: [count, breeding, survival${year}]
${more}
start: { table: { Meadow: { animal: 100 } } }
outcomes: { few: { ${outcome} } }
run: { replicates: 200, seed: 1 }
`);
const varied = 'variation: { survival: { animal: { sd: 0.1 } } }';

test('there is a curve of a model that only drifts', () => {
  expect(analysed(drifting(varied)).fallingBelow).toHaveLength(1);
});

test.each([
  ['no year differs', drifting(), /Nothing differs from year to year/],
  [
    'numbers are held',
    drifting(`${varied}\nfull: { kind: ceiling, counted: all, capacity: 400, takes: at random }`, ', full'),
    /depend on numbers/,
  ],
  [
    'animals are taken by number',
    drifting(`${varied}\nbag: { kind: take, number: { animal: 2 } }`, ', bag'),
    /by number/,
  ],
  [
    'animals are released',
    drifting(`${varied}\ngift: { kind: add, in: Meadow, number: { animal: 2 } }`, ', gift'),
    /by number/,
  ],
  [
    'rates change',
    drifting(varied).replace('births: { animal: 0.3 }', 'births: { animal: { 1: 0.3, 5: 0.2, between: steps } }'),
    /change with the year/,
  ],
  ['only a rise is asked for', drifting(varied, '', 'of: all, above: 200'), /No outcome is that one count falls/],
  ['it must be so for years', drifting(varied, '', 'of: all, below: 20, for: 3'), /No outcome is that one count falls/],
  ['the start is below', drifting(varied, '', 'of: all, below: 120'), /below the number already/],
])('null where %s', (_what, text, reason) => {
  const { fallingBelow, reasons } = analysed(text);
  expect(fallingBelow).toBeNull();
  expect(
    Object.entries(reasons)
      .filter(([field]) => field.startsWith('fallingBelow'))
      .map(([, why]) => why)
      .join(' '),
  ).toMatch(reason);
});
