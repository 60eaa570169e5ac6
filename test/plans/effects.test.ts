// What actions make of the numbers of a model, and what they cost. Expected numbers are derived by hand.
import { describe, expect, test } from 'vitest';
import { tableAt } from '../../src/compile/rates.ts';
import { totalCost } from '../../src/results/costs.ts';
import { compiledOf, fens } from './landscape.ts';

/** Capacity of North fen, which is 120 now, by year from 2031 on. */
function capacities(actions: readonly string[], years: number): number[] {
  const text = fens({
    actions: actions.map((action, i) => `  a${String(i)}: ${action}\n`).join(''),
    scenarios: `  plan: [${actions.map((_, i) => `a${String(i)}`).join(', ')}]\n`,
  });
  const { model } = compiledOf(text, 'plan');
  const p = model.patches.findIndex(({ name }) => name === 'North fen');
  const [{ capacity, capacityByYear }] = model.crowding as [(typeof model.crowding)[number]];
  return Array.from({ length: years }, (_, t) =>
    capacityByYear === undefined ? capacity[p]! : tableAt(capacityByYear, t + 1)[p]!,
  );
}

describe('effects on one thing', () => {
  test('are set, then multiplied, then added to, whatever the order of the actions', () => {
    const set = '{ kind: habitat, in: North fen, capacity: { set: 100 } }';
    const times = '{ kind: habitat, in: North fen, capacity: { times: 1.5 } }';
    const add = '{ kind: habitat, in: North fen, capacity: { add: 20 } }';
    for (const order of [
      [set, times, add],
      [add, times, set],
      [times, add, set],
    ])
      expect(capacities(order, 1)).toEqual([170]);
    expect(capacities(['{ kind: habitat, in: North fen, capacity: { add: 20, times: 1.5, set: 100 } }'], 1)).toEqual([
      170,
    ]);
  });

  test('change areas from the first year on', () => {
    const area = (effect: string): number => {
      const deed = `  deed: { kind: habitat, in: North fen, area: ${effect} }\n`;
      const { model } = compiledOf(fens({ actions: deed, scenarios: '  plan: [deed]\n' }), 'plan');
      return model.patches.find(({ name }) => name === 'North fen')!.areaKm2!;
    };
    expect(area('{ add: 12 ha }')).toBeCloseTo(1.12, 12);
    expect(area('{ add: -90 ha }')).toBeCloseTo(0.1, 12);
    expect(area('{ set: 140 ha }')).toBe(1.4);
  });

  test('hold in their years and grow in equal steps', () => {
    expect(
      capacities(['{ kind: habitat, in: North fen, capacity: { add: 80 }, from: 2033, over: 4 years }'], 8),
    ).toEqual([120, 120, 140, 160, 180, 200, 200, 200]);
    expect(
      capacities(['{ kind: habitat, in: North fen, capacity: { times: 2 }, from: 2032, until: 2033 }'], 5),
    ).toEqual([120, 240, 240, 120, 120]);
    expect(
      capacities(['{ kind: habitat, in: North fen, capacity: { set: 60 }, from: 2032, over: 2 years }'], 4),
    ).toEqual([120, 90, 60, 60]);
    const one = '{ kind: habitat, in: North fen, capacity: { set: 60 }, until: 2032 }';
    const other = '{ kind: habitat, in: North fen, capacity: { set: 90 }, from: 2033 }';
    expect(capacities([one, other], 4)).toEqual([60, 60, 90, 90]);
  });
});

test('a change in some patches and a change in all meet in the same rates', () => {
  const text = fens({
    actions: `  some: { kind: change, rates: { survival: { adult: { add: 0.1 } } }, in: South fen }
  everywhere: { kind: change, rates: { survival: { adult: { times: 0.5 } } } }
`,
    scenarios: '  plan: [some, everywhere]\n',
  });
  const { model } = compiledOf(text, 'plan');
  const survival = model.phases.find(({ name }) => name === 'survival');
  if (survival?.kind !== 'survival') throw new Error('There is a survival.');
  expect(model.patches.map(({ name }, p) => [name, survival.survival.epochs[0]![p * 2 + 1]])).toEqual([
    ['Far pool', 0.33],
    ['North fen', 0.33],
    ['South fen', 0.33 + 0.1],
  ]);
});

