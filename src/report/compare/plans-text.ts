// The plans in a terminal: their chances with what is sure of them, animals, money, and what each does.
import type { Comparison, ComparedPlan } from '../../compare/results.ts';
import { plain, whole } from '../../view/number.ts';
import { fittedColumns } from '../fitted-columns.ts';
import { wrap } from '../terminal.ts';
import { meaningsOf } from '../unknown-words.ts';
import type { CompareTextStyle } from './style.ts';
import { bestWords, chanceWords, costWords, courseWords, moneyWords, rangeWords } from './words.ts';

/** With the intervals of both kinds. */
export function chancesText({ scenarios, objectives, notDrawn, draws }: Comparison, style: CompareTextStyle): string {
  const names = objectives.filter(({ of }) => of === 'chance').map(({ name }) => name);
  if (names.length === 0) return '';
  const table = (cells: (plan: ComparedPlan) => readonly string[]): string =>
    fittedColumns(
      ['plan', ...names],
      scenarios.map((plan) => [plan.name, ...cells(plan)]),
      style,
    );
  const unknown = draws !== undefined ? '' : `; what is not known was ${notDrawn === true ? 'not drawn' : 'not given'}`;
  const own = table(({ outcomes }) =>
    outcomes.map(({ probability, intervals }) => chanceWords(probability, intervals.runs)),
  );
  const first = [wrap(`Of 100 futures, with the 95 % interval from the number of runs${unknown}:`, style), own];
  if (draws === undefined) return first.join('\n');
  const over = table(({ outcomes }) =>
    outcomes.map(({ intervals: { unknown: own, noUnknown } }) => (own === null ? (noUnknown ?? '') : rangeWords(own))),
  );
  const reasons = meaningsOf(scenarios.flatMap(({ outcomes }) => outcomes.map(({ intervals }) => intervals.noUnknown)));
  const told = [wrap('Their 95 % intervals from what is not known:', style), over];
  return [...first, '', ...told, ...(reasons === '' ? [] : [wrap(reasons, style)])].join('\n');
}

export function amountsText(comparison: Comparison, style: CompareTextStyle): string {
  const { scenarios, objectives, money, draws } = comparison;
  const [decides] = objectives;
  const head = [
    'plan',
    `${style.animals} at the end`,
    'then',
    ...(money === null ? [] : ['cost now', 'undiscounted']),
    ...(decides === undefined ? [] : [draws === undefined ? 'of 100 best' : 'of 100 best (runs / unknown)']),
    'beaten in everything',
  ];
  const rows = scenarios.map((plan) => [
    plan.name,
    whole(plan.animalsAtEnd.mean),
    courseWords(plan),
    ...(plan.cost === null ? [] : [plain(plan.cost.presentValue), plain(plan.cost.undiscounted)]),
    ...(decides === undefined ? [] : [bestWords(comparison, decides.name, plan.name)]),
    plan.notBeaten ? 'no' : 'yes',
  ]);
  return fittedColumns(head, rows, style);
}

/** What the outcomes and the actions are, and in which money costs are told. */
export function meaningsText(comparison: Comparison, style: CompareTextStyle): string {
  const { scenarios, objectives, money } = comparison;
  const definitions = objectives
    .filter(({ of }) => of === 'chance')
    .map(({ name, definition }) => `${name}: ${definition}`);
  const actions = new Map(scenarios.flatMap((plan) => plan.actions.map(({ name, words }) => [name, words] as const)));
  const what = [...actions].map(([name, words]) => `${name}: ${words}`);
  const plans = scenarios
    .filter((plan) => plan.actions.length > 0)
    .map((plan) => `“${plan.name}” is ${plan.actions.map(({ name }) => name).join(', ')}`);
  const ranges = scenarios.flatMap(({ name, cost }) =>
    cost === null || cost.least === cost.most ? [] : [`“${name}” ${costWords(cost)}`],
  );
  const between = ranges.length === 0 ? '' : ` Where prices are ranges: ${ranges.join('; ')}.`;
  const told = [
    ...definitions,
    ...what,
    `${plans.join('; ')}.`,
    ...(money === null ? [] : [`${moneyWords(money)}${between}`]),
  ];
  return told.map((text) => wrap(text, style)).join('\n');
}
