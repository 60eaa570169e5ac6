// The table of plans against objectives, with both intervals, money, and which plan is beaten in all risks and in cost.
import type { Comparison, ComparedPlan } from '../../compare/results.ts';
import { mark, type Content, type Markup } from '../../view/markup.ts';
import { percent, plain, whole } from '../../view/number.ts';
import { drawTable, scrolling, type Row } from '../../view/table.ts';
import {
  beatenIn,
  between,
  change,
  costWords,
  courseWords,
  priceOfWords,
  priceWords,
  shareOf100,
} from '../compare/words.ts';
import { prose, section } from '../section/section.ts';
import { meaningsOf } from '../unknown-words.ts';

export function plansSection(comparison: Comparison, animals: string): Markup {
  return section('plans', 'The plans', mark`${plansTable(comparison, animals)}${actionList(comparison)}`);
}

/** What the table means, and how sure it is which plan is best. */
export function readingSection(comparison: Comparison): Markup {
  return section(
    'reading',
    'How to read the plans',
    mark`<div class="paper">${actionList(comparison)}</div>${notes(comparison)}${sureTable(comparison)}`,
  );
}

/** One column a plan, one row an objective. */
function plansTable(comparison: Comparison, animals: string): Markup {
  const { scenarios, objectives, money, statement, firstYear, years } = comparison;
  const heads = scenarios.map(({ name }) => {
    const flag = statement.plans.includes(name) ? mark`<small class="chosen">left by the rule above</small>` : null;
    return mark`<th scope="col"><bdi>${name}</bdi>${flag}</th>`;
  });
  const row = (name: Content, cell: (plan: ComparedPlan) => Content): Markup =>
    mark`<tr><th scope="row">${name}</th>${scenarios.map((plan) => mark`<td data-plan="${plan.name}">${cell(plan)}</td>`)}</tr>`;
  const chances = objectives
    .filter(({ of }) => of === 'chance')
    .map(({ name }) => row(mark`chance of “<bdi>${name}</bdi>”`, (plan) => chanceCell(comparison, plan, name)));
  const taken = scenarios.some(({ animalsTaken }) => animalsTaken !== null);
  const rows = [
    ...chances,
    row(`${animals} at the end, mean`, endCell),
    ...(taken ? [row(`${animals} taken, mean`, ({ animalsTaken }) => whole(animalsTaken?.mean ?? 0))] : []),
    ...(money === null
      ? []
      : [
          row(`cost now, ${money.currency}`, ({ cost }) => (cost === null ? '' : costWords(cost))),
          row('cost undiscounted', ({ cost }) => (cost === null ? '' : plain(cost.undiscounted))),
        ]),
    row(beatenIn(comparison), beatenCell),
  ];
  const caption = `Plans over ${plain(comparison.replicates)} futures each, from ${firstYear} to ${firstYear + years - 1}`;
  return scrolling(
    caption,
    mark`<table class="plans"><caption>${caption}</caption><thead><tr><th scope="col">objective</th>${heads}</tr></thead><tbody>${rows}</tbody></table>`,
  );
}

function chanceCell({ notDrawn, differences, scenarios }: Comparison, plan: ComparedPlan, outcome: string): Content {
  const found = plan.outcomes.find(({ name }) => name === outcome);
  if (found === undefined) return '';
  const { probability, intervals } = found;
  const { runs, unknown: drawn, noUnknown } = intervals;
  const range = probability === 0 ? `at most ${percent(runs.upper)}` : briefly(runs);
  const none = noUnknown ?? (notDrawn === true ? 'not drawn' : 'none given');
  const second = drawn === null ? none : briefly(drawn);
  const against = differences.find(
    (one) => one.outcome === outcome && one.from === scenarios[0]?.name && one.to === plan.name,
  );
  const more =
    against === undefined
      ? null
      : mark`<small class="more">difference: ${change(against)} (${between('chance', against.interval)})</small>`;
  return mark`<strong>${percent(probability)}</strong><small>runs: ${range}</small><small>unknown: ${second}</small>${more}`;
}