describe('a stage that is followed year by year', () => {
  const threeYears = (actions: string, plan: string, more = ''): string =>
    fens({ actions, scenarios: `  plan: [${plan}]\n`, more })
      .replace('oldest:', 'duration: { young: { years: 3, as: expanded } }\noldest:')
      .replace('litter: 2.6', 'litter: 26')
      .replace('  survival: { young: { sd: 0.08 } }', '  survival: { adult: { sd: 0.08 } }');
  const survivals = (text: string) => {
    const { model } = compiledOf(text, 'plan');
    const survival = model.phases.find(({ name }) => name === 'survival');
    if (survival?.kind !== 'survival') throw new Error('There is a survival.');
    const table = survival.survival.epochs[0]!;
    return model.patches.map((_, p) => Array.from(table.slice(p * 4, p * 4 + 3)));
  };
  const one = '  one: { kind: change, rates: { survival: { young 2: { times: 0.5 } } } }\n';
  const all = '  all: { kind: change, rates: { survival: { young: { times: 0.9 } } }, in: South fen }\n';

  test('changes in one of its years, from what the stage has', () => {
    expect(survivals(threeYears(one, 'one'))).toEqual(Array.from({ length: 3 }, () => [0.42, 0.21, 0.42]));
  });

  test.each(['one, all', 'all, one'])('changes as a whole, too: %s', (plan) => {
    const [pool, , south] = survivals(threeYears(one + all, plan));
    expect(pool).toEqual([0.42, 0.21, 0.42]);
    [0.42 * 0.9, 0.42 * 0.9 * 0.5, 0.42 * 0.9].forEach((wanted, i) => expect(south![i]).toBeCloseTo(wanted, 15));
  });

  test('has in a patch what is written there for the stage before what is written everywhere for the year', () => {
    const there = 'in: { South fen: { survival: { young: 0.3 } } }\n';
    const text = threeYears(one, 'one', there).replace('{ young: 0.42,', '{ young: 0.42, young 2: 0.6,');
    expect(survivals(text)).toEqual([
      [0.42, 0.3, 0.42],
      [0.42, 0.3, 0.42],
      [0.3, 0.15, 0.3],
    ]);
  });
});

describe('the strength of crowding', () => {
  const coefficients = (deed: string) => {
    const text = fens({ actions: `  deed: ${deed}\n`, scenarios: '  plan: [deed]\n' });
    return (['as now', 'plan'] as const).map((name) => compiledOf(text, name).coefficients[0]!);
  };

  test('is that of the base under a plan that raises survival or births', () => {
    for (const deed of [
      '{ kind: change, parameters: { adult_survival: { add: 0.1 } } }',
      '{ kind: change, rates: { births: { adult: { times: 1.5 } } }, in: North fen }',
    ]) {
      const [now, plan] = coefficients(deed);
      expect(plan).toEqual(now);
    }
  });

  test('follows the capacity alone: twice the room, half the strength', () => {
    const [now, plan] = coefficients('{ kind: habitat, in: [Far pool, North fen, South fen], capacity: { times: 2 } }');
    plan!.coefficient.forEach((own, p) => expect(own).toBeCloseTo(now!.coefficient[p]! / 2, 14));
  });
});

describe('costs', () => {
  const costed = (cost: string, { more = '', kind = 'habitat, in: North fen, capacity: { add: 1 }' } = {}) =>
    compiledOf(
      fens({
        actions: `  deed: { kind: ${kind}, cost: ${cost} }\n`,
        scenarios: '  plan: [deed]\n',
        more: `money: { currency: crowns, price-year: 2030, discount: 3 % }\n${more}`,
      }),
      'plan',
    ).cost;

  test('of 1000 a year for 20 years are worth 15 323.80 at 3 %, the first year undiscounted', () => {
    const { presentValue, undiscounted } = totalCost(costed('{ yearly: 1000 }'), () => 0);
    // A geometric sum: 1000 (1 - 1.03^-20) / (1 - 1/1.03).
    expect(presentValue.middle).toBeCloseTo(15323.7991, 4);
    expect(undiscounted).toEqual({ least: 20000, middle: 20000, most: 20000 });
  });

  test('once and yearly begin with the action; two numbers are the least and the most', () => {
    const cost = costed('{ once: [100, 300], yearly: 10 }', {
      kind: 'habitat, in: North fen, capacity: { add: 1 }, from: 2033, until: 2034',
    });
    const { presentValue, undiscounted } = totalCost(cost, () => 0);
    expect(undiscounted).toEqual({ least: 120, middle: 220, most: 320 });
    expect(presentValue.least).toBeCloseTo(110 / 1.03 ** 2 + 10 / 1.03 ** 3, 10);
  });

  test('of each animal go with the animals handled in the step', () => {
    const cost = costed('{ per-animal: 50 }', {
      kind: 'take, number: { adult: 4 }, in: North fen, before: breeding, years: [2031, 2033]',
    });
    const handled = [4, 9, 3];
    const { presentValue, undiscounted } = totalCost(cost, (action, step) => {
      expect(action).toBe('deed');
      return handled[step - 1] ?? 0;
    });
    expect(undiscounted.middle).toBe(350);
    expect(presentValue.middle).toBeCloseTo(200 + 150 / 1.03 ** 2, 10);
  });

  test('of a kilometre go with the way as it is once all is done', () => {
    const cost = costed('{ per-km: 10 }', {
      kind: 'link, between: [North fen, South fen], distance: { times: 0.6, add: 1 km }',
    });
    // The two lie 5 km apart.
    expect(totalCost(cost, () => 0).undiscounted.middle).toBeCloseTo(40, 10);
  });
});
