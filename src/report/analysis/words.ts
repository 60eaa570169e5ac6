// Numbers and short lists as a reader wants them in a sentence.

/** Four significant digits, without a trail of zeros. */
export function told(value: number): string {
  if (value === 0) return '0';
  const size = Math.abs(value);
  return size >= 1e6 || size < 1e-4 ? value.toExponential(2) : String(Number(value.toPrecision(4)));
}

/** 'grows by 12.2 % a year', 'declines by 5.5 % a year', 'stays level'. */
export function change(growthRate: number): string {
  const percent = (growthRate - 1) * 100;
  if (Math.abs(percent) < 0.005) return 'stays level';
  return `${percent > 0 ? 'grows' : 'declines'} by ${told(Math.abs(Number(percent.toPrecision(3))))} % a year`;
}

/** 'North', 'North and Ridge', 'North, Ridge and Fen'; the rest counted when there are many. */
export function listed(names: readonly string[], most = 6): string {
  const shown = names.slice(0, most);
  const more = names.length - shown.length;
  const parts = more > 0 ? [...shown, `${more} more`] : shown;
  const last = parts.pop();
  if (last === undefined) return 'none';
  return parts.length === 0 ? last : `${parts.join(', ')} and ${last}`;
}

/** '1 year', '7 years'. */
export function years(count: number): string {
  return `${count} ${count === 1 ? 'year' : 'years'}`;
}

/** What is not there. */
export function orDash(value: number | null): string {
  return value === null ? '–' : told(value);
}

/** '1 year' or '2.5 years', for lengths that need not be whole. */
export function yearsLong(length: number): string {
  const text = told(length);
  return `${text} ${text === '1' ? 'year' : 'years'}`;
}

/** '1.33 times', to be followed by 'as many'. */
export function times(factor: number): string {
  return `${told(factor)} times`;
}
