// Numbers as readers meet them: whole animals, chances 'of 100 futures', percent with a fitting number of digits.
import { format } from 'd3';

const grouped = format(',.0f');

/** A count without fractions of animals; what lies between nothing and one is said so. */
export function whole(count: number): string {
  if (count > 0 && count < 0.5) return 'fewer than 1';
  return grouped(count);
}

/** A count of a figure that is not animals, such as runs. */
export function plain(count: number): string {
  return grouped(count);
}

/** One decimal, unless more are asked for, for means of small numbers of things, such as patches in use. */
export function decimal(value: number, digits = 1): string {
  return format(`,.${digits}f`)(value);
}

/** A chance as 'about 12' of 100, never rounding something to nothing or to all. */
export function of100(chance: number): string {
  const futures = chance * 100;
  if (chance === 0) return 'none';
  if (chance === 1) return 'all';
  if (futures < 0.5) return 'fewer than 1';
  if (futures > 99.5) return 'more than 99';
  return String(Math.round(futures));
}

/** A chance as percent: more digits near nothing and near certainty, where they matter. */
export function percent(chance: number): string {
  const value = chance * 100;
  const edge = Math.min(value, 100 - value);
  if (edge === 0) return `${value}\u00a0%`;
  if (edge < 0.005) return value < 50 ? 'under 0.01\u00a0%' : 'over 99.99\u00a0%';
  return `${value.toFixed(edge < 1 ? 2 : 1)}\u00a0%`;
}

/** The smallest of 1, 2, 5, 10, 20, 50 … that is not below a number. */
export function roundUp(value: number): number {
  if (!(value > 0)) return 1;
  const power = 10 ** Math.floor(Math.log10(value));
  const step = [1, 2, 5, 10].find((factor) => factor * power >= value * (1 - 1e-9)) ?? 10;
  return step * power;
}

/** The largest of 1, 2, 5, 10, 20, 50 … that is not above a number. */
export function roundDown(value: number): number {
  if (!(value > 0)) return 1;
  const power = 10 ** Math.floor(Math.log10(value));
  const step = [5, 2, 1].find((factor) => factor * power <= value * (1 + 1e-9)) ?? 1;
  return step * power;
}
