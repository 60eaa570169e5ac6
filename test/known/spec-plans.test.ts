// Plans with answers in closed form.
import { describe, expect, test } from 'vitest';
import { openRunner } from '../../src/kernel/run.ts';
import { compileSpec, type CompiledModel } from '../../src/pipeline.ts';
import { withScenario } from '../../src/spec/plans/scenarios.ts';
import { leadingOf, pathOf } from '../pipeline/measure.ts';
import { specOf } from '../plans/landscape.ts';

function planned(text: string, scenario = 'plan'): CompiledModel {
  const { compiled, findings } = compileSpec(withScenario(specOf(text), scenario));
  if (compiled === null) throw new Error(JSON.stringify(findings, null, 2));
  return compiled;
}

interface Flies {
  readonly births?: string;
  readonly patches?: string;
  readonly year?: string;
  readonly years?: number;
  readonly more?: string;
  readonly start: string;
}

/** Flies that live for one year. */
const flies = ({
  births = '{ fly: 1 }',
  patches = '[{ name: A, capacity: 1000 }]',
  year = 'count, breeding, ageing',
  years = 1,
  more = '',
  start,
}: Flies) => `skein: 1
study: { title: Flies (invented) }
years: ${String(years)}
patches: ${patches}
counts: females
classes: [pupa, fly]
oldest: terminal
births: ${births}
year: [${year}]
start: { table: ${start} }
${more}`;

describe('a corridor between a source and a sink', () => {
  const joined = (share: string, sink: number) =>
    flies({
      patches: '[{ name: A }, { name: B }]',
      year: 'count, breeding, ageing, flight',
      start: '{ A: { fly: 10 } }',
      more: `in: { A: { births: { fly: 1.3 } }, B: { births: { fly: ${String(sink)} } } }
flight: { kind: dispersal, classes: [fly], shares: { A: { B: 0 }, B: { A: 0 } } }
actions: { corridor: { kind: link, between: [A, B], share: { set: ${share} } } }
scenarios: { plan: [corridor] }
`,
    });

  test('ends their growth where 6 of 17 go over, of growth 1.3 and 0.6', () => {
    // Symmetric exchange m of R1 and R2: growth 1 where m (R1 + R2 - 2 R1 R2) = (R1 - 1)(1 - R2). Derived.
    expect(leadingOf(planned(joined('6 / 17', 0.6))).growthRate).toBeCloseTo(1, 10);
    expect(leadingOf(planned(joined('0.3', 0.6))).growthRate).toBeGreaterThan(1);
    expect(leadingOf(planned(joined('0.4', 0.6))).growthRate).toBeLessThan(1);
  });

  test('never raises growth where nobody is lost on the way (Karlin 1982), and is told so by the path', () => {
    // From memory of the closed form: a + sqrt(a^2 - (1 - 2m) R1 R2), a = (1 - m)(R1 + R2) / 2.
    const growth = [0, 0.05, 0.1, 0.2, 0.3, 0.5].map((m) => leadingOf(planned(joined(String(m), 0.8))).growthRate);
    [1.3, 1.240412, 1.1920323, 1.1256571, 1.0874557, 1.05].forEach((wanted, i) =>
      expect(growth[i]).toBeCloseTo(wanted, 6),
    );
  });
});

test('a share of 1 - 1/growth, taken of all, makes growth 1 (derived)', () => {
  const text = (share: string) => `skein: 1
study: { title: A herd (invented) }
years: 1
patches: [{ name: A }]
counts: females
classes: [calf, cow]
oldest: open-ended
survival: { calf: 0.6, cow: 0.9 }
births: { cow: 0.35 }
year: [count, breeding, survival, ageing]
start: { table: { A: { cow: 10 } } }
actions: { bag: { kind: take, share: ${share}, classes: all, after: ageing } }
scenarios: { plan: [bag] }
`;
  const { growthRate } = leadingOf(planned(text('0'), 'as now'));
  expect(growthRate).toBeCloseTo(0.9 + 0.6 * 0.35, 12);
  expect(leadingOf(planned(text(`1 - 1 / ${String(growthRate)}`))).growthRate).toBeCloseTo(1, 12);
});

