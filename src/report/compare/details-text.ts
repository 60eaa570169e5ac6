// What a comparison says in a terminal to those who ask for all of it: every pair of plans, chances of being best, prices, patches.
import type { Comparison, ObjectiveWords, PlanDifference } from '../../compare/results.ts';
import { criterionSaid, withoutWindows } from '../criterion-words.ts';
import { fittedColumns } from '../fitted-columns.ts';
import { joinBlocks, wrap, type TextStyle } from '../terminal.ts';
import {
  beatenIn,
  bestWords,
  between,
  chanceWords,
  change,
  isDrawn,
  priceOfWords,
  priceWords,
  shareOf100,
  unknownWords,
} from './words.ts';
import type { CompareTextStyle } from './style.ts';

export function detailsText(comparison: Comparison, style: CompareTextStyle): string {
  const counted = comparison.objectives.filter(({ of }) => of !== 'money');
  return joinBlocks([
    ...counted.map((one) => differencesTable(pairsOf(comparison, one), one, style)),
    atTheEnd(comparison, style),
    best(comparison, style),
    prices(comparison, style),
    patches(comparison, style),
    criteria(comparison, style),
  ]).trimEnd();
}

/** Of each plan, as a run of it alone would say. */
function criteria({ scenarios }: Comparison, style: CompareTextStyle): string {
  const said = scenarios.flatMap(({ name, criterionE }) =>
    criterionE === undefined ? [] : [{ name, ...criterionSaid(criterionE) }],
  );
  const lines = said.flatMap(({ name, lead, windows }) => [`“${name}”: ${lead}`, ...windows.map((one) => `- ${one}`)]);
  const [first] = said;
  if (first === undefined) return '';
  const none = withoutWindows(scenarios.filter((one) => one.criterionE === undefined).map(({ name }) => name));
  return [...lines, none, first.caution]
    .filter((text) => text !== '')
    .map((text) => wrap(text, style))
    .join('\n');
}

/** Chances between any two plans, other objectives against the first plan. */
function pairsOf({ differences, scenarios }: Comparison, { name, of }: ObjectiveWords): readonly PlanDifference[] {
  const base = scenarios[0]?.name;
  return differences.filter((one) => one.outcome === name && (of === 'chance' || one.from === base));
}

interface Gains {
  /** The plan that all others are set beside. */
  readonly against: string;
  /** What one point costs, one a row; null where nothing has a price. */
  readonly prices: readonly string[] | null;
}

/** Of one objective. */
export function differencesTable(
  own: readonly PlanDifference[],
  { name, of, better }: ObjectiveWords,
  style: CompareTextStyle,
  gains: Gains | null = null,
): string {
  const prices = gains?.prices ?? null;
  if (own.length === 0) return '';
  const drawn = own.some(isDrawn);
  const unit = { chance: 'points of a hundred', animals: style.animals, money: 'money now' }[of];
  const rows = own.map((one, k) => [
    gains === null ? `${one.to} against ${one.from}` : one.to,
    change(one),
    between(one.of, one.interval),
    ...(drawn ? [unknownWords(one)] : []),
    apart(one),
    ...(prices === null ? [] : [prices[k] ?? '']),
  ]);
  const head = [
    gains === null ? `${name}, ${unit}` : `${name}, ${unit}, against “${gains.against}”`,
    'differs by',
    '95 % from runs',
    ...(drawn ? ['from unknown'] : []),
    'told apart',
    ...(prices === null ? [] : [`one point ${better === 'more' ? 'more' : 'less'} costs`]),
  ];
  return fittedColumns(head, rows, style);
}

function apart({ toldApart, estimate, interval }: PlanDifference): string {
  if (toldApart) return 'yes';
  return estimate === 0 && interval.lower === 0 && interval.upper === 0 ? 'the same' : 'no';
}

/** Being so at the last count is another thing than having been so at some. */
function atTheEnd({ scenarios }: Comparison, style: TextStyle): string {
  const names = scenarios[0]?.outcomes.map(({ name }) => name) ?? [];
  if (names.length === 0) return '';
  const rows = scenarios.map(({ name, outcomes }) => [
    name,
    ...outcomes.map(({ atEnd }) => chanceWords(atEnd.probability, atEnd.interval)),
  ]);
  return [
    wrap('Of 100 futures, those in which it is so at the last count, with the 95 % interval from runs:', style),
    fittedColumns(['plan', ...names], rows, style),
  ].join('\n');
}

function best(comparison: Comparison, style: TextStyle): string {
  const { objectives, scenarios, draws } = comparison;
  const asked = objectives.filter(({ better }) => better !== null);
  const rows = scenarios.map(({ name, beaten }) => [
    name,
    ...asked.map((objective) => bestWords(comparison, objective.name, name)),
    `${shareOf100(beaten.runs)}${beaten.draws === null ? '' : ` / ${shareOf100(beaten.draws)}`}`,
  ]);
  const over =
    draws === undefined
      ? 'with as many other futures'
      : 'with as many other futures / over the draws of what is not known';
  return [
    wrap(`Of 100, how often best in, and ${beatenIn(comparison)} by another (${over}; equals share):`, style),
    fittedColumns(['plan', ...asked.map(({ name }) => name), beatenIn(comparison)], rows, style),
  ].join('\n');
}

function prices(comparison: Comparison, style: TextStyle): string {
  const { scenarios, money } = comparison;
  if (money === null) return '';
  const outcomes = scenarios.at(-1)?.prices.map(({ outcome }) => outcome) ?? [];
  const rows = scenarios
    .slice(1)
    .map(({ name, prices: own }) => [name, ...own.map((price) => priceWords(price, comparison))]);
  if (rows.length === 0 || outcomes.length === 0) return '';
  return [wrap(`${priceOfWords(comparison)}:`, style), fittedColumns(['plan', ...outcomes], rows, style)].join('\n');
}

/** Patches that surely gain or lose. */
function patches({ patches: all, scenarios }: Comparison, style: CompareTextStyle): string {
  const lines = scenarios.slice(1).map(({ name }) => {
    const own = all.filter(({ scenario }) => scenario === name);
    const told = own.filter(({ animals }) => animals.lower > 0 || animals.upper < 0);
    const each = told.map(({ patch, animals }) => `${patch} ${change({ of: 'animals', estimate: animals.estimate })}`);
    return wrap(`${name}: ${each.length === 0 ? 'no patch surely gains or loses' : each.join(', ')}`, style);
  });
  return lines.length === 0
    ? ''
    : [wrap(`Patches that gain or lose at the end, ${style.animals} in the mean:`, style), ...lines].join('\n');
}
