// Numbers of actions that are not exactly known, written in the action: the same as a parameter with that uncertainty.
import { describe, expect, test } from 'vitest';
import { runPlans } from '../../src/compare/run-plans.ts';
import { plansOf } from '../../src/compare/plans-of.ts';
import { drawnValues, withValues } from '../../src/results/draws/plan.ts';
import { withScaledEffects } from '../../src/compare/scaled-effects.ts';
import { readSpec } from '../../src/spec/read.ts';
import { actionsOf, withScenario } from '../../src/spec/plans/scenarios.ts';
import { compileSpec } from '../../src/pipeline.ts';
import { alone } from '../../src/threads/alone.ts';
import { tryText } from '../pipeline/compile-text.ts';
import { compiledOf, fens, specOf } from './landscape.ts';

const unsureGain = '{ value: 1.05, uncertainty: { interval: [0.99, 1.11] } }';
const inPlace = fens({
  actions: `  late mowing: { kind: change, rates: { survival: { young: { times: ${unsureGain} } } }, in: North fen }
  rewet: { kind: habitat, in: South fen, area: { add: { value: 12 ha, uncertainty: { standard-error: 3 } } } }
  moves:
    kind: move
    from: North fen
    to: South fen
    number: { adult: { value: 6, uncertainty: { uniform: [4, 8] } } }
    after: natal
    handling-survival: { value: 0.9, uncertainty: { standard-error: 0.03 }, source: { basis: expert } }
`,
  scenarios: '  mow: [late mowing]\n  both: [late mowing, rewet, moves]\n',
});

describe('a number of an action with how sure it is', () => {
  test('is a parameter whose name says where it stands', () => {
    const { parameters, actions } = specOf(inPlace);
    expect(Object.keys(parameters ?? {})).toEqual([
      'adult_survival',
      'litter',
      'late_mowing_survival_young_times',
      'rewet_area_add',
      'moves_number_adult',
      'moves_handling_survival',
    ]);
    expect(parameters?.['rewet_area_add']).toEqual({ value: 12, uncertainty: { 'standard-error': 3 } });
    expect(actions?.['rewet']).toMatchObject({ area: { add: 'rewet_area_add ha' } });
    const { uncertainty } = compiledOf(inPlace, 'both').model;
    expect(uncertainty?.parameters.map(({ name, distribution }) => [name, distribution.shape])).toEqual([
      ['late_mowing_survival_young_times', 'lognormal'],
      ['moves_handling_survival', 'beta'],
      ['moves_number_adult', 'uniform'],
      ['rewet_area_add', 'lognormal'],
    ]);
  });

  test('gives the same bytes as the same number among the parameters', () => {
    const named = (text: string) =>
      text
        .replace('litter: 2.6 }', `litter: 2.6, late_mowing_survival_young_times: ${unsureGain} }`)
        .replace(`{ times: ${unsureGain}`, '{ times: late_mowing_survival_young_times');
    const alone = fens({
      actions: `  late mowing: { kind: change, rates: { survival: { young: { times: ${unsureGain} } } }, in: North fen }\n`,
      scenarios: '  mow: [late mowing]\n',
    });
    const [own, other] = [compiledOf(alone, 'mow'), compiledOf(named(alone), 'mow')];
    expect(new Uint8Array(own.image)).toEqual(new Uint8Array(other.image));
    expect(own.model.uncertainty).toEqual(other.model.uncertainty);
    expect(own.provenance.hash).toBe(other.provenance.hash);
  });

  test('is drawn in its unit, once for every plan that holds the action', async () => {
    const spec = specOf(inPlace.replace('seed: 4', 'seed: 4, draws: 3'));
    const { plans } = plansOf(spec);
    const run = await runPlans(alone, plans!);
    expect(run?.draws).toHaveLength(3);
    const { uncertainty, seed } = plans![0]!.compiled.model;
    const gains = [0, 1, 2].map((draw) => {
      const values = drawnValues(uncertainty!, seed, draw);
      const rates = ['mow', 'both'].map((plan) => {
        const { model } = compileSpec(withScenario(withValues(spec, values), plan)).compiled!;
        const survival = model.phases.find(({ name }) => name === 'survival');
        if (survival?.kind !== 'survival') throw new Error('There is a survival.');
        if (plan === 'both') {
          const south = model.patches.find(({ name }) => name === 'South fen')!;
          expect(south.areaKm2).toBeCloseTo(0.6 + values['rewet_area_add']! / 100, 12);
        }
        return survival.survival.epochs[0]![model.patches.findIndex(({ name }) => name === 'North fen') * 2]! / 0.42;
      });
      expect(rates[0]).toBeCloseTo(values['late_mowing_survival_young_times']!, 12);
      expect(rates[1]).toBe(rates[0]);
      return rates[0];
    });
    expect(new Set(gains).size).toBe(3);
  });

  test('is told with its doubt, and halved as any effect is', () => {
    const spec = specOf(inPlace);
    expect(actionsOf(spec, 'both').map(({ words }) => words)).toEqual([
      'survival of young in North fen times 1.05 (95 % interval 0.99 to 1.11)',
      'area of South fen plus 12 ha (standard error 3)',
      '6 (somewhere from 4 to 8) adult moved from North fen to South fen',
    ]);
    const half = compileSpec(withScenario(withScaledEffects(spec, 0.5), 'both')).compiled!;
    expect(half.model.patches.find(({ name }) => name === 'South fen')!.areaKm2).toBeCloseTo(0.66, 12);
  });
});

