// What a run says in a terminal: the answer in words first, then a small table, then the course of abundance.
import type { Chance, RunResults } from '../results/results.ts';
import { decimal, percent, plain } from '../view/number.ts';
import { answer, finished, lastYear } from './answer.ts';
import { handledWords } from './handled-words.ts';
import { outsideWords } from './section/counted.ts';
import { lowestWords } from './lowest-words.ts';
import { criterionWords } from './criterion-words.ts';
import { rareWords } from './rare-words.ts';
import { sparkLine } from './spark-line.ts';
import { whenWords } from './when-words.ts';
import { fittedColumns } from './fitted-columns.ts';
import { bold, dim, joinBlocks, printable, room, wrap, type TextStyle } from './terminal.ts';
import { meaningsOf } from './unknown-words.ts';

export interface RunTextStyle extends TextStyle {
  /** What one individual is called: 'females' or 'animals'. */
  readonly animals?: string;
}

export function runText(results: RunResults, style: RunTextStyle): string {
  const animals = style.animals ?? 'animals';
  const said = answer(results, animals);
  const blocks = [
    bold(printable(results.model), style),
    ...[said.lead.join(''), said.meaning, said.abundance, said.fromRuns, said.fromUnknown, said.call].map((text) =>
      text === null ? '' : wrap(text, style),
    ),
    outcomeTable(results, style),
    criterionWords(results)
      .map((text) => wrap(text, style))
      .join('\n'),
    rareWords(results)
      .map((text) => wrap(text, style))
      .join('\n'),
    course(results, animals, style),
    numbers(results, animals, style),
    cautionList(results.cautions, style),
    dim(origin(results), style),
  ];
  return joinBlocks(blocks);
}

function outcomeTable(results: RunResults, style: TextStyle): string {
  if (results.outcomes.length === 0) return '';
  const end = lastYear(results);
  const unknown = results.notDrawn ? 'not drawn' : 'not given';
  const rows = results.outcomes.flatMap((outcome) => [
    [`${outcome.name}: having ${outcome.words.happened}`, ...chanceCells(outcome.ever, unknown)],
    [`${outcome.name}: being ${outcome.words.now} in ${end}`, ...chanceCells(outcome.atEnd, unknown)],
  ]);
  const definitions = results.outcomes.flatMap((outcome, k) => {
    const when = whenWords(outcome, end);
    const told = [...(k === 0 ? [] : [outcome.definition]), ...(when === null ? [] : [when])];
    return told.length === 0 ? [] : [wrap(`${outcome.name}: ${told.join('; ')}`, style)];
  });
  const table = fittedColumns(['chance of', 'is', '95 % from runs', 'from unknown'], rows, style);
  const reasons = meaningsOf(results.outcomes.flatMap(({ ever, atEnd }) => [ever.noUnknown, atEnd.noUnknown]));
  return [
    table,
    ...(reasons === '' ? [] : [wrap(reasons, style)]),
    ...(definitions.length > 0 ? ['', ...definitions] : []),
  ].join('\n');
}

function chanceCells(
  { probability, interval, intervalFromUnknown, noUnknown }: Chance,
  none: string,
): readonly string[] {
  const range = probability === 0 ? `at most ${percent(interval.upper)}` : between(interval);
  const unknown = intervalFromUnknown === null ? (noUnknown ?? none) : between(intervalFromUnknown);
  return [percent(probability), range, unknown];
}

function between({ lower, upper }: { readonly lower: number; readonly upper: number }): string {
  return `${percent(lower)} to ${percent(upper)}`;
}

function course(results: RunResults, animals: string, style: TextStyle): string {
  const years = results.abundance.whole;
  const [first, last] = [years[0], years[years.length - 1]];
  if (first === undefined || last === undefined) return '';
  const line = sparkLine(
    years.map((one) => one.quantiles['0.5']),
    room(style) - 12,
  );
  return `the middle of ${plain(finished(results))} futures, ${animals} by year\n${first.year} ${line} ${last.year}`;
}

function numbers(results: RunResults, animals: string, style: TextStyle): string {
  const lowest = `mean lowest count: ${lowestWords(results, animals)}`;
  const end = results.patchesInUse[results.patchesInUse.length - 1];
  const inUse = end === undefined ? '' : `patches in use in ${end.year}: ${decimal(end.mean)} in the mean`;
  const { runs, reasons } = results.stopped;
  const stopped =
    runs === 0 ? '' : `${plain(runs)} runs had to be stopped and are in no number here: ${reasons.join('; ')}`;
  const precise = precisionWords(results);
  const { observed } = results;
  const counted = observed === undefined ? '' : outsideWords(observed);
  const handled = handledWords(results, animals).map(([name, words]) => `${name}: ${words}`);
  return [precise, lowest, inUse, counted, ...handled, stopped]
    .filter((text) => text !== '')
    .map((text) => wrap(text, style))
    .join('\n');
}

function precisionWords({ precision, replicates, draws }: RunResults): string {
  if (precision === undefined) return '';
  const { asked, halfWidth, reached } = precision;
  const runs = `${plain(replicates)} runs${draws === undefined ? '' : ` in ${plain(draws.number)} draws`}`;
  return reached
    ? `every chance is known to ${percent(asked)} to either side after ${runs}, as asked (from the number of runs)`
    : `not every chance is known to ${percent(asked)} to either side after ${runs}, the most that was allowed: the widest interval reaches ${percent(halfWidth)}`;
}

export function cautionList(cautions: readonly string[], style: TextStyle): string {
  return cautions.map((text) => `- ${wrap(text, style, '  ').trimStart()}`).join('\n');
}

function origin(results: RunResults): string {
  return `seed ${results.seed}, hash ${results.hash.slice(0, 16)}, skein ${results.tool.version}`;
}
