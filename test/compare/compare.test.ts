// Whole comparisons of small plans under common chance.
import { expect, test } from 'vitest';
import { compareSpec } from '../../src/compare/compare-spec.ts';
import { plansOf } from '../../src/compare/plans-of.ts';
import { onlyPlans } from '../../src/spec/plans/scenarios.ts';
import { readSpec } from '../../src/spec/read.ts';
import { comparePlans, type ToCompare } from '../../src/compare/compare.ts';
import type { PlanToRun } from '../../src/compare/plan.ts';
import type { Comparison } from '../../src/compare/results.ts';
import { runPlans } from '../../src/compare/run-plans.ts';
import { runModel } from '../../src/pipeline.ts';
import { fromUnknown } from '../../src/results/draws/intervals.ts';
import { alone } from '../../src/threads/alone.ts';
import { openThreads } from '../../src/threads/threads.ts';
import { planOf } from './plans.ts';

/** Two patches of a hare whose newborn survival a plan raises in one of them. */
function text(inPond: number, more = ''): string {
  return `skein: 1
study: { title: Two ponds }
years: 15
patches: [{ name: Pond, capacity: 30 }, { name: Marsh, capacity: 20 }]
counts: females
classes: [newborn, adult]
oldest: open-ended
survival: { newborn: 0.3, adult: 0.6 }
births: { adult: 2.4, female-share: 0.5 }
in:
  Pond: { survival: { newborn: ${inPond} } }
year: [count, breeding, survival, ageing]
crowding: { form: beverton-holt, changes: { survival: [newborn] }, counted: { adult: 1 }, capacity: capacity, where-declining: ceiling }
start: { table: { Pond: { adult: 12 }, Marsh: { adult: 9 } } }
outcomes:
  few: { of: [adult], below: 6 }
run: { replicates: 600, seed: 11 }
${more}`;
}

const beside = { hash: '0'.repeat(64), moves: [], robustness: [], cautions: [] };

async function compared(plans: readonly PlanToRun[], with_: Partial<ToCompare> = {}): Promise<Comparison> {
  const run = await runPlans(alone, plans);
  return comparePlans({ ...beside, money: { currency: 'crowns', priceYear: null, discount: 0 }, run: run!, ...with_ });
}

const plans = () => [
  planOf({ name: 'as now', text: text(0.3), cost: 0 }),
  planOf({ name: 'fence', text: text(0.36), cost: 1000 }),
  planOf({ name: 'posters', text: text(0.3), cost: 500 }),
];

test('a comparison holds each plan as a run of it alone would', async () => {
  const found = await compared(plans());
  expect(found.scenarios.map(({ name }) => name)).toEqual(['as now', 'fence', 'posters']);
  found.scenarios.forEach(({ outcomes }, i) => {
    const own = runModel(plans()[i]!.compiled).outcomes[0]!;
    expect(outcomes[0]!.probability).toBe(own.ever.probability);
    expect(outcomes[0]!.intervals.runs).toEqual(own.ever.interval);
  });
});

test('differences are those of the same futures, and chances of being best share among all plans', async () => {
  const { differences, best, scenarios } = await compared(plans());
  const fence = differences.find(({ outcome, from, to }) => outcome === 'few' && from === 'as now' && to === 'fence')!;
  expect(fence.estimate).toBeCloseTo(
    scenarios[1]!.outcomes[0]!.probability - scenarios[0]!.outcomes[0]!.probability,
    12,
  );
  expect([fence.toldApart, fence.interval.upper < 0]).toEqual([true, true]);
  expect(fence.futures!.onlyFrom).toBeGreaterThan(fence.futures!.onlyTo);
  for (const outcome of ['few', 'animals at the end', 'cost']) {
    const all = best.filter((one) => one.outcome === outcome).reduce((sum, { probability }) => sum + probability, 0);
    expect(all).toBeCloseTo(1, 9);
  }
});

