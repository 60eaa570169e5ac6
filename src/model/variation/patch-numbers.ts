// One number a patch, once where it stays and for each stretch of years where it changes.
import type { PatchNumbers } from '../chance.ts';
import type { Context } from '../context.ts';

export function patchNumbers(
  context: Context,
  varies: boolean,
  value: (patch: number, year: number) => number,
): PatchNumbers {
  const { firstYear, steps } = context.time;
  const epochs: Float64Array[] = [];
  const epochOf = new Int32Array(varies ? steps : 0);
  for (let t = 0; t < (varies ? steps : 1); t++) {
    const numbers = Float64Array.from(context.patches, (_, p) => value(p, firstYear + t));
    const last = epochs.at(-1);
    if (last === undefined || !numbers.every((number, p) => number === last[p])) epochs.push(numbers);
    if (varies) epochOf[t] = epochs.length - 1;
  }
  return { epochs, epochOf };
}

/** Each of two numbers a patch, over the stretches of the first. */
export function mapNumbers(
  { epochs, epochOf }: PatchNumbers,
  change: (value: number, patch: number) => number,
): PatchNumbers {
  return { epochs: epochs.map((epoch) => epoch.map(change)), epochOf };
}
