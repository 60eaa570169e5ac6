// The plans in a terminal: their chances with what is sure of them, animals, money, and what each does.
import type { Comparison, ComparedPlan } from '../../compare/results.ts';
import { plain, whole } from '../../view/number.ts';
import { fittedColumns } from '../fitted-columns.ts';
import { joinBlocks, wrap } from '../terminal.ts';
import { meaningsOf } from '../unknown-words.ts';
import type { CompareTextStyle } from './style.ts';
import { areAlike, beatenIn, bestWords, chanceWords, courseWords, moneyWords, rangeWords } from './words.ts';

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
  const { scenarios, objectives, draws } = comparison;
  const [decides] = objectives;
  // Where all plans are equal by what decides, a share of being best says nothing.
  const best = decides === undefined || areAlike(comparison, decides) ? null : decides.name;
  const counted: Columns = {
    head: [
      `${style.animals} at the end`,
      'then',
      ...(best === null ? [] : [draws === undefined ? 'of 100 best' : 'of 100 best (runs / unknown)']),
    ],
    cells: (plan) => [
      whole(plan.animalsAtEnd.mean),
      courseWords(plan),
      ...(best === null ? [] : [bestWords(comparison, best, plan.name)]),
    ],
  };
  const beaten: Columns = { head: [beatenIn(comparison)], cells: ({ notBeaten }) => [notBeaten ? 'no' : 'yes'] };
  const money = moneyColumns(comparison);
  const table = (columns: readonly Columns[]): string =>
    fittedColumns(
      ['plan', ...columns.flatMap(({ head }) => head)],
      scenarios.map((plan) => [plan.name, ...columns.flatMap(({ cells }) => cells(plan))]),
      style,
    );
  // Ranges of costs would push the table over the edge of a terminal.
  if (isRanged(comparison)) return joinBlocks([table([counted]), table([money, beaten])]).trimEnd();
  return table([counted, money, beaten]);
}

interface Columns {
  readonly head: readonly string[];
  cells(plan: ComparedPlan): readonly string[];
}

function moneyColumns(comparison: Comparison): Columns {
  if (comparison.money === null) return { head: [], cells: () => [] };
  const ranged = isRanged(comparison);
  return {
    head: ['cost now', ...(ranged ? ['from the ends of prices'] : []), 'undiscounted'],
    cells: ({ cost }) => {
      if (cost === null) return [];
      const { presentValue, undiscounted, least, most } = cost;
      const range = least === most ? '' : `${plain(least)} to ${plain(most)}`;
      return [plain(presentValue), ...(ranged ? [range] : []), plain(undiscounted)];
    },
  };
}

/** Whether any price is a range. */
function isRanged({ scenarios }: Comparison): boolean {
  return scenarios.some(({ cost }) => cost !== null && cost.least !== cost.most);
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
  const between = isRanged(comparison) ? ' Prices that are ranges count with their middle.' : '';
  const told = [
    ...definitions,
    ...what,
    `${plans.join('; ')}.`,
    ...(money === null ? [] : [`${moneyWords(money)}${between}`]),
  ];
  return told.map((text) => wrap(text, style)).join('\n');
}