test('a plan without effect differs by exactly zero, and what it costs buys no reliable gain', async () => {
  const { differences, scenarios, best } = await compared(plans());
  const same = differences.filter(({ from, to, of }) => from === 'as now' && to === 'posters' && of !== 'money');
  expect(same.map(({ outcome }) => outcome)).toEqual(['few', 'animals at the end', 'lowest count']);
  for (const one of same) {
    expect([one.estimate, one.interval.lower, one.interval.upper, one.toldApart]).toEqual([0, 0, 0, false]);
  }
  const [, fence, posters] = scenarios;
  expect(posters!.prices).toEqual([{ outcome: 'few', costPerRisk: null, why: 'no reliable gain' }]);
  expect(fence!.prices[0]!.why).toBe('priced');
  expect(fence!.prices[0]!.costPerRisk!.lower).toBeLessThan(fence!.prices[0]!.costPerRisk!.estimate);
  const of = (name: string) =>
    best.find(({ outcome, scenario }) => outcome === 'few' && scenario === name)!.probability;
  expect(of('posters')).toBe(of('as now'));
  expect([posters!.notBeaten, posters!.beaten.runs]).toEqual([false, 1]);
  expect(scenarios.slice(0, 2).map(({ notBeaten }) => notBeaten)).toEqual([true, true]);
});

test('to be above is what is hoped for: more of it is best, and is what a price is of', async () => {
  const hopeful = (inPond: number): string =>
    text(inPond).replace('few: { of: [adult], below: 6 }', 'many: { of: [adult], above: 30 }');
  const found = await compared([
    planOf({ name: 'as now', text: hopeful(0.3), cost: 0 }),
    planOf({ name: 'fence', text: hopeful(0.36), cost: 1000 }),
    planOf({ name: 'fewer young', text: hopeful(0.24), cost: 500 }),
  ]);
  const [now, fence, fewer] = found.scenarios;
  const chance = (plan: typeof now): number => plan!.outcomes[0]!.probability;
  expect(chance(fence)).toBeGreaterThan(chance(now));
  expect(chance(fewer)).toBeLessThan(chance(now));
  expect(found.objectives[0]).toMatchObject({ name: 'many', better: 'more' });
  expect(found.best.find(({ outcome, scenario }) => outcome === 'many' && scenario === 'fence')!.probability).toBe(1);
  expect(found.statement.plans).toEqual(['fence']);
  expect([fence!.notBeaten, fewer!.notBeaten]).toEqual([true, false]);
  expect(fewer!.prices[0]!.why).toBe('no reliable gain');
  expect(fence!.prices[0]!.costPerRisk!.estimate).toBeCloseTo(1000 / (chance(fence) - chance(now)), 6);
});

test('only the patch in which something is done gains', async () => {
  const { patches } = await compared(plans());
  const of = (patch: string) => patches.find((one) => one.patch === patch && one.scenario === 'fence')!;
  expect(of('Pond').animals.lower).toBeGreaterThan(0);
  expect(of('Marsh').animals).toEqual({ estimate: 0, lower: 0, upper: 0 });
  expect(of('Marsh').everEmpty.before).toBe(of('Marsh').everEmpty.after);
});

test('the statement says what is supported, under which rule, and that nothing unknown was drawn', async () => {
  const { statement } = await compared(plans());
  expect(statement.plans).toEqual(['fence']);
  expect(statement.strength).toBe('limited');
  expect(statement.text).toMatch(/^The results support “fence”: a chance of “few” of .* against .* under “as now”/);
  expect(statement.text).toContain('for 1,000 crowns');
  expect(statement.reservations.join(' ')).toContain('was not drawn');
  expect(statement.rule).toContain('“few”');
});

test('plans that only chance tells apart support nothing', async () => {
  const both = [
    planOf({ name: 'as now', text: text(0.3), cost: 0 }),
    planOf({ name: 'paint', text: text(0.3005), cost: 9 }),
  ];
  const { statement } = await compared(both);
  expect([statement.strength, statement.plans]).toEqual(['none', []]);
  expect(statement.text).toContain('tell no plan apart');
});

