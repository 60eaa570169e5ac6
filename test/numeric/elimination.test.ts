// A planned elimination follows the pattern: what it lists is all that a dense elimination in the same order finds.
import { expect, test } from 'vitest';
import { planElimination } from '../../src/numeric/elimination.ts';
import { stream } from './random-matrix.ts';

test.each([
  [1, 0.5],
  [8, 0.2],
  [20, 0.1],
  [30, 0.9],
])('%i states, density %f', (states, density) => {
  const next = stream(states);
  const full = Array.from({ length: states }, (_, i) =>
    Array.from({ length: states }, (_, j) => (i === j ? 100 : next() < density ? -1 - next() : 0)),
  );
  const entries = full.flatMap((row, i) => row.flatMap((value, j) => (value === 0 ? [] : [[i, j] as const])));
  const { order, below, above, cost } = planElimination(states, [...entries, ...entries], Infinity)!;
  expect([...order].toSorted((a, b) => a - b)).toEqual([...full.keys()]);
  const rows = Array.from(order, (i) => Array.from(order, (j) => full[i]![j]!));
  let multiplications = 0;
  for (let k = 0; k < states; k++) {
    const taken = rows.flatMap((row, i) => (i > k && row[k] !== 0 ? [i] : []));
    const from = rows[k]!.flatMap((value, j) => (j > k && value !== 0 ? [j] : []));
    expect([...above[k]!]).toEqual(from);
    for (const i of taken) {
      expect([...below[i]!]).toContain(k);
      for (const j of from) rows[i]![j]! -= (rows[i]![k]! / rows[k]![k]!) * rows[k]![j]!;
    }
    multiplications += taken.length * from.length;
  }
  expect(cost).toBe(multiplications);
  expect(below.reduce((sum, own) => sum + own.length, 0)).toBe(
    rows.reduce((sum, row, i) => sum + row.filter((value, j) => j < i && value !== 0).length, 0),
  );
});

test('states in a chain are taken away before those where all meet', () => {
  const states = 12;
  const chain = Array.from({ length: 8 }, (_, i) => [i + 1, i] as const);
  const meeting = [8, 9, 10, 11].flatMap((i) => [8, 9, 10, 11].map((j) => [i, j] as const));
  const { order } = planElimination(states, [...chain, [0, 8] as const, ...meeting], 1000)!;
  expect([...order].slice(-4).toSorted((a, b) => a - b)).toEqual([8, 9, 10, 11]);
});

test('one that would cost too much is not planned', () => {
  const all = Array.from({ length: 100 }, (_, e) => [Math.floor(e / 10), e % 10] as const);
  expect(planElimination(10, all, 100)).toBeNull();
  expect(planElimination(10, all, 1000)).not.toBeNull();
});
