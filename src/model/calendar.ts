// Calendar years as they stand in the text.
import { fail, type Context } from './context.ts';

/** A calendar year that is the key of a number; NaN after telling that it is none. */
export function readYear(context: Pick<Context, 'findings'>, text: string, path: readonly string[]): number {
  if (/^-?\d{1,6}$/u.test(text)) return Number(text);
  fail(context, 'not-a-year', path, {
    message: `\`${text}\` is not a year`,
    part: 'key',
    details: { found: text, expected: 'a calendar year, such as 2024' },
  });
  return NaN;
}
