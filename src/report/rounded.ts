// Numbers in tables and sentences: rounded, without trailing noise, with a point on every machine.

/** Digits after the point, always that many. */
export function fixed(value: number, digits: number): string {
  return value.toFixed(digits);
}

/** Significant digits, without trailing zeros. */
export function significant(value: number, digits: number): string {
  return String(Number(value.toPrecision(digits)));
}
