// Reading the contract's series safely.

/** The item at an index that the caller knows to exist. */
export function pick<T>(items: readonly T[], index: number): T {
  const item = items[index];
  if (item === undefined) throw new RangeError(`no item ${index} among ${items.length}`);
  return item;
}

/** The largest value, or 0 where there is none above it. */
export function largest(values: readonly number[]): number {
  let most = 0;
  for (const value of values) if (value > most) most = value;
  return most;
}
