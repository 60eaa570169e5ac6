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

/** Lines of a table: the first column to the left, the others to the right. */
export function table(head: readonly string[], rows: readonly (readonly string[])[]): string[] {
  const all = [head, ...rows];
  const widths = head.map((_, c) => Math.max(...all.map((row) => (row[c] ?? '').length)));
  return all.map((row) =>
    row
      .map((cell, c) => (c === 0 ? cell.padEnd(widths[c] ?? 0) : cell.padStart(widths[c] ?? 0)))
      .join('  ')
      .trimEnd(),
  );
}

/** '1 year', '7 years'. */
export function years(count: number): string {
  return `${count} ${count === 1 ? 'year' : 'years'}`;
}
