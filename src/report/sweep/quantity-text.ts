// What a sweep says of one measure in a terminal: its range, and what matters most for it.
import { differenceOfShares } from '../../sweep/summary/columns.ts';
import type { FactorSummary, QuantitySummary, SweepSummary } from '../../sweep/summary/summarise.ts';
import { percent } from '../../view/number.ts';
import { fittedColumns } from '../fitted-columns.ts';
import { bold, printable, wrap } from '../terminal.ts';
import type { SweepTextStyle } from './style.ts';
import { noneSeen, numberText, three } from './words.ts';

/** Rows of a table that is not asked for whole. */
const fewRows = 8;

export function quantityText(quantity: QuantitySummary, summary: SweepSummary, style: SweepTextStyle): string {
  const { name, unit, least, greatest, mean, noise, orderedBy, factors } = quantity;
  if (!Number.isFinite(least)) return `${bold(printable(name), style)}: no point has a number`;
  const write = (value: number): string => numberText(value, unit);
  const from = unit === 'share' || unit === differenceOfShares ? '' : ` ${unit}`;
  const range = `${write(least)} to ${write(greatest)}${from}, mean ${write(mean)}${noneSeen(quantity, summary)}`;
  const noisy = noise === null ? '' : `; ${percent(noise)} of its variance comes from the number of runs`;
  const { head, cells } = tableOf(summary, quantity);
  const shown = style.details ? factors : factors.slice(0, fewRows);
  return [
    bold(printable(name), style),
    wrap(`${range}${noisy}`, style),
    `what matters most, by ${orderedBy}:`,
    fittedColumns(
      ['number', ...head],
      shown.map((factor) => [factor.name, ...cells(factor)]),
      style,
    ),
    ...(shown.length < factors.length ? [`and ${factors.length - shown.length} more numbers`] : []),
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

function two(value: number): string {
  return value.toFixed(2).replace(/^-0\.00$/u, '0.00');
}
