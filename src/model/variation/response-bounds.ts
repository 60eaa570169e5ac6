// Whether a rate that is worked out anew every year stays possible, in rare years too.
import { pinned } from '../../machine/pinned.ts';
import { evaluate } from '../../spec/expression/evaluate.ts';
import { namesIn } from '../../spec/expression/names.ts';
import type { Response, Varied } from '../chance.ts';
import { fail, type Context } from '../context.ts';
import type { Phase } from '../model.ts';
import { whereIn } from '../rates.ts';
import { distributionOf, numberAt } from './distribution.ts';
import { largestLitter, lookedAt } from './litter-bounds.ts';

/** So many parameters are looked at high and low. */
const mostHighAndLow = 6;
const mostYears = 200;

/** What holds in a step. */
interface Situation {
  readonly step: number;
  /** Index of the given year of resampled drivers. */
  readonly row: number;
}

interface Look {
  readonly response: Response;
  /** The most that it may be. */
  readonly most: number;
  /** Parameters that vary and stand in the response. */
  readonly moving: readonly Varied[];
  readonly situation: Situation;
  /** Bit k: whether parameter k is high. */
  readonly corner: number;
  readonly patch: number;
}

/** Looks where all parameters that vary are low, high, or some low and some high, in all years and given years. */
export function refuseOutOfBounds(
  context: Context,
  { response, phases, varied }: { response: Response; phases: readonly Phase[]; varied: readonly Varied[] },
): void {
  const most = response.bounds === 'share' ? 1 : largestLitter(phases[response.phase], response.part);
  const names = namesIn(response.expression);
  const moving = varied.filter(({ name, of }) => of.kind === 'parameter' && names.includes(name));
  const corners = 1 << Math.min(moving.length, mostHighAndLow);
  for (const situation of situationsOf(context, names, moving)) {
    for (let corner = 0; corner < corners; corner++) {
      for (const patch of response.patches) {
        if (!staysPossible(context, { response, most, moving, situation, corner, patch })) return;
      }
    }
  }
}

function situationsOf(context: Context, names: readonly string[], moving: readonly Varied[]): readonly Situation[] {
  const { steps } = context.time;
  const { dated, resampled } = context.drivers;
  const byYear = names.some((name) => name === 'year' || dated.has(name));
  const changes = byYear || moving.some(({ mean }) => mean.epochs.length > 1);
  const count = changes ? Math.min(steps, mostYears) : 1;
  const rows = names.some((name) => resampled?.names.includes(name)) ? (resampled?.years.length ?? 1) : 1;
  return Array.from({ length: count }, (_, i) => Math.round((i * (steps - 1)) / Math.max(1, count - 1))).flatMap(
    (step) => Array.from({ length: rows }, (_, row) => ({ step, row })),
  );
}

function staysPossible(context: Context, look: Look): boolean {
  const { response, most, patch, situation } = look;
  const result = evaluate(response.expression, (name) => valueOf(context, look, name), pinned);
  if (!result.ok) return refused(context, look, result.fault.message);
  const { value } = result;
  if (value < 0 || value > most) {
    return refused(context, look, `it is ${Number(value.toPrecision(4))}`);
  }
  // The kernel scales the value at the means.
  const base = response.base.epochs[response.base.epochOf[situation.step] ?? 0]?.[patch] ?? 0;
  if (base === 0 && value > 0) return refused(context, look, 'it is 0 at the means, and above it in other years');
  return true;
}

function valueOf(context: Context, { moving, situation, corner, patch }: Look, name: string): number | undefined {
  const year = context.time.firstYear + situation.step;
  if (name === 'year') return year;
  const k = moving.findIndex((one) => one.name === name);
  const own = moving[k];
  if (own !== undefined) return extreme(own, situation.step, (corner >> k) % 2 === 0 ? -1 : 1);
  const { dated, resampled } = context.drivers;
  const driver = resampled?.names.indexOf(name) ?? -1;
  if (resampled !== null && driver >= 0) return resampled.values[driver * resampled.years.length + situation.row];
  return dated.get(name)?.(year) ?? context.numbers.attribute(name, whereIn(context, patch, year));
}

function extreme({ shape, mean, sd }: Varied, step: number, side: number): number {
  const epoch = mean.epochOf[step] ?? 0;
  const found = distributionOf(shape, { mean: mean.epochs[epoch]?.[0] ?? 0, sd: sd.epochs[epoch]?.[0] ?? 0 });
  return found === null ? NaN : numberAt(found, side * lookedAt);
}

function refused(context: Context, { response, most, moving, situation, patch }: Look, found: string): false {
  const [first] = moving;
  const { resampled } = context.drivers;
  const driver = namesIn(response.expression).find((name) => resampled?.names.includes(name) === true);
  const given = String(resampled?.years[situation.row] ?? '');
  const path =
    first === undefined && driver !== undefined
      ? ['drivers', 'values', driver, given]
      : ['variation', first?.name ?? ''];
  const reasons = [
    ...(first === undefined ? [] : [`Where the underlying normal number is ${lookedAt} standard deviations out.`]),
    ...(driver === undefined ? [] : [`With the drivers of ${given}.`]),
    ...(situation.step === 0 ? [] : [`In the year ${context.time.firstYear + situation.step}.`]),
  ];
  fail(context, 'impossible-variation', path, {
    message: `In ${first === undefined ? 'such a' : 'a rare'} year ${response.name} in ${context.patches[patch]?.name ?? ''} is not possible: ${found}`,
    part: 'key',
    details: {
      expected:
        response.bounds === 'share'
          ? 'a share between 0 and 1'
          : most < Infinity
            ? `at most the largest litter of ${most}`
            : 'a number from 0',
      reason: reasons.join(' '),
      fix: `${first === undefined ? 'Correct the value' : 'Make the variation smaller, choose another shape'}, or write the rate with \`min\` or \`max\`.`,
    },
  });
  return false;
}
