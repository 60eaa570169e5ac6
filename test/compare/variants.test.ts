// Other sound models: what is different in each, and what an action does by half.
import { describe, expect, test } from 'vitest';
import { withScaledEffects } from '../../src/compare/scaled-effects.ts';
import { variantsOf } from '../../src/compare/variants.ts';
import { compileSpec } from '../../src/pipeline.ts';
import { withScenario } from '../../src/spec/plans/scenarios.ts';
import { readSpec } from '../../src/spec/read.ts';
import type { Spec } from '../../src/spec/schema/spec.ts';

function specOf(actions: string, changes: readonly (readonly [string, string])[] = []): Spec {
  const text = `skein: 1
study: { title: Two ponds }
years: 10
first-year: 2027
position: plane
unit: km
patches:
  - { name: Pond, at: [0, 0], area: 20 ha, capacity: 30 }
  - { name: Marsh, at: [3, 0], area: 30 ha, capacity: 20 }
counts: females
classes: [newborn, adult]
oldest: open-ended
parameters: { brood: 2.4 }
survival: { newborn: 0.3, adult: 0.6 }
births: { adult: brood, female-share: 0.5 }
year: [count, breeding, survival, natal, ageing]
natal: { kind: dispersal, classes: [newborn], leaving: 0.2, kernel: { shape: exponential, mean: 2 km, reach: 9 km }, leavers: all arrive, hazard: 0.1 per km }
crowding: { form: theta, shape-number: 2, changes: { survival: [newborn] }, counted: { adult: 1 }, capacity: capacity, where-declining: ceiling }
variation: { survival: { adult: { sd: 0.05 } }, between-patches: { range: 10 km } }
start: { table: { Pond: { adult: 12 }, Marsh: { adult: 9 } } }
outcomes: { few: { of: [adult], below: 6 } }
actions:
${actions}
scenarios: { plan: [doing] }
`;
  const { document, diagnostics } = readSpec(
    changes.reduce((all, [from, to]) => all.replace(from, to), text),
    'a.yaml',
  );
  if (document === undefined) throw new Error(JSON.stringify(diagnostics));
  return document.spec;
}

const dig = '  doing: { kind: habitat, in: Pond, capacity: { add: 40 }, from: 2029 }';

function imageOf(spec: Spec): ArrayBuffer {
  const { compiled, findings } = compileSpec(withScenario(spec, 'plan'));
  if (compiled === null) throw new Error(JSON.stringify(findings));
  return compiled.image;
}

describe('the variants of a model', () => {
  const variants = variantsOf(specOf(dig));
  const of = (name: string) => variants.find(({ variant }) => variant === name)!;

  test('turn the answer to where leavers end, and compile', () => {
    const natal = of('the other answer to where leavers end').spec!.named['natal'];
    expect(natal).toMatchObject({ leavers: 'may miss' });
    for (const { spec } of variants) expect(compileSpec(spec!).compiled).not.toBeNull();
  });

  test('halve and double the correlation between patches', () => {
    const between = (name: string) => of(name).spec!.variation?.['between-patches'];
    expect(between('half the correlation between patches')).toEqual({ range: '5 km' });
    expect(between('double the correlation between patches')).toEqual({ range: '20 km' });
    const number = variantsOf(specOf(dig, [['{ range: 10 km }', '0.8']]));
    expect(number[2]!.spec!.variation?.['between-patches']).toBe(1);
    const table = variantsOf(specOf(dig, [['{ range: 10 km }', '{ Pond: { Marsh: 0.5 } }']]));
    expect(table[1]!.spec!.variation?.['between-patches']).toEqual({ Pond: { Marsh: 0.25 } });
  });

  test('take another form of crowding and half the threshold', () => {
    const { crowding } = of('another form of crowding').spec!;
    expect([crowding?.form, crowding?.['shape-number']]).toEqual(['beverton-holt', undefined]);
    expect(of('a second threshold').spec!.outcomes?.['few']?.below).toBe(3);
  });

  test('tell why they do not apply', () => {
    const plain = specOf(dig, [
      ['variation: { survival: { adult: { sd: 0.05 } }, between-patches: { range: 10 km } }\n', ''],
      ['few: { of: [adult], below: 6 }', 'few: { of: [adult], fallen-by: 50 % }'],
    ]);
    const why = Object.fromEntries(variantsOf(plain).map(({ variant, notRun }) => [variant, notRun]));
    expect(why['half the correlation between patches']).toContain('no rate varies');
    expect(why['a second threshold']).toContain('no threshold in animals');
    const ends = specOf(dig, [
      ['{ range: 10 km }', '1'],
      ['below: 6', 'below: 1'],
    ]);
    const atEnds = Object.fromEntries(variantsOf(ends).map(({ variant, notRun }) => [variant, notRun]));
    expect(atEnds['half the correlation between patches']).toBeNull();
    expect(atEnds['double the correlation between patches']).toBe('the correlation is 0 or 1, and stays so');
    expect(atEnds['a second threshold']).toBe('“few” is at 1 animal, of which there is no half');
    const without = { ...plain, actions: {}, scenarios: {} };
    expect(variantsOf(without).at(-1)!.notRun).toBe('no plan has an action');
  });
});

describe('half an effect', () => {
  test.each([
    ['an addition', dig, '  doing: { kind: habitat, in: Pond, capacity: { add: 20 }, from: 2029 }'],
    ['a factor', dig.replace('add: 40', 'times: 3'), dig.replace('add: 40', 'times: 2')],
    ['another number', dig.replace('add: 40', 'set: 70'), dig.replace('add: 40', 'set: 50')],
    [
      'a length with a unit',
      '  doing: { kind: link, between: [Pond, Marsh], distance: { set: 1000 m } }',
      '  doing: { kind: link, between: [Pond, Marsh], distance: { set: 2 km } }',
    ],
    [
      'a parameter in percent',
      '  doing: { kind: change, parameters: { brood: { times: 120 % } } }',
      '  doing: { kind: change, parameters: { brood: { times: 1.1 } } }',
    ],
    [
      'a number of animals',
      '  doing: { kind: take, number: { adult: 4 }, in: Pond, before: breeding }',
      '  doing: { kind: take, number: { adult: 2 }, in: Pond, before: breeding }',
    ],
  ])('of %s is that of the half', (_, whole, half) => {
    expect(close(imageOf(withScaledEffects(specOf(whole), 0.5)), imageOf(specOf(half)))).toBe(true);
    expect(close(imageOf(specOf(whole)), imageOf(specOf(half)))).toBe(false);
  });

  test('and none is the model as it is now', () => {
    const spec = specOf(dig);
    const { compiled } = compileSpec(withScenario(spec, 'as now'));
    expect(Buffer.from(imageOf(withScaledEffects(spec, 0))).equals(Buffer.from(compiled!.image))).toBe(true);
  });
});

/** As numbers of eight bytes, up to rounding. */
function close(a: ArrayBuffer, b: ArrayBuffer): boolean {
  if (a.byteLength !== b.byteLength) return false;
  const [left, right] = [new Float64Array(a), new Float64Array(b)];
  return left.every((value, i) => Object.is(value, right[i]) || Math.abs(value - right[i]!) <= 1e-9 * Math.abs(value));
}