test.each([
  [
    'times: { value: 1.05, uncertainty: { standard-error: 0.1, uniform: [1, 2] } }',
    'impossible-uncertainty',
    'uncertainty',
  ],
  ['times: { value: 2 * litter, uncertainty: { standard-error: 0.1 } }', 'impossible-uncertainty', 'uncertainty'],
  ['times: { value: 1.05, uncertainty: { standard-error: -0.1 } }', 'impossible-uncertainty', '-0.1'],
  ['times: { value: 1.05 }', 'missing-key', 'times'],
  ['times: { value: 1.05, uncertainty: { sd: 0.1 } }', 'unknown-key', 'sd'],
])('a mistake is told where the number stands: %s', (effect, code, word) => {
  const action = `  mow: { kind: change, rates: { survival: { young: { ${effect} } } } }\n`;
  const text = fens({ actions: action, scenarios: '  plan: [mow]\n' });
  const errors = tryText(text).diagnostics.filter(({ severity }) => severity === 'error');
  expect(errors.map((one) => one.code)).toEqual([code]);
  const place = errors[0]!.place!;
  expect(place.text).toContain('mow: { kind: change');
  expect(place.text.slice(place.column - 1).startsWith(word)).toBe(true);
});

const moves =
  'moves: { kind: move, from: North fen, to: South fen, number: { adult: 6 }, after: natal, handling-survival: ';

test.each([
  ['standard-error: 2 %', 'standard-error: 0.02', 'beta'],
  ['interval: [90 %, 98 %]', 'interval: [0.9, 0.98]', 'beta'],
  ['uniform: [0.9, 98 %]', 'uniform: [0.9, 0.98]', 'uniform'],
  ['triangular: [90 %, 98 %]', 'triangular: [0.9, 0.98]', 'triangular'],
])('percent are a share, in how sure it is, too: %s', (inPercent, inShares, shape) => {
  const told = [`{ value: 95 %, uncertainty: { ${inPercent} } }`, `{ value: 0.95, uncertainty: { ${inShares} } }`];
  const [percent, share] = told.map((number) => {
    const { model } = compiledOf(fens({ actions: `  ${moves}${number} }\n`, scenarios: '  plan: [moves]\n' }), 'plan');
    return model.uncertainty!.parameters;
  });
  expect(share![0]).toMatchObject({ name: 'moves_handling_survival', value: 0.95, distribution: { shape } });
  expect(percent).toEqual(share);
});

test('ends that were meant in percent are told', () => {
  const number = '{ value: 95 %, uncertainty: { interval: [90, 98] } }';
  const { diagnostics } = tryText(fens({ actions: `  ${moves}${number} }\n`, scenarios: '  plan: [moves]\n' }));
  expect(diagnostics.map(({ code, fix }) => [code, fix])).toEqual([
    ['impossible-uncertainty', 'If percent was meant, write [90 %, 98 %].'],
  ]);
});

test('a name that is taken is told', () => {
  const text = inPlace.replace('litter: 2.6 }', 'litter: 2.6, rewet_area_add: 4 }');
  const { diagnostics } = readSpec(text, 'test.yaml');
  expect(diagnostics.map(({ code, place }) => [code, place?.text.trim().slice(0, 6)])).toEqual([
    ['ambiguous-name', 'rewet:'],
  ]);
});
