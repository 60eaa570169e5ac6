// What takes, moves and releases came to, in sentences.
import type { HandledResult, RunResults } from '../results/results.ts';
import { decimal, whole } from '../view/number.ts';

const did = { take: 'taken', move: 'moved', add: 'released' } as const;

/** For each of them its name and what came of it. */
export function handledWords(
  { handled, years }: Pick<RunResults, 'handled' | 'years'>,
  animals: string,
): readonly (readonly [string, string])[] {
  return handled.map((one) => [one.phase, sentence(one, { animals, years })]);
}

interface Told {
  readonly animals: string;
  readonly years: number;
}

function sentence({ does, inAll: { handled, died, shortfall } }: HandledResult, { animals, years }: Told): string {
  const range = `${whole(handled.quantiles['0.05'])} to ${whole(handled.quantiles['0.95'])} in 90 of 100 futures`;
  const said = [`${decimal(handled.mean)} ${animals} ${did[does]} over ${years} years in the mean (${range})`];
  if (died.mean > 0) said.push(`${decimal(died.mean)} of them did not live through it`);
  if (shortfall.mean > 0) said.push(`${decimal(shortfall.mean)} were wanted and not there`);
  return said.join('; ');
}
