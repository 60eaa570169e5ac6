// What a sweep says in a terminal: for each measure its range, and what matters most first.
import {
  differenceOfShares,
  type SweepSummary,
  type FactorSummary,
  type QuantitySummary,
} from '../sweep/summary/summarise.ts';
import type { Ranking } from '../sweep/summary/ranking.ts';
import { wilson } from '../results/wilson.ts';
import { percent } from '../view/number.ts';
import { fittedColumns } from './fitted-columns.ts';
import { bold, dim, joinBlocks, printable, wrap, type TextStyle } from './terminal.ts';

export function sweepText(summary: SweepSummary, style: TextStyle): string {
  const { model, points, design, failed, quantities, rankings, assumptions, runs } = summary;
  const of = runs === null ? '' : `, ${runs.replicates.toLocaleString('en')} runs of ${runs.years} years each`;
  const swept = summary.factors.map(({ name }) => withUnit(name, summary));
  return joinBlocks([
    bold(printable(model), style),
    wrap(`${points.toLocaleString('en')} points (${design})${of}, over ${swept.join(', ')}`, style),
    failed.points === 0 ? '' : failedText(summary, style),
    ...rankings.map((ranking) => rankingText(ranking, style)),
    ...quantities.map((quantity) => quantityText(quantity, summary, style)),
    ...assumptions.map((text) => wrap(text, style)),
    dim(`skein ${summary.tool.version}, kernel ${summary.tool.kernel}, hash ${summary.hash.slice(0, 12)}`, style),
  ]);
}

/** A swept number as readers meet it, such as `patches.Pond.capacity (animals)`. */
export function withUnit(name: string, { factors }: SweepSummary): string {
  const unit = factors.find((one) => one.name === name)?.unit ?? '';
  return unit === '' ? name : `${name} (${unit})`;
}

/** What a chance of nothing seen may still be. */
export function noneSeen({ unit, least }: QuantitySummary, { runs }: SweepSummary): string {
  if (unit !== 'share' || least !== 0 || runs === null) return '';
  const most = percent(wilson(0, runs.replicates).upper);
  return `; 0\u00a0% of ${runs.replicates.toLocaleString('en')} runs of a point means at most ${most} (95\u00a0%)`;
}

function failedText({ failed, points }: SweepSummary, style: TextStyle): string {
  const most = failed.reasons.toSorted((a, b) => b.points - a.points).slice(0, 5);
  const head = `${failed.points.toLocaleString('en')} of ${points.toLocaleString('en')} points are models that cannot be, and have no numbers:`;
  return [
    wrap(head, style),
    ...most.map((one) => wrap(`${one.reason} (${one.points.toLocaleString('en')})`, style, '  ')),
  ].join('\n');
}

function quantityText(quantity: QuantitySummary, summary: SweepSummary, style: TextStyle): string {
  const { name, unit, least, greatest, mean, noise, orderedBy, factors } = quantity;
  if (!Number.isFinite(least)) return `${bold(printable(name), style)}: no point has a number`;
  const shown = (value: number): string => numberText(value, unit);
  const from = unit === 'share' || unit === differenceOfShares ? '' : ` ${unit}`;
  const range = `${shown(least)} to ${shown(greatest)}${from}, mean ${shown(mean)}${noneSeen(quantity, summary)}`;
  const noisy = noise === null ? '' : `; ${percent(noise)} of its variance comes from the number of runs`;
  const { head, cells } = tableOf(summary, quantity);
  return [
    wrap(`${bold(printable(name), style)}: ${range}${noisy}`, style),
    `what matters most, by ${orderedBy}:`,
    fittedColumns(
      ['number', ...head],
      factors.map((factor) => [factor.name, ...cells(factor)]),
      style,
    ),
    ...throughOne(factors).map((text) => wrap(text, style)),
  ].join('\n');
}

interface FactorTable {
  readonly head: readonly string[];
  cells(factor: FactorSummary): readonly string[];
}

