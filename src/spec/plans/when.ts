// The years of an effect.
import type { SpecPath } from '../document.ts';
import { readWholeYears } from '../quantity.ts';
import type { When } from './compose.ts';
import type { Draft } from './draft.ts';
import { tellMistake } from './tell.ts';

export interface WhenSpec {
  readonly from?: number | undefined;
  readonly until?: number | undefined;
  readonly over?: number | string | undefined;
}

export function whenOf(draft: Draft, { from, until, over }: WhenSpec, path: SpecPath): When {
  const { firstYear, lastYear } = draft;
  const [first, last] = [from ?? firstYear, until ?? lastYear];
  if (first > last || first > lastYear || last < firstYear) {
    const [message, found] = whatIsWrong(draft, from, until);
    tellMistake(draft, 'year-outside', [...path, from === undefined ? 'until' : 'from'], {
      message,
      details: {
        found,
        expected: `years from ${String(firstYear)} to ${String(lastYear)}`,
        fix: 'Correct them, or look further with `years` and `first-year`.',
      },
    });
  }
  const growing = yearsOf(draft, over, [...path, 'over']);
  // What holds from the first year on needs no condition, unless it grows.
  const begins = first <= firstYear && growing <= 1 ? null : first;
  return { from: begins, until: last >= lastYear ? null : last, over: growing };
}

function whatIsWrong({ firstYear, lastYear }: Draft, from?: number, until?: number): readonly [string, string] {
  if (from !== undefined && until !== undefined && from > until)
    return ['The effect ends before it begins', `${String(from)} to ${String(until)}`];
  if (from !== undefined && from > lastYear)
    return ['The effect begins after the last year', `${String(from)}; the last year is ${String(lastYear)}`];
  return ['The effect ends before the first year', `${String(until)}; the first year is ${String(firstYear)}`];
}

function yearsOf(draft: Draft, over: number | string | undefined, path: SpecPath): number {
  if (over === undefined) return 1;
  const years = readWholeYears(over);
  if (years !== null) return years;
  tellMistake(draft, 'plan-shape', path, {
    message: 'An effect grows over a whole number of years',
    details: { found: String(over), expected: 'such as `8 years`' },
  });
  return 1;
}
