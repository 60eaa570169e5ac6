// Classes that last longer than a year.
import { classIndex, fail, type Context } from './context.ts';
import type { StageDuration } from './model.ts';

/** Those of a year that ages; told where none of the classes goes on at all. */
export function resolveStages(context: Context, next: Int32Array): readonly StageDuration[] {
  return Object.entries(context.spec.duration ?? {}).flatMap(([name, { years: written, as }]) => {
    const path = ['duration', name];
    const c = classIndex(context, name, path);
    if (c < 0) return [];
    if (next[c] === c) {
      fail(context, 'stage-duration', path, {
        message: `\`${name}\` is the oldest class and stays, so it has no duration`,
        part: 'key',
        details: { fix: 'Remove it, or let the oldest class leave with `oldest: terminal`.' },
      });
      return [];
    }
    const years = context.numbers.value(written, [...path, 'years'], { year: context.time.firstYear });
    // Those that could not be written year by year were told already.
    if (as === 'expanded') return [];
    if (years >= 1 && Number.isFinite(years)) return [{ class: c, years, as }];
    if (!Number.isNaN(years)) {
      fail(context, 'stage-duration', [...path, 'years'], {
        message: `The stage \`${name}\` lasts ${years} years, and a year is a step`,
        details: { expected: 'a number of years, at least 1' },
      });
    }
    return [];
  });
}

/** Durations need a year in which classes age. */
export function refuseIdleStages(context: Context): void {
  if (context.spec.duration === undefined || context.spec.year.includes('ageing')) return;
  fail(context, 'stage-duration', ['duration'], {
    message: 'Durations are given, but `ageing` is not in the year',
    part: 'key',
    details: { fix: 'Add `ageing` to `year`; a published matrix holds the durations of its stages already.' },
  });
}
