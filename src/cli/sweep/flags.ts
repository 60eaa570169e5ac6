// What the words of `skein sweep` ask for, laid over the section `sweep` of the model.
import { InvalidArgumentError, Option, type Command } from 'commander';
import { readCsv } from '../../spec/data/csv.ts';
import type { SweepSpec } from '../../spec/schema/spec.ts';
import { sourceText } from '../../spec/text/source.ts';
import { Ending, exitCodes } from '../exit.ts';
import { readText } from '../input.ts';
import type { CommonOptions } from '../options.ts';

type Ranges = NonNullable<SweepSpec['over']>;
type DesignWord = NonNullable<SweepSpec['design']>;
type MeasureWord = NonNullable<SweepSpec['measures']>[number];

const designs: readonly DesignWord[] = [
  'grid',
  'list',
  'latin hypercube',
  'sobol',
  'one at a time',
  'sobol indices',
  'morris',
];
const measures: readonly MeasureWord[] = [
  'growth',
  'damping',
  'standing',
  'path-end',
  'chance',
  'chance-at-end',
  'lowest',
  'animals',
  'patches-in-use',
  'cost',
];

export interface Shard {
  /** From 1. */
  readonly shard: number;
  readonly of: number;
}

export interface SweepOptions extends CommonOptions {
  readonly over?: Ranges;
  readonly design?: DesignWord;
  readonly list?: string;
  readonly points?: number;
  readonly designSeed?: number;
  readonly plain?: boolean;
  readonly measure?: readonly MeasureWord[];
  readonly compare?: 'all' | string[];
  readonly shard?: Shard;
  readonly plan?: boolean;
  readonly details?: boolean;
}

/** Of every command that tells of a sweep. */
export const detailsOfSweep = 'print every measure under every plan and what matters for it, too';

export function addSweepOptions(command: Command): Command {
  const over = '--over <name=values>';
  const whole = new Option(
    '--points <n>',
    'points of a sampled design, rows of shares of variance, or walks',
  ).argParser(wholeFrom(2));
  return command
    .addOption(
      new Option(over, 'sweep over a number: from:to, from:to:steps, a,b,c or as-uncertain (repeatable)').argParser(
        readOver,
      ),
    )
    .addOption(new Option('--design <name>', 'which points').choices(designs))
    .option('--list <file>', 'a CSV file of points, a column a number')
    .addOption(whole)
    .addOption(
      new Option('--measure <names>', `what to ask at each point: ${measures.join(', ')}`).argParser(readMeasures),
    )
    .addOption(
      new Option('--design-seed <n>', 'decides where the points of a sampled design lie').argParser(wholeFrom(0)),
    )
    .option('--plain', 'Sobol points as they are, not scrambled')
    .addOption(
      new Option('--compare <names>', 'set scenarios beside each other at every point: all, or a,b,c').argParser(
        (text: string) => (text === 'all' ? text : text.split(',').map((name) => name.trim())),
      ),
    )
    .addOption(
      new Option('--shard <i/n>', 'do only the i-th of n shards, for `skein sweep merge`').argParser(readShard),
    )
    .option('--plan', 'say what would be done and what it costs, and stop')
    .option('--details', detailsOfSweep);
}

function wholeFrom(lowest: number): (text: string) => number {
  return (text) => {
    const value = /^\d{1,15}$/u.test(text) ? Number(text) : NaN;
    if (value >= lowest) return value;
    throw new InvalidArgumentError(`It takes a whole number from ${lowest}.`);
  };
}

const overForm = 'Write it as name=from:to, name=from:to:steps, name=value,value,… or name=as-uncertain.';

function readOver(text: string, before: Ranges | undefined): Ranges {
  const sign = text.indexOf('=');
  const [name, values] = [text.slice(0, sign).trim(), text.slice(sign + 1).trim()];
  if (sign < 1 || values === '') throw new InvalidArgumentError(overForm);
  return { ...before, [name]: rangeOf(values) };
}

function rangeOf(text: string): Ranges[string] {
  if (text === 'as-uncertain') return { 'as-uncertain': true };
  const parts = text.split(':');
  if (parts.length === 1) return text.split(',').map((value) => numberOr(value.trim()));
  const [from = NaN, to = NaN, steps] = parts.map((part) => (part.trim() === '' ? NaN : Number(part)));
  const whole = steps === undefined || (Number.isInteger(steps) && steps >= 2);
  if (Number.isNaN(from) || Number.isNaN(to) || !whole || parts.length > 3) throw new InvalidArgumentError(overForm);
  return { from, to, ...(steps === undefined ? {} : { steps }) };
}

function numberOr(text: string): number | string {
  return text !== '' && Number.isFinite(Number(text)) ? Number(text) : text;
}

function readMeasures(text: string, before: readonly MeasureWord[] | undefined): readonly MeasureWord[] {
  const found = text.split(',').map((word) => {
    const known = measures.find((one) => one === word.trim());
    if (known === undefined) throw new InvalidArgumentError(`\`${word.trim()}\` is none of ${measures.join(', ')}.`);
    return known;
  });
  return [...new Set([...(before ?? []), ...found])];
}

function readShard(text: string): Shard {
  const [shard = NaN, of = NaN] = /^(\d{1,6})\/(\d{1,6})$/u.exec(text)?.slice(1).map(Number) ?? [];
  if (shard >= 1 && shard <= of) return { shard, of };
  throw new InvalidArgumentError('Write it as i/n, such as 1/4, with i from 1 to n.');
}

/** Flags stand above the section; a list of points takes the place of numbers to sweep over, and the other way round. */
export function askedOf(section: SweepSpec | undefined, options: SweepOptions): SweepSpec {
  const { over, design, list, points, designSeed, plain, measure, compare } = options;
  const named: SweepSpec = { ...section };
  if (over !== undefined || list !== undefined) {
    delete named.list;
    delete named.over;
  }
  const whole = list === undefined ? (design ?? named.design ?? 'grid') : 'list';
  if (points !== undefined && (whole === 'grid' || whole === 'one at a time' || whole === 'list')) {
    const other = 'give each number its steps (name=from:to:steps), or take another --design';
    throw new Ending(exitCodes.usage, `--points says nothing of the design \`${whole}\`: ${other}.`);
  }
  return {
    ...named,
    ...(over === undefined ? {} : { over }),
    ...(list === undefined ? {} : { list: readList(list) }),
    ...(design === undefined ? {} : { design }),
    ...(points === undefined ? {} : { points }),
    ...(designSeed === undefined ? {} : { seed: designSeed }),
    ...(plain === true ? { scrambled: false } : {}),
    ...(compare === undefined ? {} : { compare }),
    ...(measure === undefined ? {} : { measures: [...measure] }),
  };
}

/** A table with the names of numbers in its first line. */
function readList(path: string): NonNullable<SweepSpec['list']> {
  const read = readCsv(sourceText(path, readText(path)));
  if (!read.ok) throw new Ending(exitCodes.model, `Cannot read ${path}: ${read.message}.`);
  const names = read.header.map(({ source }) => source);
  return read.rows.map((row, i) => {
    if (row.length !== names.length) {
      const expected = `${names.length} cells, as the first line has`;
      throw new Ending(exitCodes.model, `${path}, row ${i + 2}: it has ${row.length} cells; expected ${expected}.`);
    }
    const known = row.flatMap((cell, k): (readonly [string, number | string])[] =>
      cell.source === '' ? [] : [[names[k] ?? '', numberOr(cell.source)]],
    );
    return Object.fromEntries(known);
  });
}
