// What a comparison says in a terminal: the statement first, then the plans, then what tells them apart.
import type { Comparison, Robustness } from '../../compare/results.ts';
import { bold, dim, joinBlocks, printable, wrap, type TextStyle } from '../terminal.ts';
import { cautionList } from '../text.ts';
import { detailsText, differencesTable } from './details-text.ts';
import { amountsText, chancesText, meaningsText } from './plans-text.ts';
import { robustWords, variantWords } from './robust-words.ts';
import type { CompareTextStyle } from './style.ts';
import { handledByPlan, hasMoves, hasTakes, sourcesWords, takeWords, translocationSteps } from './translocation.ts';
import { priceWords } from './words.ts';

export function compareText(comparison: Comparison, style: CompareTextStyle): string {
  return joinBlocks([
    bold(printable(comparison.model), style),
    statement(comparison, style),
    chancesText(comparison, style),
    gains(comparison, style),
    amountsText(comparison, style),
    meaningsText(comparison, style),
    style.details ? detailsText(comparison, style) : '',
    robustness(comparison.robustness, style),
    handling(comparison, style),
    wrap(comparison.afterHorizon, style),
    cautionList(comparison.cautions, style),
    dim(wrap(origin(comparison), style), style),
    ...(style.details ? [] : [dim(wrap(more, style), style)]),
  ]);
}

const more = 'With `--details`: all pairs and outcomes, how often each is best, patches that gain or lose.';

function statement({ statement: { text, reservations, rule, strength } }: Comparison, style: TextStyle): string {
  const strong = { clear: 'clear', limited: 'limited', none: 'none' }[strength];
  return [
    wrap([text, ...reservations].join(' '), style),
    wrap(`Rule: ${rule}.`, style),
    wrap(`Strength: ${strong}. How much risk is acceptable, and at what cost, is for those who decide.`, style),
  ].join('\n');
}

/** What the plans gain over the first in what decides, at which price, and which of them cannot be told apart in it. */
function gains(comparison: Comparison, style: CompareTextStyle): string {
  const { objectives, differences, scenarios, money } = comparison;
  const [decides] = objectives;
  const base = scenarios[0]?.name;
  if (decides === undefined || base === undefined) return '';
  const own = differences.filter(({ outcome }) => outcome === decides.name);
  const priceOf = (plan: string): string => {
    const price = scenarios.find(({ name }) => name === plan)?.prices.find(({ outcome }) => outcome === decides.name);
    return price === undefined ? '' : priceWords(price, { money: null });
  };
  const beside = own.filter(({ from }) => from === base);
  const prices = money === null || decides.of !== 'chance' ? null : beside.map(({ to }) => priceOf(to));
  const table = differencesTable(beside, decides, style, { against: base, prices });
  const alike = own.filter(({ toldApart, from }) => !toldApart && from !== base);
  const pairs = alike.map(({ from, to }) => `“${to}” and “${from}”`).join('; ');
  if (own.length === beside.length) return table;
  const told = pairs === '' ? 'All pairs of them are told apart' : `Not told apart are ${pairs}`;
  return [table, wrap(`${told}.`, style)].join('\n');
}

function robustness(all: readonly Robustness[], style: TextStyle): string {
  if (all.length === 0) return '';
  return [
    wrap(`Would another sound model reverse the order? ${robustWords(all)}`, style),
    ...all.map((one) => wrap(`${one.variant}: ${variantWords(one)}`, style)),
  ].join('\n');
}

function handling(comparison: Comparison, style: CompareTextStyle): string {
  const said = [...handledByPlan(comparison, style.animals), ...sourcesWords(comparison, style.animals)];
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
