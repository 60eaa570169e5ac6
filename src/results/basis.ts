// How well the named numbers of a model are known, in a sentence.
import type { Model } from '../model/model.ts';

const bases = [
  ['measured here', 'measured here'],
  ['measured elsewhere', 'measured elsewhere'],
  ['expert', 'from experts'],
] as const;

/** Such as '7 of 19 named numbers are assumed'. */
export function basisWords({ parameters }: Model): string {
  const all = parameters.length;
  if (all === 0) return 'The model names no numbers: all stand in its text without a source of their own.';
  const count = (basis: string | null) => parameters.filter((one) => one.basis === basis).length;
  const known = bases.map(([basis, words]) => [count(basis), words] as const).filter(([many]) => many > 0);
  const others = known.map(([many, words]) => `${String(many)} ${words}`);
  const silent = count(null);
  if (silent > 0) others.push(`${String(silent)} without a word on where ${silent === 1 ? 'it is' : 'they are'} from`);
  const assumed = count('assumed');
  const first = assumed === 0 ? `None of the ${String(all)} named numbers is assumed` : assumedWords(assumed, all);
  const rest = others.length === 0 ? '' : `: ${others.join(', ')}`;
  return `${first}${rest}. Numbers that stand in the model without a name have no source of their own.`;
}

function assumedWords(assumed: number, all: number): string {
  return `${String(assumed)} of ${String(all)} named numbers ${assumed === 1 ? 'is' : 'are'} assumed`;
}
