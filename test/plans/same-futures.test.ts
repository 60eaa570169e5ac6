// Plans meet the same weather and the same luck wherever they do not differ.
import { describe, expect, test } from 'vitest';
import { runModel } from '../../src/pipeline.ts';
import { compiledOf, fens, futuresOf } from './landscape.ts';

/** Every kind of action, from the tenth year on. */
const later = {
  link: 'deed: { kind: link, between: [North fen, South fen], crossing-death: { set: 0.4 }, distance: { times: 0.5 }, from: 2040 }',
  'new link': 'deed: { kind: link, between: [North fen, Far pool], distance: { set: 2 km }, from: 2040 }',
  take: 'deed: { kind: take, share: { adult: 0.2 }, counted: each patch, before: breeding, years: { from: 2040 } }',
  move: 'deed: { kind: move, from: North fen, to: Far pool, number: { adult: 3 }, after: natal, years: [2040, 2041] }',
  add: 'deed: { kind: add, in: Far pool, number: { young: 5 }, after: breeding, years: [2040] }',
  capacity: 'deed: { kind: habitat, in: North fen, capacity: { add: 60 }, from: 2040, over: 5 years }',
  'lost patch': 'deed: { kind: habitat, in: South fen, lost: true, from: 2040 }',
  'new patch': 'deed: { kind: habitat, new: { name: A mere, at: [1, 2], area: 40 ha, capacity: 50 }, from: 2040 }',
  parameter: 'deed: { kind: change, parameters: { adult_survival: { add: 0.1 } }, from: 2040 }',
  rate: 'deed: { kind: change, rates: { survival: { young: { times: 1.3 } } }, in: South fen, from: 2040 }',
  leaving: 'deed: { kind: change, rates: { natal: { young: { set: 0.05 } } }, from: 2040 }',
} as const;

const planned = (deed: string) => fens({ actions: `  ${deed}\n`, scenarios: '  plan: [deed]\n' });

describe('an action from the tenth year on leaves all years before it as they are, byte for byte', () => {
  test.each(Object.entries(later))('%s', (_, deed) => {
    const text = planned(deed);
    const [now, plan] = [futuresOf(compiledOf(text, 'as now')), futuresOf(compiledOf(text, 'plan'))];
    for (const [patch, counts] of now) expect(plan.get(patch)?.slice(0, 10), patch).toEqual(counts.slice(0, 10));
    const changed = [...now].some(([patch, counts]) => counts.slice(10).join() !== plan.get(patch)?.slice(10).join());
    expect(changed).toBe(true);
  });
});

describe('an action in a patch that nobody leaves or reaches leaves the others as they are', () => {
  test.each([
    'deed: { kind: habitat, in: Far pool, capacity: { times: 2 } }',
    'deed: { kind: take, number: { adult: 4 }, in: Far pool, before: breeding }',
    'deed: { kind: add, in: Far pool, number: { adult: 9 }, after: breeding }',
    'deed: { kind: change, rates: { survival: { adult: { add: 0.1 } } }, in: Far pool }',
    'deed: { kind: habitat, in: Far pool, lost: true, from: 2033 }',
  ])('%s', (deed) => {
    const text = planned(deed);
    const [now, plan] = [futuresOf(compiledOf(text, 'as now')), futuresOf(compiledOf(text, 'plan'))];
    for (const patch of ['North fen', 'South fen']) expect(plan.get(patch)).toEqual(now.get(patch));
    expect(plan.get('Far pool')).not.toEqual(now.get('Far pool'));
  });
});

describe('a plan without an effect gives exactly the same', () => {
  test.each([
    'deed: { kind: change, parameters: { adult_survival: { times: 1 } } }',
    'deed: { kind: change, rates: { survival: { young: { add: 0, times: 1 } } } }',
    'deed: { kind: change, rates: { births: { adult: { times: 1 } } }, in: North fen, from: 2035, over: 4 years }',
    'deed: { kind: habitat, in: South fen, capacity: { set: 40 }, area: { times: 1 } }',
    'deed: { kind: link, between: [North fen, South fen], crossing-death: { set: 0 }, distance: { times: 1 } }',
    'deed: { kind: take, number: { adult: 0 }, counted: each patch, before: breeding }',
    'deed: { kind: move, from: North fen, to: Far pool, number: { adult: 0 }, after: natal }',
    'deed: { kind: add, in: Far pool, number: { adult: 0 }, after: breeding }',
  ])('%s', (deed) => {
    const text = planned(deed);
    expect(futuresOf(compiledOf(text, 'plan'))).toEqual(futuresOf(compiledOf(text, 'as now')));
  });
});

test.each(['0.2 per patch', '0.3 per landscape'])('a new patch moves no flood with the chance of %s', (chance) => {
  const text = fens({
    actions: `  ${later['new patch']}\n`,
    scenarios: '  plan: [deed]\n',
    more: `flood: { kind: catastrophe, chance: ${chance}, reach: { radius: 3 km }, multiplies: { survival: { adult: 0.5 } } }\n`,
  });
  const [now, plan] = [futuresOf(compiledOf(text, 'as now')), futuresOf(compiledOf(text, 'plan'))];
  for (const [patch, counts] of now) expect(plan.get(patch)?.slice(0, 10)).toEqual(counts.slice(0, 10));
  expect(plan.get('Far pool')).toEqual(now.get('Far pool'));
});

test('where plans stand, what they are called and the order of their actions change nothing', () => {
  const actions = `  less: { kind: take, share: { adult: 0.1 }, counted: each patch, before: breeding }
  wet: { kind: habitat, in: North fen, capacity: { add: 60 }, from: 2034 }
  mere: { kind: habitat, new: { name: A mere, at: [1, 2], area: 40 ha, capacity: 50 }, from: 2033 }
`;
  const one = fens({ actions, scenarios: '  plan: [less, wet, mere]\n  other: [wet]\n' });
  const two = fens({ actions, scenarios: '  other: [wet]\n  renamed: [mere, less, wet]\n' });
  expect(futuresOf(compiledOf(two, 'renamed'))).toEqual(futuresOf(compiledOf(one, 'plan')));
  expect(futuresOf(compiledOf(two, 'other'))).toEqual(futuresOf(compiledOf(one, 'other')));
});

test('actions that no scenario names change nothing of what is run', () => {
  const text = fens({ actions: '  idle: { kind: habitat, in: North fen, capacity: { add: 60 } }\n' });
  const results = (of: string) => ({ ...runModel(compiledOf(of, 'as now')), hash: '' });
  expect(results(text)).toEqual(results(fens({})));
});