/** Such as `4.4 to 8.7 %`. */
function briefly({ lower, upper }: { readonly lower: number; readonly upper: number }): string {
  return `${percent(lower).replace('\u00a0%', '')} to ${percent(upper)}`;
}

function endCell(plan: ComparedPlan): Content {
  const { quantiles, mean } = plan.animalsAtEnd;
  const range = `${whole(quantiles['0.05'])} to ${whole(quantiles['0.95'])} in 90 of 100`;
  return mark`${whole(mean)}<small>${range}</small><small>${courseWords(plan)}</small>`;
}

function beatenCell({ notBeaten, beaten }: ComparedPlan): Content {
  const draws = beaten.draws === null ? null : mark`<small>in ${shareOf100(beaten.draws)} of 100 draws</small>`;
  return mark`${notBeaten ? 'no' : 'yes'}<small>in ${shareOf100(beaten.runs)} of 100</small>${draws}`;
}

function actionList({ scenarios }: Comparison): Markup | null {
  const items = scenarios
    .filter(({ actions }) => actions.length > 0)
    .map(
      ({ name, actions }) =>
        mark`<li>“<bdi>${name}</bdi>”: <bdi>${actions.map(({ words }) => words).join('; ')}</bdi></li>`,
    );
  return items.length === 0 ? null : mark`<ul class="actions">${items}</ul>`;
}

function notes({ objectives, money, afterHorizon, scenarios }: Comparison): Markup {
  const definitions = objectives
    .filter(({ of }) => of === 'chance')
    .map(({ name, definition }) => mark`“<bdi>${name}</bdi>”: <bdi>${definition}</bdi>. `);
  const prices =
    money === null
      ? ''
      : `Costs are means over the futures in ${money.currency}${money.priceYear === null ? '' : ` at prices of ${money.priceYear}`}, discounted by ${percent(money.discount)} a year, the first year not. `;
  const beaten =
    'A plan is beaten where another is at least as good in every chance and in cost (prices at their middle), and better in one, whatever its animals at the end; the small numbers say how often that is so with as many other futures. ';
  const none = meaningsOf(scenarios.flatMap(({ outcomes }) => outcomes.map(({ intervals }) => intervals.noUnknown)));
  const unknown = none === '' ? '' : `Where no interval from what is not known stands, ${none} `;
  return mark`<p>${definitions}${prices}${unknown}${beaten}${prose(afterHorizon)}</p>`;
}

/** How sure it is which plan is best in what, and what a gain costs. */
function sureTable(comparison: Comparison): Markup {
  const { best, objectives, scenarios, draws } = comparison;
  const asked = objectives.filter(({ better }) => better !== null);
  const rows = scenarios.map(({ name }): Row => [
    name,
    ...asked.map((objective) => {
      const found = best.find((one) => one.outcome === objective.name && one.scenario === name);
      const over = found?.probabilityOverDraws ?? null;
      return `${shareOf100(found?.probability ?? 0)}${over === null ? '' : ` / ${shareOf100(over)}`}`;
    }),
  ]);
  const over = draws === undefined ? '' : ' / of 100 draws of what is not known';
  const caption = `In how many of 100 comparisons with as many other futures${over} each plan is best; equals share`;
  return drawTable({ caption, head: ['plan', ...asked.map(({ name }) => name)], rows });
}

/** Money for one chance in a hundred bettered. */
export function priceTable(comparison: Comparison): Markup | null {
  const { scenarios, money } = comparison;
  const outcomes = scenarios.at(-1)?.prices.map(({ outcome }) => outcome) ?? [];
  if (money === null || outcomes.length === 0) return null;
  const rows = scenarios
    .slice(1)
    .map(({ name, prices: own }): Row => [name, ...own.map((price) => priceWords(price, comparison))]);
  const ranged = scenarios.some(({ cost }) => cost !== null && cost.least !== cost.most);
  const prices = ranged ? ' and the range of prices' : '';
  const caption = `${priceOfWords(comparison)}, with the 95 % interval of the difference${prices}`;
  return drawTable({ caption, head: ['plan', ...outcomes], rows });
}
