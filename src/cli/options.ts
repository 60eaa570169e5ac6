// Options that several commands share, read from the words of the command line.
import { InvalidArgumentError, Option, type Command } from 'commander';
import type { Settings } from '../spec/settings.ts';
import { placesChoices, type PlacesChoice } from './places-choice.ts';

export interface CommonOptions {
  readonly set?: Settings['set'];
  readonly years?: number;
  readonly replicates?: number;
  readonly seed?: number;
  readonly draws?: number;
  readonly rare?: boolean;
  readonly precision?: number | undefined;
  readonly atMost?: number | undefined;
  readonly scenario?: string;
  /** Names of plans to compare; all where it is not said. */
  readonly only?: readonly string[];
  readonly robust?: boolean;
  readonly threads?: number;
  readonly json?: boolean;
  readonly out?: string;
  readonly quiet?: boolean;
  readonly allow?: readonly string[];
  readonly places?: PlacesChoice;
}

type Shared =
  | 'set'
  | 'years'
  | 'replicates'
  | 'seed'
  | 'draws'
  | 'rare'
  | 'precision'
  | 'at-most'
  | 'scenario'
  | 'only'
  | 'robust'
  | 'threads'
  | 'json'
  | 'out'
  | 'quiet'
  | 'allow'
  | 'places';

const options: Readonly<Record<Shared, () => Option>> = {
  set: () => new Option('--set <name=value>', 'give a named parameter another number (repeatable)').argParser(readSet),
  years: () => new Option('--years <n>', 'years to look ahead').argParser(wholeFrom(1, 100_000)),
  replicates: () => new Option('--replicates <n>', 'how often to run the model').argParser(wholeFrom(1, 100_000_000)),
  seed: () =>
    new Option('--seed <n>', 'the number that decides all chance').argParser(wholeFrom(0, Number.MAX_SAFE_INTEGER)),
  draws: () => new Option('--draws <n>', 'how often to draw what is not known').argParser(wholeFrom(0, 100_000)),
  rare: () => new Option('--rare', 'estimate rare outcomes by splitting, too'),
  precision: () =>
    new Option(
      '--precision <share>',
      'go on until 95 % intervals from the number of runs reach no further, such as 0.01',
    ).argParser(readPrecision),
  'at-most': () =>
    new Option('--at-most <n>', 'replicates after which --precision gives up').argParser(wholeFrom(1, 100_000_000)),
  scenario: () => new Option('--scenario <name>', 'the scenario to take; `as now` is the model without actions'),
  only: () =>
    new Option('--only <name>', 'compare this plan only, with `as now` (repeatable)').argParser(
      (name: string, before: readonly string[] | undefined) => [...(before ?? []), name],
    ),
  robust: () =>
    new Option('--robust', 'where plans are compared: ask other sound models whether they reverse the order'),
  threads: () =>
    new Option('--threads <n>', 'threads to run in; all cores where it pays').argParser(wholeFrom(1, 1024)),
  json: () => new Option('--json', 'print one JSON object instead of text'),
  out: () => new Option('--out <folder>', 'write tables and what is needed to run again'),
  allow: () =>
    new Option('--allow <folder>', 'let the model read data files from this folder, too (repeatable)').argParser(
      (folder: string, before: readonly string[] | undefined) => [...(before ?? []), folder],
    ),
  places: () =>
    new Option('--places <how>', 'how what is written tells where patches are (exact if nothing is said)').choices(
      placesChoices,
    ),
  quiet: () => new Option('--quiet', 'no warnings and no progress'),
};

export function addOptions(command: Command, wanted: readonly Shared[]): Command {
  return wanted.reduce((one, name) => one.addOption(options[name]()), command);
}

export function settingsOf({
  set,
  years,
  replicates,
  seed,
  draws,
  rare,
  scenario,
  precision,
  atMost,
}: CommonOptions): Settings {
  return {
    ...(set === undefined ? {} : { set }),
    ...(years === undefined ? {} : { years }),
    ...(replicates === undefined ? {} : { replicates }),
    ...(seed === undefined ? {} : { seed }),
    ...(draws === undefined ? {} : { draws }),
    ...(rare === undefined ? {} : { rare }),
    ...(precision === undefined ? {} : { precision }),
    ...(atMost === undefined ? {} : { atMost }),
    ...(scenario === undefined ? {} : { scenario }),
  };
}

function readSet(text: string, before: Settings['set']): NonNullable<Settings['set']> {
  const sign = text.indexOf('=');
  if (sign < 1 || sign === text.length - 1) throw new InvalidArgumentError('Write it as name=value.');
  return [...(before ?? []), { name: text.slice(0, sign).trim(), value: text.slice(sign + 1).trim() }];
}

function readPrecision(text: string): number {
  const match = /^(\d*\.?\d+)\s*(%?)$/u.exec(text.trim());
  const value = match === null ? NaN : Number(match[1]) / (match[2] === '%' ? 100 : 1);
  if (value > 0 && value < 0.5) return value;
  throw new InvalidArgumentError('It takes a share above 0 and below 0.5, such as 0.01.');
}

function wholeFrom(lowest: number, highest: number): (text: string) => number {
  return (text) => {
    const value = /^\d+$/.test(text) ? Number(text) : NaN;
    if (value >= lowest && value <= highest) return value;
    throw new InvalidArgumentError(`It takes a whole number from ${lowest} to ${highest}.`);
  };
}
