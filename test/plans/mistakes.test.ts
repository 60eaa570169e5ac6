// What is told of plans that cannot be meant.
import { expect, test } from 'vitest';
import { renderDiagnostics } from '../../src/diagnostic/render.ts';
import { modelText } from '../golden/models.ts';
import { errorsOf, tryText } from '../pipeline/compile-text.ts';
import { fens } from './landscape.ts';

const planned = (deed: string) =>
  fens({ actions: `  deed: ${deed}\n`, scenarios: '  plan: [deed]\n' }).replace('seed: 4', 'seed: 4, scenario: plan');

test.each([
  ['{ kind: link, between: [North fen, South fenn], distance: { times: 0.5 } }', 'unknown-patch'],
  ['{ kind: link, between: [North fen, North fen], distance: { times: 0.5 } }', 'plan-shape'],
  ['{ kind: link, between: [North fen, South fen] }', 'plan-shape'],
  ['{ kind: link, between: [North fen, South fen], share: { set: 0.1 } }', 'plan-shape'],
  ['{ kind: link, between: [North fen, South fen], dispersal: natel, distance: { times: 0.5 } }', 'unknown-phase'],
  ['{ kind: link, between: [North fen, South fen], crossing-death: { set: 1.2 } }', 'share-out-of-range'],
  [
    '{ kind: link, between: [North fen, South fen], crossing-death: { set: 0.2 }, distance: { times: 2 }, from: 2090 }',
    'year-outside',
  ],
  ['{ kind: habitat, in: Nort fen, capacity: { add: 9 } }', 'unknown-patch'],
  ['{ kind: habitat, in: North fen }', 'plan-shape'],
  ['{ kind: habitat, in: North fen, capacity: { add: -120 } }', 'missing-capacity'],
  ['{ kind: habitat, in: North fen, area: { add: -900 ha } }', 'out-of-range'],
  ['{ kind: habitat, in: North fen, area: { times: 0 } }', 'out-of-range'],
  ['{ kind: habitat, in: North fen, quality: { cover: { times: 2 } } }', 'plan-shape'],
  ['{ kind: habitat, in: North fen, capacity: { add: 9 }, from: 2090 }', 'year-outside'],
  ['{ kind: habitat, in: North fen, capacity: { add: 9 }, from: 2040, until: 2035 }', 'year-outside'],
  ['{ kind: habitat, in: North fen, capacity: { add: 9 }, from: 2035, over: 18 months }', 'plan-shape'],
  ['{ kind: habitat, new: { name: North fen, at: [1, 1], area: 9 ha, capacity: 9 } }', 'repeated-patch'],
  ['{ kind: habitat, in: North fen, lost: true, until: 2035 }', 'plan-shape'],
  ['{ kind: change, parameters: { adult_survivl: { add: 0.1 } } }', 'unknown-name'],
  ['{ kind: change, parameters: { adult_survival: { set: 1.4 } } }', 'share-out-of-range'],
  ['{ kind: change, rates: { survival: { adlt: { add: 0.1 } } } }', 'plan-shape'],
  ['{ kind: change, rates: { winter: { adult: { add: 0.1 } } } }', 'unknown-phase'],
  ['{ kind: take, number: { adult: 4 }, in: North fen, before: breading }', 'unknown-phase'],
  ['{ kind: take, number: { adlt: 4 }, in: North fen, before: breeding }', 'unknown-class'],
  ['{ kind: take, number: { adult: 4 }, in: North fen, before: breeding, years: [2099] }', 'year-outside'],
  ['{ kind: move, from: North fen, to: North fen, number: { adult: 4 }, after: natal }', 'handling-shape'],
  ['{ kind: move, from: North fen, to: South fen, number: { young: 4, adult: all }, after: natal }', 'handling-shape'],
  ['{ kind: habitat, in: North fen, capacity: { add: 9 }, cost: { once: 100 } }', 'missing-currency'],
])('is told once: %s', (deed, code) => {
  expect(errorsOf(planned(deed))).toEqual([code]);
});

test.each([
  ['deed: { kind: lnk, between: [North fen, South fen] }', 'unknown-kind'],
  ['deed: { between: [North fen, South fen] }', 'missing-kind'],
  ['natal: { kind: habitat, in: North fen, capacity: { add: 9 } }', 'reserved-name'],
])('an action that is none: %s', (action, code) => {
  const name = action.split(':')[0] ?? '';
  expect(errorsOf(fens({ actions: `  ${action}\n`, scenarios: `  plan: [${name}]\n` }))).toEqual([code]);
});

test('an area below zero in later years is told where chances of arrival are made from areas', () => {
  const clearing = 'actions:\n  clearing: { kind: habitat, in: Poplars, area: { add: -900 ha }, from: 2030 }';
  const planned = modelText('owl-network').replace(
    /^run: \{/mu,
    `${clearing}\nscenarios: { plan: [clearing] }\nrun: { scenario: plan,`,
  );
  expect(errorsOf(planned)).toEqual(['negative-rate']);
});

test('a mistake in what an action lays is told at the action', () => {
  const text = planned('{ kind: take, share: { adult: 1.5 }, in: North fen, before: breeding }');
  const line = text.split('\n').findIndex((one) => one.includes('kind: take')) + 1;
  const [found] = tryText(text).diagnostics.filter(({ severity }) => severity === 'error');
  expect(renderDiagnostics([found!], { colour: false, width: 100 })).toContain(`test.yaml:${String(line)}:`);
});

test('a price with commas between its digits, and a discount in percent that is written as a number, are told how to be written', () => {
  const deed = '{ kind: habitat, in: North fen, capacity: { add: 5 }, cost: { once: 90,000 } }';
  const more = 'money: { currency: crowns, price-year: 2026, discount: 3 }\n';
  const { diagnostics } = tryText(fens({ actions: `  deed: ${deed}\n`, scenarios: '  plan: [deed]\n', more }));
  expect(diagnostics.map(({ code, fix }) => [code, fix])).toEqual([
    ['out-of-range', 'If percent was meant, write 3 % or 0.03.'],
    ['unknown-key', 'If it ends a number, write that without commas between its digits.'],
  ]);
});

test('a scenario must not be called as today is', () => {
  expect(errorsOf(fens({ scenarios: '  as now: []\n' }))).toContain('reserved-name');
});
