// What a comparison says in a terminal: the statement first, then the plans, then what tells them apart.
import type { Comparison, ComparedPlan, ObjectiveWords, PlanDifference, Robustness } from '../../compare/results.ts';
import { percent, plain, whole } from '../../view/number.ts';
import { fittedColumns } from '../fitted-columns.ts';
import { bold, dim, joinBlocks, printable, wrap, type TextStyle } from '../terminal.ts';
import { cautionList } from '../text.ts';
import { robustWords, variantWords } from './robust-words.ts';
import { hasMoves, hasTakes, sourceWords, takeWords, translocationSteps } from './translocation.ts';
import { between, change, costWords, courseWords, priceOfWords, priceWords, shareOf100 } from './words.ts';

export interface CompareTextStyle extends TextStyle {
  readonly animals: string;
}

export function compareText(comparison: Comparison, style: CompareTextStyle): string {
  return joinBlocks([
    bold(printable(comparison.model), style),
    statement(comparison, style),
    plans(comparison, style),
    ...comparison.objectives.filter(({ of }) => of !== 'money').map((one) => differences(comparison, one, style)),
    best(comparison, style),
    prices(comparison, style),
    patches(comparison, style),
    robustness(comparison.robustness, style),
    handling(comparison, style),
    wrap(comparison.afterHorizon, style),
    cautionList(comparison.cautions, style),
    dim(origin(comparison), style),
  ]);
}

function statement({ statement: { text, reservations, rule, strength } }: Comparison, style: TextStyle): string {
  const strong = { clear: 'clear', limited: 'limited', none: 'none' }[strength];
  return [
    wrap([text, ...reservations].join(' '), style),
    wrap(`Rule: ${rule}.`, style),
    wrap(`Strength: ${strong}. How much risk is acceptable, and at what cost, is for those who decide.`, style),
  ].join('\n');
}

function plans(comparison: Comparison, style: CompareTextStyle): string {
  const { scenarios, objectives, money } = comparison;
  const chances = objectives.filter(({ of }) => of === 'chance');
  const risks = fittedColumns(
    ['chance of', ...chances.map(({ name }) => name)],
    scenarios.map((plan) => [plan.name, ...plan.outcomes.map(({ probability }) => percent(probability))]),
    style,
  );
  const others = fittedColumns(
    [
      'plan',
      `${style.animals} at the end`,
      ...(money === null ? [] : ['cost now', 'undiscounted']),
      'beaten in everything',
    ],
    scenarios.map((plan) => [
      plan.name,
      whole(plan.animalsAtEnd.mean),
      ...(plan.cost === null ? [] : [plain(plan.cost.presentValue), plain(plan.cost.undiscounted)]),
      plan.notBeaten ? 'no' : 'yes',
    ]),
    style,
  );
  const definitions = chances.map(({ name, definition }) => wrap(`${name}: ${definition}`, style));
  const what = scenarios
    .filter(({ actions }) => actions.length > 0)
    .map(({ name, actions }) => wrap(`${name}: ${actions.map(({ words }) => words).join('; ')}`, style));
  const ranges = scenarios.flatMap(({ name, cost }) =>
    cost === null || cost.least === cost.most
      ? []
      : [wrap(`${name}: ${costWords(cost)} where prices are ranges`, style)],
  );
  const unit = money === null ? [] : [wrap(moneyLine(comparison), style), ...ranges];
  const intervals = scenarios.flatMap((plan) => chanceLines(comparison, plan, style));
  return [
    ...(chances.length === 0 ? [] : [risks, '']),
    others,
    '',
    ...definitions,
    ...what,
    ...unit,
    '',
    ...intervals,
  ].join('\n');
}

function moneyLine({ money }: Comparison): string {
  if (money === null) return '';
  const prices = money.priceYear === null ? '' : ` at prices of ${money.priceYear}`;
  return `Costs are in ${money.currency}${prices}, means over the futures; 'cost now' is discounted by ${percent(money.discount)} a year, the first year not.`;
}

