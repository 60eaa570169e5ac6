// Growth, worth and sensitivities where births depend on both sexes: one class of each, with a closed form.
import { expect, test } from 'vitest';
import { analyseModel } from '../../src/analysis/analyse-model.ts';
import { compileText } from '../pipeline/compile-text.ts';

const numbers = { sf: 0.8, sm: 0.7, b: 0.5, q: 0.5 };
const text = (form: string, more: object = {}): string => `
skein: 1
study: { title: Pairs, invented: true }
years: 5
patches: [{ name: A }]
counts: both sexes
classes: { females: [girl, woman], males: [boy, man] }
oldest: { females: open-ended, males: open-ended }
parameters: ${JSON.stringify({ ...numbers, h: 1, ...more })}
survival: { girl: 1, woman: sf, boy: 1, man: sm }
births: { woman: b, female-share: q }
mating: { form: ${form}, males: [man], females-per-male: h }
year: [count, breeding, survival, ageing]
start: { table: { A: { woman: 10, man: 10 } } }
`;

function analysed(form: string, more: object = {}) {
  const { value } = analyseModel(compileText(text(form, more)), { at: 'zero' });
  return value!;
}

test('harmonic mean: λ = s_f + 2bq(1 − x) with x = q + (s_f − s_m)/(2b) of females, and its slopes (derived)', () => {
  const found = analysed('harmonic mean');
  const slopes = new Map(found.parameters!.map(({ name, sensitivity, exact }) => [name, { sensitivity, exact }]));
  expect(found.growthRate).toBeCloseTo(1, 10);
  expect(found.stableDistribution!.map(({ share }) => share)).toEqual([expect.closeTo(0.6, 9), expect.closeTo(0.4, 9)]);
  // ∂λ/∂s_f = 1 − q, ∂λ/∂s_m = q, ∂λ/∂b = 2q(1 − x) + q(s_f − s_m)/b.
  for (const [name, slope] of Object.entries({ sf: 0.5, sm: 0.5, b: 0.5 })) {
    expect(slopes.get(name)!.sensitivity).toBeCloseTo(slope, 9);
    expect(slopes.get(name)!.exact).toBe(true);
  }
});

test('a male is worth something where females need him, and nothing where they do not', () => {
  const worth = (form: string) => analysed(form).reproductiveValue!.find((one) => one.class === 'man')!.value;
  expect(worth('harmonic mean')).toBeGreaterThan(0.1);
  expect(worth('female-dominant')).toBe(0);
});

test.each(['harmonic mean', 'minimum', 'female-dominant'])('%s: slopes are those of the growth itself', (form) => {
  const few = { h: 0.9, q: 0.6 };
  const { parameters, cautions } = analysed(form, few);
  for (const { name, value, sensitivity } of parameters!) {
    const [above, below] = [1e-5, -1e-5].map((step) => analysed(form, { ...few, [name]: value + step }).growthRate);
    expect((above! - below!) / 2e-5, name).toBeCloseTo(sensitivity, 6);
  }
  expect(parameters!.length).toBeGreaterThanOrEqual(3);
  expect(cautions.some((text) => text.includes('both sexes'))).toBe(form !== 'female-dominant');
});