test('the order in which plans are listed and the number of threads change no byte', async () => {
  const [now, fence, posters] = plans();
  const there = await compared([now!, fence!, posters!]);
  const back = await compared([now!, posters!, fence!]);
  const byName = (one: Comparison) => one.scenarios.toSorted((a, b) => (a.name < b.name ? -1 : 1));
  expect(byName(back)).toEqual(byName(there));
  const crew = openThreads({ threads: 2 });
  const threaded = await runPlans(crew, plans());
  await crew.close();
  const again = comparePlans({
    ...beside,
    money: { currency: 'crowns', priceYear: null, discount: 0 },
    run: threaded!,
  });
  expect(JSON.stringify(again)).toBe(JSON.stringify(there));
});

test('what was finished when the work is stopped is finished for every plan', async () => {
  const controller = new AbortController();
  const many = plans().map(({ name }, i) => planOf({ name, text: text([0.3, 0.36, 0.3][i]!) }, { replicates: 5000 }));
  const run = await runPlans(alone, many, {
    signal: controller.signal,
    onProgress: (done) => {
      if (done > 5000) controller.abort();
    },
  });
  expect(run!.futures).toBeGreaterThan(0);
  expect(run!.futures).toBeLessThan(5000);
  const fewer = plans().map(({ name }, i) =>
    planOf({ name, text: text([0.3, 0.36, 0.3][i]!) }, { replicates: run!.futures }),
  );
  const whole = await runPlans(alone, fewer);
  expect(run!.runs.map(({ results }) => results)).toEqual(whole!.runs.map(({ results }) => results));
});

test('where what is not known is drawn, the draw is the unit and all plans meet the same draws', async () => {
  const drawn = (survival: string) =>
    text(0.3)
      .replace('adult: 0.6 }\nbirths', `adult: ${survival} }\nbirths`)
      .replace(
        'run: {',
        'parameters:\n  adults: { value: 0.6, uncertainty: { standard-error: 0.02 } }\nrun: { draws: 40,',
      )
      .replace('600', '60');
  const both = [
    planOf({ name: 'as now', text: drawn('adults') }),
    planOf({ name: 'wardens', text: drawn('adults + 0.1') }),
  ];
  const { differences, scenarios, best, draws, statement } = await compared(both, { money: null });
  const few = differences.find(({ outcome }) => outcome === 'few')!;
  expect(few.intervalFromUnknown!.from).toBe('what is not known');
  expect(few.method).toContain('draw as their unit');
  expect(few.toldApart).toBe(true);
  expect(scenarios[1]!.outcomes[0]!.intervals.unknown).not.toBeNull();
  expect(
    best.filter(({ outcome }) => outcome === 'few').reduce((sum, one) => sum + one.probabilityOverDraws!, 0),
  ).toBeCloseTo(1, 9);
  expect(draws).toEqual({ number: 40, failed: 0, replicatesEach: 60 });
  expect(statement.strength).toBe('clear');
  const fewer = both.map(({ name }, p) =>
    planOf({ name, text: drawn(p === 0 ? 'adults' : 'adults + 0.1').replace('draws: 40', 'draws: 10') }),
  );
  const rough = await compared(fewer, { money: null });
  expect(rough.statement.strength).toBe('limited');
  expect(rough.statement.reservations).toEqual([expect.stringMatching(/^What is not known was drawn 10 times only/)]);
  // The ends of the middle 95 % are not seen in ten draws.
  for (const { outcomes } of rough.scenarios)
    expect(outcomes[0]!.intervals).toMatchObject({ unknown: null, noUnknown: 'too few draws' });
  expect(rough.differences.every(({ noUnknown }) => noUnknown === 'too few draws')).toBe(true);
  // What is drawn for another plan is nothing to the one that does not rest on it.
  const known = [planOf({ name: 'as now', text: drawn('0.6') }), both[1]!];
  const half = await compared(known, { money: null });
  expect(half.scenarios[0]!.outcomes[0]!.intervals).toMatchObject({ unknown: null, noUnknown: 'nothing unknown' });
  expect(half.scenarios[1]!.outcomes[0]!.intervals.unknown).not.toBeNull();
  expect(half.differences.find(({ outcome }) => outcome === 'few')!.intervalFromUnknown).not.toBeNull();
});

