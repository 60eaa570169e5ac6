// Exact chances of the distributions that the kernel draws from, and a chi-square test against them.

const logFactorials: number[] = [0];
export function logFactorial(k: number): number {
  for (let i = logFactorials.length; i <= k; i++) logFactorials.push(logFactorials[i - 1]! + Math.log(i));
  return logFactorials[k]!;
}

const logChoose = (n: number, k: number) => logFactorial(n) - logFactorial(k) - logFactorial(n - k);

export const binomialChance = (n: number, p: number) => (k: number) =>
  k > n ? 0 : Math.exp(logChoose(n, k) + k * Math.log(p) + (n - k) * Math.log1p(-p));

export const poissonChance = (mean: number) => (k: number) => Math.exp(k * Math.log(mean) - mean - logFactorial(k));

export const hypergeometricChance = (all: number, kind: number, taken: number) => (k: number) =>
  k > kind || k > taken || taken - k > all - kind
    ? 0
    : Math.exp(logChoose(kind, k) + logChoose(all - kind, taken - k) - logChoose(all, taken));

/** Standard normal score of a chi-square test (Wilson & Hilferty 1931); cells below 8 expected draws are merged. */
export function chiSquareScore(draws: Float64Array, chance: (k: number) => number): number {
  const seen = new Map<number, number>();
  for (const k of draws) seen.set(k, (seen.get(k) ?? 0) + 1);
  const highest = draws.reduce((a, b) => Math.max(a, b), 0);
  let [sum, cells, expected, observed, done, doneSeen] = [0, 0, 0, 0, 0, 0];
  for (let k = 0; k <= highest; k++) {
    expected += chance(k) * draws.length;
    observed += seen.get(k) ?? 0;
    if (expected < 8 || (1 - done) * draws.length - expected < 8) continue;
    sum += (observed - expected) ** 2 / expected;
    cells++;
    done += expected / draws.length;
    doneSeen += observed;
    [expected, observed] = [0, 0];
  }
  const rest = (1 - done) * draws.length;
  sum += (draws.length - doneSeen - rest) ** 2 / rest;
  const df = cells;
  return (Math.cbrt(sum / df) - (1 - 2 / (9 * df))) / Math.sqrt(2 / (9 * df));
}