function chanceLines(
  { notDrawn }: Comparison,
  { name, outcomes, ...plan }: ComparedPlan,
  style: TextStyle,
): readonly string[] {
  const unknown = notDrawn === true ? 'not drawn' : 'not given';
  const each = outcomes.map(({ name: outcome, probability, intervals: { runs, unknown: drawn } }) => {
    const range = ({ lower, upper }: { readonly lower: number; readonly upper: number }): string =>
      `${percent(lower)} to ${percent(upper)}`;
    const few = probability === 0 ? `at most ${percent(runs.upper)}` : range(runs);
    return `${outcome} ${percent(probability)} (runs: ${few}; unknown: ${drawn === null ? unknown : range(drawn)})`;
  });
  return [wrap(`${name}: ${[...each, `at the end ${courseWords({ name, outcomes, ...plan })}`].join('; ')}`, style)];
}

/** Chances between any two plans, other objectives against the first plan. */
function differences(
  { differences: all, scenarios }: Comparison,
  { name, of }: ObjectiveWords,
  style: CompareTextStyle,
): string {
  const base = scenarios[0]?.name;
  const own = all.filter((one) => one.outcome === name && (of === 'chance' || one.from === base));
  if (own.length === 0) return '';
  const drawn = own.some(({ intervalFromUnknown }) => intervalFromUnknown !== null);
  const unit = { chance: 'points of a hundred', animals: style.animals, money: 'money now' }[of];
  const rows = own.map((one) => [
    `${one.to} against ${one.from}`,
    change(one),
    between(one.of, one.interval),
    ...(drawn ? [one.intervalFromUnknown === null ? '' : between(one.of, one.intervalFromUnknown)] : []),
    apart(one),
  ]);
  const head = [`${name}, ${unit}`, 'differs by', '95 % from runs', ...(drawn ? ['from unknown'] : []), 'told apart'];
  return fittedColumns(head, rows, style);
}

function apart({ toldApart, estimate, interval }: PlanDifference): string {
  if (toldApart) return 'yes';
  return estimate === 0 && interval.lower === 0 && interval.upper === 0 ? 'the same' : 'no';
}

function best({ best: all, objectives, scenarios, draws }: Comparison, style: TextStyle): string {
  const asked = objectives.filter(({ better }) => better !== null);
  const cell = (outcome: string, scenario: string): string => {
    const found = all.find((one) => one.outcome === outcome && one.scenario === scenario);
    if (found === undefined) return '';
    const over = found.probabilityOverDraws === null ? '' : ` / ${shareOf100(found.probabilityOverDraws)}`;
    return `${shareOf100(found.probability)}${over}`;
  };
  const rows = scenarios.map(({ name, beaten }) => [
    name,
    ...asked.map((objective) => cell(objective.name, name)),
    `${shareOf100(beaten.runs)}${beaten.draws === null ? '' : ` / ${shareOf100(beaten.draws)}`}`,
  ]);
  const over =
    draws === undefined
      ? 'with as many other futures'
      : 'with as many other futures / over the draws of what is not known';
  return [
    wrap(`Of 100, how often best in, and beaten in everything by another (${over}; equals share):`, style),
    fittedColumns(['plan', ...asked.map(({ name }) => name), 'beaten in everything'], rows, style),
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
    : [`Patches that gain or lose at the end, ${style.animals} in the mean:`, ...lines].join('\n');
}

function robustness(all: readonly Robustness[], style: TextStyle): string {
  if (all.length === 0) return '';
  return [
    wrap(`Would another sound model reverse the order? ${robustWords(all)}`, style),
    ...all.map((one) => wrap(`${one.variant}: ${variantWords(one)}`, style)),
  ].join('\n');
}

function handling(comparison: Comparison, style: CompareTextStyle): string {
  const { sources } = comparison;
  const said = sources.flatMap((source) => sourceWords(source, style.animals, comparison.replicates));
  const steps = hasMoves(comparison)
    ? [
        'Before any animal is moved or released (after IUCN/SSC 2013):',
        ...translocationSteps.map((step) => `- ${step}`),
      ]
    : [];
  const take = hasTakes(comparison) ? [takeWords] : [];
  return [...said, ...steps, ...take].map((text) => wrap(text, style)).join('\n');
}

function origin({ seed, hash, tool, replicates, draws }: Comparison): string {
  const futures =
    draws === undefined ? `${replicates} futures` : `${draws.number} draws of ${draws.replicatesEach} futures`;
  return `${futures} of each plan, the same chance for all; seed ${seed}, hash ${hash.slice(0, 16)}, skein ${tool.version}`;
}