test('draws that differ by no more than their runs explain are no interval without width', () => {
  const alike = { lower: 0.14, upper: 0.14, level: 0.95, method: '', from: 'what is not known' as const };
  const apart = { ...alike, upper: 0.2 };
  expect(fromUnknown(alike, { draws: 60, enters: true }).noUnknown).toBe('within the noise');
  expect(fromUnknown(apart, { draws: 38, enters: true }).noUnknown).toBe('too few draws');
  expect(fromUnknown(apart, { draws: 39, enters: true })).toEqual({ intervalFromUnknown: apart });
  expect(fromUnknown(apart, { draws: 200, enters: false }).noUnknown).toBe('nothing unknown');
});

test('prices that are ranges are told of: as the range of a cost, of a difference, and of what a chance less costs', async () => {
  const actions = `money: { currency: crowns }
actions:
  fence: { kind: change, in: Pond, rates: { survival: { newborn: { times: 1.3 } } }, cost: { once: [800, 1300] } }
  wall: { kind: change, in: Pond, rates: { survival: { newborn: { times: 1.31 } } }, cost: { once: 1100 } }
scenarios: { fence: [fence], wall: [wall], both: [fence, wall] }
`;
  const { spec } = readSpec(text(0.3, actions), 'ponds.yaml').document!;
  const { comparison } = (await compareSpec(alone, { spec, plans: plansOf(spec).plans! }))!;
  const between = (from: string, to: string) =>
    comparison.differences.find((one) => one.of === 'money' && one.from === from && one.to === to)!;
  expect(comparison.scenarios.map(({ cost }) => [cost!.least, cost!.presentValue, cost!.most])).toEqual([
    [0, 0, 0],
    [800, 1050, 1300],
    [1100, 1100, 1100],
    [1900, 2150, 2400],
  ]);
  expect(between('fence', 'wall')).toMatchObject({
    estimate: 50,
    prices: { lower: -200, upper: 300 },
    toldApart: false,
  });
  // The fence has one price, wherever it is.
  expect(between('fence', 'both')).toMatchObject({ prices: { lower: 1100, upper: 1100 }, toldApart: true });
  expect(between('as now', 'fence')).toMatchObject({ prices: { lower: 800, upper: 1300 }, toldApart: true });
  const risk = comparison.differences.find(({ outcome, to }) => outcome === 'few' && to === 'fence')!;
  const price = comparison.scenarios[1]!.prices[0]!.costPerRisk!;
  expect(price.lower).toBeCloseTo(800 / -risk.interval.lower, 6);
  expect(price.upper).toBeCloseTo(1300 / -risk.interval.upper, 6);
  const two = onlyPlans(spec, new Set(['fence', 'wall']));
  const { statement } = (await compareSpec(alone, { spec: two, plans: plansOf(two).plans! }))!.comparison;
  expect(statement.plans).toEqual(['fence']);
  expect(statement.text).toContain('1,050 crowns (800 to 1,300, as prices are)');
  expect(statement.reservations).toContain('Within the ranges of prices “wall” may cost no more than “fence”.');
});

test('an outcome that no future came to is said to tell nothing', async () => {
  const never = plans().map(({ name }, i) =>
    planOf({ name, text: text([0.3, 0.36, 0.3][i]!).replace('below: 6', 'below: 0.5') }, { years: 1 }),
  );
  const { statement } = await compared(never, { money: null });
  expect(statement.text).toMatch(/^No future of any plan came to “few”, so that it tells nothing.*higher threshold/);
  expect(statement.reservations.join(' ')).not.toContain('told apart');
  expect(statement.strength).toBe('none');
});
