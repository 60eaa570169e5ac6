// The words of a command, as they can be typed again.
import type { CommonOptions } from './options.ts';

/** As it can be typed again. */
export function commandLineOf(first: readonly string[], options: CommonOptions, last: readonly string[]): string {
  const { years, replicates, seed, draws, precision, atMost, scenario, set, allow, places, only, robust } = options;
  const words = ['skein', ...first];
  for (const { name, value } of set ?? []) words.push('--set', `${name}=${value}`);
  for (const folder of allow ?? []) words.push('--allow', folder);
  if (scenario !== undefined) words.push('--scenario', scenario);
  for (const name of only ?? []) words.push('--only', name);
  if (years !== undefined) words.push('--years', String(years));
  if (replicates !== undefined) words.push('--replicates', String(replicates));
  if (seed !== undefined) words.push('--seed', String(seed));
  if (draws !== undefined) words.push('--draws', String(draws));
  if (precision !== undefined) words.push('--precision', String(precision));
  if (atMost !== undefined) words.push('--at-most', String(atMost));
  if (robust === true) words.push('--robust');
  if (places !== undefined) words.push('--places', places);
  return [...words, ...last].map(quoted).join(' ');
}

function quoted(word: string): string {
  return /^[\w./=:,+-]+$/.test(word) ? word : `'${word.replaceAll("'", `'\\''`)}'`;
}