describe('the largest lasting take of a Beverton-Holt stock', () => {
  // Recruits of S left are R S / (1 + a S), with a = (R - 1) / K. The take R S / (1 + a S) - S is largest where
  // R / (1 + a S)^2 = 1: S = K / (sqrt R + 1), a share of 1 - 1 / sqrt R, and (sqrt R - 1)^2 / a animals. Derived.
  const growth = 2.25;
  const stock = (rule: string) =>
    flies({
      births: `{ fly: ${String(growth)} }`,
      years: 150,
      start: '{ A: { fly: 700 } }',
      more: `crowding: { form: beverton-holt, changes: { births: [fly] }, counted: [fly], capacity: capacity }
actions: { bag: { kind: take, ${rule}, after: ageing } }
scenarios: { plan: [bag] }
`,
    });
  const left = (rule: string): number => pathOf(planned(stock(rule))).at(-1)![1]!;
  const a = (growth - 1) / 1000;
  const taken = (escaped: number): number => (growth * escaped) / (1 + a * escaped) - escaped;

  test('is that of a share of 1 - 1/sqrt R', () => {
    const best = left(`share: { fly: ${String(1 - 1 / Math.sqrt(growth))} }`);
    expect(best).toBeCloseTo(1000 / (Math.sqrt(growth) + 1), 6);
    expect(taken(best)).toBeCloseTo((Math.sqrt(growth) - 1) ** 2 / a, 6);
    for (const share of [0.28, 0.38]) expect(taken(left(`share: { fly: ${String(share)} }`))).toBeLessThan(taken(best));
  });

  test('and of all that exceeds K / (sqrt R + 1)', () => {
    expect(left('classes: [fly], share-of-excess: 1, over: 400')).toBeCloseTo(400, 9);
    expect(taken(400)).toBeCloseTo(200, 9);
  });

  test('a number above it empties the stock', () => {
    expect(left('number: { fly: 199 }')).toBeGreaterThan(400);
    expect(left('number: { fly: 201 }')).toBe(0);
  });
});

test('sharing its futures makes a difference of log numbers 25 times as sharp', () => {
  // Normals of SD 0.20 and 0.15 over 50 years: variance 50 (0.20 - 0.15)^2 = 0.125 where they are shared, and
  // 50 (0.20^2 + 0.15^2) = 3.125 where they are not. Derived.
  const cv = (sd: number): string => String(Math.sqrt(Math.expm1(sd * sd)));
  const text = flies({
    patches: '[{ name: A }]',
    years: 50,
    start: '{ A: { fly: 1000000 } }',
    more: `parameters: { spread: ${cv(0.2)} }
variation: { births: { fly: { cv: spread, shape: lognormal } } }
actions: { calm: { kind: change, parameters: { spread: { set: ${cv(0.15)} } } } }
scenarios: { plan: [calm] }
`,
  });
  const futures = 1024;
  const logs = (scenario: string, seed: number): number[] => {
    const { image, model } = planned(text, scenario);
    const run = openRunner(image, { steps: model.steps, seed });
    return Array.from({ length: futures / 16 }, (_, i) => {
      const { counts } = run({ first: 16 * i, lanes: 16 });
      const columns = counts.length / (51 * 16);
      return [...counts.subarray(50 * columns * 16, 50 * columns * 16 + 16)].map(Math.log);
    }).flat();
  };
  const varianceOf = (a: readonly number[], b: readonly number[]): number => {
    const differences = a.map((value, i) => value - b[i]!);
    const mean = differences.reduce((sum, value) => sum + value, 0) / futures;
    return differences.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (futures - 1);
  };
  const now = logs('as now', 5);
  // A variance of 1024 normals has a relative standard error of 4.4 %: within 5 of them.
  const [shared, apart] = [varianceOf(now, logs('plan', 5)), varianceOf(now, logs('plan', 6))];
  expect(Math.abs(shared / 0.125 - 1)).toBeLessThan(0.22);
  expect(Math.abs(apart / 3.125 - 1)).toBeLessThan(0.22);
});
