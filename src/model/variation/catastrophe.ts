// Catastrophes: where and how often they begin, how far they reach, and what they multiply.
import { pinned } from '../../machine/pinned.ts';
import { readChance } from '../../spec/chance.ts';
import type { SpecPath } from '../../spec/document.ts';
import { readQuantity } from '../../spec/quantity.ts';
import type { CatastropheSpec } from '../../spec/schema/spec.ts';
import type { Catastrophe, MultipliedRate } from '../chance.ts';
import { classIndex, fail, patchIndex, type Context } from '../context.ts';
import type { Phase, SurvivalPhase } from '../model.ts';
import { requirePlaces } from '../places.ts';
import { wholeYears } from '../years.ts';
import { findRates, meanRate, rateWords, tableOf, tellNoRates } from './rate-name.ts';

/** In the order of their names. */
export function resolveCatastrophes(context: Context, phases: readonly Phase[]): readonly Catastrophe[] {
  return Object.entries(context.spec.named)
    .flatMap(([name, spec]) => (spec.kind === 'catastrophe' ? [resolveOne(context, { name, spec, phases })] : []))
    .sort((a, b) => (a.name < b.name ? -1 : a.name > b.name ? 1 : 0));
}

/** At its place in the year it is a survival of all, which the catastrophe lowers where it is on. */
export function resolveTaking(context: Context, name: string, spec: CatastropheSpec): SurvivalPhase | null {
  if (spec.takes === undefined) {
    fail(context, 'idle-catastrophe', ['year', context.spec.year.indexOf(name)], {
      message: `\`${name}\` stands in the year, but takes nobody there`,
      details: { expected: '`takes: { CLASS: share }`', fix: 'What it multiplies needs no place in the year.' },
    });
    return null;
  }
  const all = new Float64Array(context.patches.length * context.classes.length).fill(1);
  return { kind: 'survival', name, survival: { epochs: [all], epochOf: new Int32Array(0) } };
}

interface Request {
  readonly name: string;
  readonly spec: CatastropheSpec;
  readonly phases: readonly Phase[];
}

function resolveOne(context: Context, { name, spec, phases }: Request): Catastrophe {
  const lasts = wholeYears(context, spec.lasts, [name, 'lasts']);
  const wait = Math.max(lasts, wholeYears(context, spec.wait, [name, 'wait']));
  const multiplies = [...multiplied(context, { name, spec, phases }), ...taken(context, { name, spec, phases })];
  if (multiplies.length === 0 && spec.capacity === undefined) {
    fail(context, 'idle-catastrophe', [name], {
      message: `\`${name}\` changes nothing`,
      part: 'key',
      details: { expected: '`multiplies`, `takes` (with a place in `year`) or `capacity`' },
    });
  }
  const chance = chanceOf(context, name, spec);
  const reach = reachOf(context, name, spec.reach);
  // A further place where it may begin would move the luck of all others.
  const byItself = chance.over === 'patch' && reach === 'one patch';
  return {
    name,
    ...chance,
    origins: originsOf(context, name, { list: spec['begins-in'], byItself }),
    reach,
    multiplies,
    lasts,
    wait,
    capacity: capacityOf(context, name, spec.capacity),
  };
}

function chanceOf(
  context: Context,
  name: string,
  { chance: text, generation }: CatastropheSpec,
): Pick<Catastrophe, 'chance' | 'over' | 'stated'> {
  const path = [name, 'chance'];
  const read = readChance(text);
  const given =
    read === null ? NaN : number(context, /^[\d.]+$/u.test(read.amount) ? Number(read.amount) : read.amount, path);
  const years = generation === undefined ? null : generationOf(context, name, generation);
  if (!(given >= 0 && given <= 1) && !Number.isNaN(given)) {
    fail(context, 'share-out-of-range', path, {
      message: `The chance of \`${name}\` is ${given} ${years === null ? 'a year' : 'a generation'}`,
      details: { expected: 'a share between 0 and 1' },
    });
  }
  const over = read?.per ?? 'landscape';
  if (years === null) return { chance: given, over };
  return { chance: yearly(given, years), over, stated: { chance: given, years } };
}

/** The chance a year that comes to at least one with this chance in so many years: 1 − (1 − p)^(1/G). */
function yearly(chance: number, years: number): number {
  return 1 - pinned.pow(1 - Math.min(1, chance), 1 / years);
}

function generationOf(context: Context, name: string, generation: number | string): number {
  const read = readQuantity(generation, 'time');
  if (read.ok && read.value >= 1) return read.value;
  fail(context, 'out-of-range', [name, 'generation'], {
    message: `A generation of \`${name}\` is at least a year`,
    details: { found: String(generation), expected: 'a time such as `5 years` or `4.5 years`' },
  });
  return 1;
}

function number(context: Context, expression: number | string, path: SpecPath): number {
  return context.numbers.value(expression, path, { year: context.time.firstYear });
}