function tableOf({ design }: SweepSummary, { unit }: QuantitySummary): FactorTable {
  const shown = (value: number): string => numberText(value, unit);
  const span = ({ response }: FactorSummary): readonly string[] => {
    const [first, last] = [response.groups[0], response.groups.at(-1)];
    return first === undefined || last === undefined ? ['', ''] : [shown(first.mean), shown(last.mean)];
  };
  switch (design) {
    case 'sobol indices':
      return {
        head: ['alone', '95 %', 'in all', '95 %'],
        cells: ({ shares }) =>
          shares === null
            ? ['', '', '', '']
            : [two(shares.first), bandText(shares.firstBand), two(shares.total), bandText(shares.totalBand)],
      };
    case 'morris':
      return {
        head: ['mean size', '± error', 'mean', 'spread', 'noise'],
        cells: ({ screen }) =>
          screen === null
            ? ['', '', '', '', '']
            : [screen.meanSize, screen.standardError, screen.mean, screen.spread, screen.noise].map((value) =>
                three(value),
              ),
      };
    case 'one at a time':
      return { head: ['at its least', 'at its most'], cells: span };
    default:
      return {
        head: ['of variance', 'rank correlation', '95 %', 'at its least', 'at its most'],
        cells: (factor) => [
          factor.response.explained === null ? '' : percent(factor.response.explained),
          factor.rankCorrelation === null ? '' : two(factor.rankCorrelation.correlation),
          factor.rankCorrelation === null ? '' : bandText(factor.rankCorrelation.band),
          ...span(factor),
        ],
      };
  }
}

function rankingText({ quantity, better, scenarios, agree, factors }: Ranking, style: TextStyle): string {
  const sure = agree === null ? '' : `; both halves of the runs name the same one at ${percent(agree)} of the points`;
  const head = `${bold(`best by ${printable(quantity)}`, style)} (${better} is better)`;
  if (factors.every(({ groups }) => groups.every(({ best }) => allEqual(best))))
    return wrap(`${head}: no scenario differs from another by it`, style);
  return [
    wrap(`${head}${sure}`, style),
    fittedColumns(
      ['scenario', 'best at'],
      scenarios.map(({ name, best }) => [name, percent(best)]),
      style,
    ),
    fittedColumns(
      ['number', 'decides'],
      factors.map(({ name, decides }) => [name, decides === null ? '' : percent(decides)]),
      style,
    ),
    ...factors.map((factor) => wrap(preferredText(factor), style)),
  ].join('\n');
}

/** Which scenario is best in the mean, from the least value of a number to its greatest. */
function preferredText({ name, groups, switches }: Ranking['factors'][number]): string {
  const [first] = groups;
  if (first === undefined) return '';
  if (switches.length === 0) return `over ${printable(name)}: ${preferredName(first.preferred)} all along`;
  const changed = groups.filter(({ preferred }, i) => i > 0 && groups[i - 1]?.preferred !== preferred);
  const later = changed.map(({ from, preferred }, i) => {
    const at = switches[i]?.at ?? null;
    return `${at === null ? `at ${printable(String(from))}` : `from ${three(at)}`} ${preferredName(preferred)}`;
  });
  return `over ${printable(name)}: first ${[preferredName(first.preferred), ...later].join('; ')}`;
}

function preferredName(preferred: string): string {
  return preferred === 'equal' ? 'several alike' : `“${printable(preferred)}”`;
}

function allEqual(shares: readonly number[]): boolean {
  return shares.every((share) => Math.abs(share * shares.length - 1) < 1e-9);
}

function throughOne(factors: readonly FactorSummary[]): readonly string[] {
  return factors.flatMap(({ name, throughOne: at }) =>
    at === null || at.length === 0
      ? []
      : [`growth goes through 1, in the mean over the other numbers, at ${name} ${at.map(three).join(', ')}`],
  );
}

function bandText({ lower, upper }: { readonly lower: number; readonly upper: number }): string {
  return `${two(lower)} to ${two(upper)}`;
}

/** A number of a measure, for readers. */
export function numberText(value: number, unit: string): string {
  if (unit === differenceOfShares) return `${(100 * value).toFixed(1).replace(/^-0\.0$/u, '0.0')} points`;
  return unit === 'share'
    ? percent(value)
    : Math.abs(value) >= 100
      ? Math.round(value).toLocaleString('en')
      : three(value);
}

function two(value: number): string {
  return value.toFixed(2).replace(/^-0\.00$/u, '0.00');
}

/** Four digits that count. */
export function three(value: number): string {
  return String(Number(value.toPrecision(4)));
}
