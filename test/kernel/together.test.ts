// Images whose batches are run one after the other give what each gives by itself, whether their weather is drawn once or for each.
import { describe, expect, test } from 'vitest';
import { plansOf } from '../../src/compare/plans-of.ts';
import { weatherNumbersOf, weatherSource } from '../../src/compile/image/weather.ts';
import { batchesOf } from '../../src/kernel/batch.ts';
import { openOwnImage } from '../../src/kernel/open.ts';
import { openRunner } from '../../src/kernel/run.ts';
import { togetherOn } from '../../src/kernel/together.ts';
import { compileModel, modelNames, modelText } from '../golden/models.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { compiledOf, fens } from '../plans/landscape.ts';

const batches = batchesOf(37);

function expectAsAlone(
  images: readonly ArrayBuffer[],
  request: { readonly steps: number; readonly seed: number },
): void {
  const run = togetherOn(
    images.map((image) => ({ image, machine: openOwnImage(image) })),
    request,
  );
  const together = batches.map(run);
  images.forEach((image, i) => {
    const alone = batches.map(openRunner(image, request));
    expect(together.map((batch) => batch[i])).toEqual(alone);
  });
}

describe.each(modelNames)('%s', (name) => {
  test('run twice together, and its plans together, give what each gives alone', () => {
    const { spec, image, model } = compileModel(name);
    const { steps, seed } = model;
    const plans = plansOf(spec).plans ?? [];
    expectAsAlone([image, image, ...plans.map(({ compiled }) => compiled.image)], { steps, seed });
  });
});

describe('the weather of two images', () => {
  const source = (deed: string): string => {
    const { image } = compiledOf(fens({ actions: `  deed: ${deed}\n`, scenarios: '  plan: [deed]\n' }), 'plan');
    return weatherSource(image);
  };
  const now = compiledOf(fens({}), 'as now').image;

  test.each([
    '{ kind: change, rates: { survival: { adult: { times: 0.9 } } } }',
    '{ kind: habitat, in: North fen, capacity: { add: 60 }, from: 2040 }',
    '{ kind: move, from: North fen, to: Far pool, number: { adult: 3 }, after: natal, years: [2040, 2041] }',
  ])('is drawn from the same where a plan changes what it meets: %s', (deed) => {
    expect(weatherNumbersOf(now)).toBeGreaterThan(0);
    expect(source(deed)).toBe(weatherSource(now));
  });

  test('is another where there are other patches', () => {
    const deed = '{ kind: habitat, new: { name: A mere, at: [1, 2], area: 40 ha, capacity: 50 }, from: 2040 }';
    expect(source(deed)).not.toBe(weatherSource(now));
  });

  const heath = (from: string, to: string): ArrayBuffer => {
    const text = modelText('heath-fire');
    expect(text).toContain(from);
    return compileText(text.replace(from, to)).image;
  };
  const asItIs = compileModel('heath-fire').image;

  test.each([
    ['multiplies: { births: { adult: 1.6 } }', 'multiplies: { births: { adult: 1.5 } }'],
    ['capacity: { times: 0.4, for: 6 years }', 'capacity: { times: 0.6, for: 6 years }'],
    ['takes: { young: 0.85, adult: 0.75 }', 'takes: { young: 0.5, adult: 0.75 }'],
  ])('is drawn once where a catastrophe only does something else: %s', (from, to) => {
    const other = heath(from, to);
    expect(weatherSource(other)).toBe(weatherSource(asItIs));
    expectAsAlone([asItIs, other], { steps: 50, seed: 3 });
  });

  test.each([
    ['capacity: { times: 0.4, for: 6 years }', 'capacity: { times: 0.4, for: 7 years }'],
    ['wait: 8 years', 'wait: 9 years'],
    ['chance: 0.04 per patch', 'chance: 0.05 per patch'],
    ['chance: 0.04 per patch', 'chance: 0.04 per landscape'],
    ['reach: { radius: 4 km }', 'reach: { radius: 9 km }'],
  ])('is drawn for each where a catastrophe comes otherwise: %s', (from, to) => {
    const other = heath(from, to);
    expect(weatherSource(other)).not.toBe(weatherSource(asItIs));
    expectAsAlone([asItIs, other], { steps: 50, seed: 3 });
  });

  test('is drawn for each where it is carried over otherwise', () => {
    const text = fens({}).replace('between-patches: 0.5', 'between-patches: 0.5\n  autocorrelation: 0.3');
    const other = compileText(text).image;
    expect(weatherSource(other)).not.toBe(weatherSource(now));
    expectAsAlone([other, now, other], { steps: 20, seed: 3 });
  });
});
