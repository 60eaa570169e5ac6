// Numbers that change with the years, kept once for each stretch of steps in which they are constant.
import type { Context } from './context.ts';
import type { RateTable } from './model.ts';

/** `varies` says whether more than the first year has to be looked at. */
export function byYears(
  { time }: Pick<Context, 'time'>,
  varies: boolean,
  numbersIn: (year: number) => Float64Array,
): Pick<RateTable, 'epochs' | 'epochOf'> {
  const years = Array.from({ length: varies ? time.steps : 1 }, (_, t) => time.firstYear + t);
  const epochs: Float64Array[] = [];
  const epochOf = new Int32Array(varies ? time.steps : 0);
  years.forEach((year, t) => {
    const numbers = numbersIn(year);
    const last = epochs.at(-1);
    if (last === undefined || !sameNumbers(last, numbers)) epochs.push(numbers);
    if (varies) epochOf[t] = epochs.length - 1;
  });
  return { epochs, epochOf: epochs.length === 1 ? new Int32Array(0) : epochOf };
}

function sameNumbers(a: Float64Array, b: Float64Array): boolean {
  return a.length === b.length && a.every((value, i) => Object.is(value, b[i]));
}
