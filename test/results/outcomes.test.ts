// What outcomes look at, against the same sums made here; and who comes to them, against a search through all counts.
import { describe, expect, test } from 'vitest';
import { lanes } from '../../assembly/layout.ts';
import { openRunner } from '../../src/kernel/run.ts';
import { summariseOutcome } from '../../src/results/outcome.ts';
import { Hits, type Asked } from '../../src/results/reduction/hits.ts';
import { compileText } from '../pipeline/compile-text.ts';

const classes = ['cow', 'bull'];
const patches = ['North', 'East', 'South'];

/** For each class and patch an outcome of its own, behind the five that are looked at. */
const text = `
skein: 1
study: { title: Three glens (invented) }
years: 12
patches: [{ name: North }, { name: East }, { name: South }]
counts: both sexes
classes: { females: [cow], males: [bull] }
oldest: open-ended
survival: { cow: 0.8, bull: 0.7 }
births: { cow: 0.5, female-share: 0.5 }
mating: { form: minimum, males: [bull] }
year: [count, breeding, survival, ageing]
start: { table: { North: { cow: 6, bull: 5 }, East: { cow: 9, bull: 2 }, South: { cow: 3, bull: 8 } } }
outcomes:
  weighed: { of: { cow: 1, bull: 0.25 }, in: [North, South], below: 4 }
  each: { of: all, counted: in each patch, below: 6 }
  any: { of: { bull: 2 }, counted: in any patch, below: 4 }
  each above: { of: [cow], counted: in each patch, above: 3 }
  one sex: { of: [cow, bull], lacking: one sex }
  one sex somewhere: { of: [cow, bull], in: [East, South], counted: in any patch, lacking: one sex }
${patches.flatMap((patch) => classes.map((name) => `  ${name} ${patch}: { of: [${name}], in: ${patch}, below: 1 }`)).join('\n')}
`;

describe('an outcome looks at', () => {
  const compiled = compileText(text, {});
  const { outcomes, steps } = compiled.model;
  const run = openRunner(compiled.image, { steps, seed: 5 });
  const { counts } = run({ first: 0, lanes });
  const columns = 1 + patches.length + outcomes.length;
  const names = outcomes.map(({ name }) => name);
  const read = (t: number, lane: number, name: string) =>
    counts[(t * columns + 1 + patches.length + names.indexOf(name)) * lanes + lane]!;

  const expected: Readonly<Record<string, (n: (name: string, patch: string) => number) => number>> = {
    weighed: (n) => ['North', 'South'].reduce((sum, p) => sum + n('cow', p) + 0.25 * n('bull', p), 0),
    each: (n) => Math.max(...patches.map((p) => n('cow', p) + n('bull', p))),
    any: (n) => Math.min(...patches.map((p) => 2 * n('bull', p))),
    'each above': (n) => Math.min(...patches.map((p) => n('cow', p))),
    'one sex': (n) => Math.min(...classes.map((c) => patches.reduce((sum, p) => sum + n(c, p), 0))),
    'one sex somewhere': (n) => Math.min(...['East', 'South'].flatMap((p) => classes.map((c) => n(c, p)))),
  };

  test.each(Object.keys(expected))('%s', (name) => {
    const seen = new Set<number>();
    for (let t = 0; t <= steps; t++) {
      for (let lane = 0; lane < lanes; lane++) {
        const value = read(t, lane, name);
        expect(value).toBe(expected[name]!((c, p) => read(t, lane, `${c} ${p}`)));
        seen.add(value);
      }
    }
    expect(seen.size).toBeGreaterThan(3);
  });

  test('is told in words', () => {
    const told = Object.fromEntries(
      outcomes.map(({ name, definition, words }) => [name, [definition, words.happened]]),
    );
    expect(told['weighed']).toEqual([
      'fewer than 4 animals (counting each cow as 1 and bull as 0.25) in North and South together',
      'fallen below',
    ]);
    expect(told['each']).toEqual(['fewer than 6 animals of all classes in every patch', 'fallen below']);
    expect(told['any']![0]).toBe('fewer than 4 animals (counting each bull as 2) in some patch');
    expect(told['one sex']).toEqual(['no female or no male of all classes in all patches together', 'lost one sex']);
    expect(told['one sex somewhere']![0]).toBe('no female or no male of all classes in at least one of East and South');
    expect(told['cow North']).toEqual(['no animal of the class cow in North', 'fallen to none']);
  });
});

describe('a run comes to an outcome', () => {
  const asked: readonly Asked[] = [
    { event: { is: 'below', than: 5 }, counts: 1 },
    { event: { is: 'below', than: 7 }, counts: 3 },
    { event: { is: 'above', than: 6 }, counts: 2 },
    { event: { is: 'fallen', by: 0.3 }, counts: 1 },
    { event: { is: 'fallen', by: 0.9 }, counts: 2 },
  ];
  const [steps, replicates] = [9, 300];
  let state = 11;
  const draw = (below: number) => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return Math.floor((state / 4294967296) * below);
  };
  const runs = Array.from({ length: replicates }, (_, r) =>
    Array.from({ length: steps + 1 }, (_, t) => (t === 0 ? [10, 0, 100][r % 3]! : draw(12))),
  );

  test.each(asked)('$event, $counts counts', ({ event, counts }) => {
    const hits = new Hits({ event, counts, steps, replicates });
    runs.forEach((run, r) => run.forEach((value, t) => hits.add(t, r, value)));
    const isSo = (run: readonly number[], t: number) => {
      if (event.is === 'fallen') return run[0]! > 0 && 10 * run[t]! <= run[0]! * Math.round(10 * (1 - event.by));
      return event.is === 'below' ? run[t]! < event.than : run[t]! > event.than;
    };
    const held = (run: readonly number[], t: number) =>
      t >= counts && Array.from({ length: counts }, (_, i) => isSo(run, t - i)).every((one) => one);
    const first = runs.map((run) => run.findIndex((_, t) => t > 0 && held(run, t))).map((t) => Math.max(0, t));
    expect([...hits.first]).toEqual(first);
    for (let t = 1; t <= steps; t++) {
      expect(hits.nowAt[t]).toBe(runs.filter((run) => held(run, t)).length);
      expect(hits.firstAt[t]).toBe(first.filter((one) => one === t).length);
    }
  });

  test('in years that are told by shares of all runs', () => {
    const event = { is: 'below', than: 5 } as const;
    const hits = new Hits({ event, counts: 1, steps: 4, replicates: 10 });
    const firsts = [1, 2, 2, 2, 4, 4];
    firsts.forEach((t, r) => hits.add(t, r, 0));
    const words = { happened: 'fallen below', now: 'below' };
    const rule = { name: 'few', weights: [], patches: new Uint8Array(0), over: 'sum', event, counts: 1 } as const;
    const { whenFirst, ever, atEnd } = summariseOutcome({
      rule: { ...rule, definition: '', words },
      hits,
      runs: 10,
      firstYear: 2027,
    });
    expect(whenFirst.quantiles).toEqual({ '0.05': 2027, '0.25': 2028, '0.5': 2030, '0.75': null, '0.95': null });
    expect(whenFirst.meanYears).toBe(15 / 6);
    expect([ever.probability, atEnd.probability]).toEqual([0.6, 0.2]);
  });
});
