// Intervals of a chance from a number of runs, against printed and exact ones.
import { expect, test } from 'vitest';
import { numberAt } from '../../src/model/variation/distribution.ts';
import { z975 } from '../../src/numeric/normal-quantile.ts';
import { simultaneousHalfWidth, wilson } from '../../src/results/wilson.ts';

// Score intervals without continuity correction of Newcombe (1998), Statistics in Medicine 17: 857-872, to four digits; the
// last two recomputed from Wilson's formula in double precision.
test.each([
  { hits: 81, runs: 263, lower: 0.2553, upper: 0.3662, digits: 4 },
  { hits: 15, runs: 148, lower: 0.0624, upper: 0.1605, digits: 4 },
  { hits: 0, runs: 20, lower: 0, upper: 0.1611, digits: 4 },
  { hits: 1, runs: 29, lower: 0.0061, upper: 0.1718, digits: 4 },
  { hits: 0, runs: 1000, lower: 0, upper: 0.0038268, digits: 7 },
  { hits: 50, runs: 1000, lower: 0.0381303, upper: 0.0653138, digits: 7 },
])('$hits of $runs', ({ hits, runs, lower, upper, digits }) => {
  const found = wilson(hits, runs);
  expect(found.lower).toBeCloseTo(lower, digits);
  expect(found.upper).toBeCloseTo(upper, digits);
});

// Exact intervals of Clopper & Pearson (1934): quantiles of beta distributions. The first four as in Newcombe (1998), the last two
// recomputed. The tool gives the score interval, which is about as wide.
test.each([
  { hits: 81, runs: 263, lower: 0.2527, upper: 0.3676, digits: 4 },
  { hits: 15, runs: 148, lower: 0.0578, upper: 0.1617, digits: 4 },
  { hits: 0, runs: 20, lower: 0, upper: 0.1684, digits: 4 },
  { hits: 1, runs: 29, lower: 0.0009, upper: 0.1776, digits: 4 },
  { hits: 0, runs: 1000, lower: 0, upper: 0.0036821, digits: 7 },
  { hits: 50, runs: 1000, lower: 0.0373354, upper: 0.0653905, digits: 7 },
])('$hits of $runs, exactly, by the beta distribution', ({ hits, runs, lower, upper, digits }) => {
  const low = hits === 0 ? 0 : numberAt({ shape: 'beta', a: hits, b: runs - hits + 1 }, -z975);
  const high = numberAt({ shape: 'beta', a: hits + 1, b: runs - hits }, z975);
  expect(low).toBeCloseTo(lower, digits);
  expect(high).toBeCloseTo(upper, digits);
  const score = wilson(hits, runs);
  expect(Math.abs(score.upper - score.lower - (high - low))).toBeLessThan(0.02);
});

// Derived from the inequality of Massart (1990) for 95 %, √(ln 40 / 2n); beside it the quantile of Kolmogorov's statistic, computed from its
// exact distribution, which the inequality must not fall below.
test.each([
  { runs: 100, half: 0.1358102, exact: 0.1340279 },
  { runs: 1000, half: 0.0429469, exact: 0.0427765 },
  { runs: 10000, half: 0.013581, exact: 0.0135642 },
])('a band for the whole curve of $runs runs', ({ runs, half, exact }) => {
  expect(simultaneousHalfWidth(runs)).toBeCloseTo(half, 7);
  expect(simultaneousHalfWidth(runs)).toBeGreaterThan(exact);
});
