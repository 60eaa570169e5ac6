// The outcomes with their definitions and both intervals, and the few other numbers of the whole run.
import type { Model } from '../../model/model.ts';
import type { Chance, Interval, OutcomeResult, RunResults } from '../../results/results.ts';
import { mark, type Content, type Markup } from '../../view/markup.ts';
import { decimal, percent, plain } from '../../view/number.ts';
import { scrolling } from '../../view/table.ts';
import { finished, lastYear } from '../answer.ts';
import { handledWords } from '../handled-words.ts';
import { lowestWords } from '../lowest-words.ts';
import { whenWords } from '../when-words.ts';
import { list, section } from './section.ts';

export function outcomesSection(model: Model, results: RunResults): Markup {
  const { outcomes } = results;
  const table = outcomes.length === 0 ? mark`<p>The model names no outcome.</p>` : outcomeTable(results, outcomes);
  const more = outcomes.length - onFirstSheet;
  const note = `The other ${plain(more)} ${more === 1 ? 'outcome stands' : 'outcomes stand'} behind the map and the chances.`;
  const onPaper = more > 0 ? mark`<p class="paper note">${note}</p>` : null;
  return section('outcomes', 'Outcomes', mark`${table}${onPaper}${others(model, results)}`);
}

/** So many fit on the first sheet of paper beside question and answer; the style of the page hides the others there. */
const onFirstSheet = 4;

/** Those that do not, for paper alone. */
export function laterOutcomes(results: RunResults): Markup | null {
  const later = results.outcomes.slice(onFirstSheet);
  if (later.length === 0) return null;
  return mark`<div class="paper" aria-hidden="true">${outcomeTable(results, later)}</div>`;
}

const heads = [
  'outcome and what it means',
  'chance of',
  'is',
  'interval from the number of runs',
  'interval from what is not known',
];

function outcomeTable(results: RunResults, outcomes: readonly OutcomeResult[]): Markup {
  const end = lastYear(results);
  const caption = `Chances over ${plain(finished(results))} futures, from ${results.firstYear} to ${end}`;
  const unknown = results.notDrawn ? 'not drawn' : 'no uncertainty was given';
  const head = heads.map((name) => mark`<th scope="col">${name}</th>`);
  const bodies = outcomes.map((outcome) => outcomeRows(outcome, end, unknown));
  return scrolling(
    caption,
    mark`<table class="outcomes"><caption>${caption}</caption><thead><tr>${head}</tr></thead>${bodies}</table>`,
  );
}

function outcomeRows(outcome: OutcomeResult, end: number, unknown: string): Markup {
  const { name, definition, words: said, ever, atEnd } = outcome;
  const when = whenWords(outcome, end);
  const words = mark`<bdi>${name}</bdi><small><bdi>${definition}</bdi>${when === null ? null : mark`. ${capital(when)}.`}</small>`;
  return mark`<tbody>
<tr><th scope="rowgroup" rowspan="2">${words}</th>${chanceCells(`having ${said.happened}`, ever, unknown)}</tr>
<tr>${chanceCells(`being ${said.now} in ${end}`, atEnd, unknown)}</tr>
</tbody>`;
}

function capital(text: string): string {
  return `${text.slice(0, 1).toUpperCase()}${text.slice(1)}`;
}

function chanceCells(of: string, chance: Chance, none: string): Markup {
  const { probability, interval, intervalFromUnknown, noUnknown } = chance;
  const unknown = intervalFromUnknown === null ? (noUnknown ?? none) : range(intervalFromUnknown, null);
  return mark`<th scope="row" class="words">${of}</th><td><strong>${percent(probability)}</strong></td>
<td>${range(interval, probability)}</td><td class="words">${unknown}</td>`;
}

function range({ lower, upper, level }: Interval, probability: number | null): string {
  const sure = `(${plain(level * 100)}\u00a0%)`;
  if (probability === 0) return `no case; at most ${percent(upper)} ${sure}`;
  return `${percent(lower)} to ${percent(upper)} ${sure}`;
}

function others(model: Model, results: RunResults): Markup {
  const animals = model.counts === 'females' ? 'females' : 'animals';
  const lowest = `${lowestWords(results, animals)}; it is the mean, over the futures, of the lowest count that each one sees`;
  const items: (readonly [string, Content])[] = [['mean lowest count', lowest]];
  const end = results.patchesInUse[results.patchesInUse.length - 1];
  if (end !== undefined) {
    const most = `${plain(end.quantiles['0.05'])} to ${plain(end.quantiles['0.95'])} in 90 of 100 futures`;
    const used = `${decimal(end.mean)} of ${plain(model.patches.length)} in the mean, ${most}`;
    items.push([`patches in use in ${end.year}`, used]);
  }
  for (const [name, words] of handledWords(results, animals)) items.push([name, words]);
  const { runs, reasons } = results.stopped;
  const stopped = `${plain(runs)}, which are in no other number here: ${reasons.join('; ')}`;
  if (runs > 0) items.push(['runs that had to be stopped', stopped]);
  return list('numbers', items);
}