interface Origins {
  readonly list: readonly string[] | undefined;
  /** Whether it strikes each patch for itself, so that patches that come later may be among them. */
  readonly byItself: boolean;
}

function originsOf(context: Context, name: string, { list, byItself }: Origins): readonly number[] {
  if (list === undefined) {
    return context.patches.flatMap(({ exists }, p) => (byItself || exists?.from === undefined ? [p] : []));
  }
  return list
    .map((patch, i) => patchIndex(context, patch, [name, 'begins-in', i], 'value'))
    .filter((p) => p >= 0)
    .sort((a, b) => a - b);
}

function reachOf(context: Context, name: string, reach: CatastropheSpec['reach']): Catastrophe['reach'] {
  if (typeof reach === 'string') return reach;
  const read = readQuantity(reach.radius, 'length');
  if (!read.ok || !(read.value >= 0)) {
    fail(context, 'out-of-range', [name, 'reach', 'radius'], {
      message: 'A radius is a distance from 0',
      details: { found: String(reach.radius), expected: 'such as `8 km`' },
    });
    return 'one patch';
  }
  requirePlaces(context, name);
  return { radiusKm: read.value };
}

function multiplied(context: Context, { name, spec, phases }: Request): readonly MultipliedRate[] {
  return Object.entries(spec.multiplies ?? {}).flatMap(([rate, byClass]) => {
    const path = [name, 'multiplies', rate];
    const found = findRates(phases, rate);
    if (found === null) {
      tellNoRates(context, rate, path, phases);
      return [];
    }
    return Object.entries(byClass).flatMap(([className, expression]): MultipliedRate[] => {
      const at = [...path, className];
      const c = classIndex(context, className, at);
      const times = number(context, expression, at);
      if (c < 0 || Number.isNaN(times)) return [];
      const made = { ...found, class: c, times };
      checkTimes(context, { phases, made, at, words: rateWords(context, rate, c) });
      return [made];
    });
  });
}

interface TimesCheck {
  readonly phases: readonly Phase[];
  readonly made: MultipliedRate;
  readonly at: SpecPath;
  readonly words: string;
}

/** A rate is not below 0, and a share not above 1, in a struck patch too. */
function checkTimes(context: Context, { phases, made, at, words }: TimesCheck): void {
  if (made.times < 0) {
    fail(context, 'negative-rate', at, {
      message: `${words} would be multiplied by ${made.times}`,
      details: { expected: 'a number from 0' },
    });
    return;
  }
  const phase = phases[made.phase];
  if (phase === undefined || made.part === 'births' || made.times <= 1) return;
  const epochs = tableOf(phase, made.part)?.epochs.length ?? 1;
  for (let epoch = 0; epoch < epochs; epoch++) {
    for (const [p, patch] of context.patches.entries()) {
      const share = meanRate(phase, made.part, { classes: context.classes.length, epoch, patch: p, c: made.class });
      if (share * made.times <= 1 + 1e-12) continue;
      fail(context, 'share-out-of-range', at, {
        message: `${words} in ${patch.name} would be ${Number((share * made.times).toPrecision(6))}`,
        details: { expected: `at most ${Number((1 / share).toPrecision(6))} times, since a share is at most 1` },
      });
      return;
    }
  }
}

function taken(context: Context, { name, spec, phases }: Request): readonly MultipliedRate[] {
  const phase = phases.findIndex((one) => one.name === name && one.kind === 'survival');
  if (spec.takes !== undefined && !context.spec.year.includes(name)) {
    fail(context, 'idle-catastrophe', [name, 'takes'], {
      message: `\`${name}\` takes animals, but has no place in \`year\``,
      part: 'key',
      details: { fix: `Put \`${name}\` into \`year\` where they die.` },
    });
  }
  return Object.entries(spec.takes ?? {}).flatMap(([className, expression]): MultipliedRate[] => {
    const path = [name, 'takes', className];
    const c = classIndex(context, className, path);
    const share = number(context, expression, path);
    if (c < 0 || phase < 0 || Number.isNaN(share)) return [];
    if (share < 0 || share > 1) {
      fail(context, 'share-out-of-range', path, {
        message: `\`${name}\` takes ${share} of ${className}`,
        details: { expected: 'a share between 0 and 1' },
      });
    }
    return [{ phase, part: 'survival', class: c, times: 1 - share }];
  });
}

function capacityOf(context: Context, name: string, spec: CatastropheSpec['capacity']): Catastrophe['capacity'] {
  if (spec === undefined) return null;
  const times = number(context, spec.times, [name, 'capacity', 'times']);
  if (!(times > 0) && !Number.isNaN(times)) {
    fail(context, 'out-of-range', [name, 'capacity', 'times'], {
      message: `Capacities would be multiplied by ${times}`,
      details: { expected: 'a number above 0' },
    });
  }
  return { times, steps: wholeYears(context, spec.for, [name, 'capacity', 'for']) };
}
