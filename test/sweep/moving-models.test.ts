// Where only rates move, a point is not compiled from its text: the image must be the compiler's own, to the last byte.
import { readdirSync, readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { compileSpec } from '../../src/pipeline.ts';
import { readSpec } from '../../src/spec/read.ts';
import type { Spec } from '../../src/spec/schema/spec.ts';
import type { Factor } from '../../src/sweep/design/factor.ts';
import { openChange } from '../../src/sweep/point/change.ts';
import { placesIn } from '../../src/sweep/places.ts';
import { movingModel } from '../../src/sweep/point/moving-model.ts';

function specOf(text: string): Spec {
  return readSpec(text, 'model.yaml').document!.spec;
}

function numberOf(spec: Spec, name: string): number {
  const written = spec.parameters![name];
  return Number(typeof written === 'object' ? written.value : written);
}

function factorsOf(spec: Spec, names: readonly string[]): readonly Factor[] {
  const places = new Map(placesIn(spec).map(({ name, value }) => [name, value] as const));
  return names.map((name) => {
    const base = places.has(name) ? Number(places.get(name)) : numberOf(spec, name);
    return { name, base, range: { by: 'values', values: [base] } };
  });
}

/** Null where there is no short way; else at how many points it was taken, after every image was held against the compiler's. */
function heldAgainstCompiler(spec: Spec, names: readonly string[], scales: readonly number[]): number | null {
  const factors = factorsOf(spec, names);
  const change = openChange(spec, factors);
  const short = movingModel(change(factors.map(({ base }) => base)), factors);
  if (short === null) return null;
  let taken = 0;
  for (const [round, scale] of scales.entries()) {
    const values = factors.map(({ base }, k) => Number(base) * (k % 2 === round % 2 ? scale : 1));
    const { compiled } = compileSpec(change(values));
    const found = short(values);
    if (found === null) {
      expect(compiled).toBeNull();
      continue;
    }
    expect(Buffer.from(found.image).equals(Buffer.from(compiled!.image))).toBe(true);
    expect(found.coefficients).toEqual(compiled!.coefficients);
    expect(found.startAnimals).toEqual(compiled!.startAnimals);
    expect(found.model.variation).toEqual(compiled!.model.variation);
    taken++;
  }
  return taken;
}

const scales = [1, 0.93, 1.04, 0.5, 1.3, 3];

test('every model, each of its named numbers alone', () => {
  const taken: Record<string, string[]> = {};
  for (const file of readdirSync('models').filter((name) => name.endsWith('.yaml'))) {
    const text = readFileSync(`models/${file}`, 'utf8');
    // Files of data move no rates.
    if (/\.(csv|geojson)$/mu.test(text)) continue;
    const spec = specOf(text);
    for (const name of Object.keys(spec.parameters ?? {})) {
      if (!(numberOf(spec, name) > 0)) continue;
      if ((heldAgainstCompiler(spec, [name], scales) ?? 0) > 1) (taken[file] ??= []).push(name);
    }
  }
  // With weather and a catastrophe; with stages of a fixed duration; with a start that is spread over all.
  expect(taken).toMatchObject({
    'reed-hare.yaml': expect.arrayContaining(['adult_survival', 'newborn_survival', 'litter', 'natal_leaving']),
    'tortoise-sites.yaml': expect.any(Array),
    'survival-and-leaving.yaml': ['adult_survival', 'leaving_share', 'young_survival'],
  });
});

test('every model, each of its numbers at a place alone', () => {
  const taken = new Set<string>();
  for (const file of readdirSync('models').filter((name) => name.endsWith('.yaml'))) {
    const text = readFileSync(`models/${file}`, 'utf8');
    if (/\.(csv|geojson)$/mu.test(text)) continue;
    const spec = specOf(text);
    for (const { name, value } of placesIn(spec)) {
      const [kind = ''] = name.split('.');
      if (typeof value !== 'number' || !(value > 0) || ['patches', 'start', 'money'].includes(kind)) continue;
      if ((heldAgainstCompiler(spec, [name], [1, 0.9, 1.1]) ?? 0) > 0) taken.add(kind);
    }
  }
  expect([...taken]).toEqual(expect.arrayContaining(['survival', 'births', 'in']));
});

const pair = `skein: 1
study: { title: Two woods }
years: 5
position: plane
unit: km
patches: [{ name: A, at: [0, 0], capacity: 40 }, { name: B, at: [2, 0], capacity: 20 }]
counts: females
classes: [young, adult]
oldest: open-ended
parameters: { lives: 0.8, breeds: 1.4, leaves: 0.2 }
survival: { young: 0.5 * lives, adult: lives }
births: { adult: breeds }
year: [count, breeding, survival, going, ageing]
going:
  kind: dispersal
  classes: [young]
  leaving: leaves
  kernel: { shape: exponential, mean: 1 km }
  leavers: all arrive
crowding: { form: ricker, changes: { survival: [young] }, counted: [adult], capacity: capacity, where-declining: ceiling }
start: { total: 50, spread: stable over all }
`;

test.each([
  [
    'shares that vary in proportion',
    'variation: { survival: { adult: { cv: 0.1 } }, between-patches: 0.5 }',
    ['lives'],
  ],
  ['births that vary', 'variation: { births: { adult: { sd: 0.3, shape: gamma } }, between-patches: 0.5 }', ['breeds']],
  [
    'leavers that vary',
    'variation: { going: { young: { sd: 0.05, shape: logit-normal } }, between-patches: 0 }',
    ['leaves'],
  ],
  [
    'a good year that multiplies survival, at some points beyond 1',
    'mast: { kind: catastrophe, chance: 0.1 per landscape, reach: everywhere, multiplies: { survival: { adult: 1.2 } } }',
    ['lives', 'breeds'],
  ],
  [
    'a spread too wide for some means',
    'variation: { survival: { adult: { sd: 0.38 } }, between-patches: 1 }',
    ['lives', 'leaves'],
  ],
])('%s', (_, more, names) => {
  expect(heldAgainstCompiler(specOf(`${pair}${more}\n`), names, scales)).toBeGreaterThan(1);
});

test.each([
  ['a parameter that varies itself', 'variation: { lives: { sd: 0.05 }, between-patches: 0.5 }', ['lives']],
  [
    'a catastrophe that is as strong as a number says',
    'storm: { kind: catastrophe, chance: 0.1 per landscape, reach: everywhere, multiplies: { survival: { adult: lives } } }',
    ['lives'],
  ],
  [
    'an SD that a number says',
    'variation: { survival: { adult: { sd: lives / 10 } }, between-patches: 0.5 }',
    ['lives'],
  ],
])('what is no plain rate is left to the compiler: %s', (_, more, names) => {
  expect(heldAgainstCompiler(specOf(`${pair}${more}\n`), names, scales)).toBeNull();
});
