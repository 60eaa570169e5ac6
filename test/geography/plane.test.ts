// Rings, crossings and nearest points on a plane, against cases worked out by hand and against plain search.
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { isInside, selfCrossing } from '../../src/numeric/plane/crossing.ts';
import { centroidOf, ringArea } from '../../src/numeric/plane/measure.ts';
import { edgesOf, nearestPoints } from '../../src/numeric/plane/nearest.ts';
import type { Outline, Point, Ring } from '../../src/numeric/plane/point.ts';

const square = (x: number, y: number, side: number): Ring => [
  [x, y],
  [x + side, y],
  [x + side, y + side],
  [x, y + side],
];

test('areas and centres, with a hole taken out', () => {
  expect(ringArea(square(1e6, 2e6, 3))).toBe(9);
  expect(ringArea(square(0, 0, 3).toReversed())).toBe(9);
  // Derived: (9 · 1.5 − 1 · 0.5) / 8 = 1.625.
  expect(centroidOf([[square(0, 0, 3), square(0, 0, 1)]])).toEqual([1.625, 1.625]);
  // Derived: two squares of areas 1 and 4: (0.5 + 4 · 11) / 5 = 8.9, (0.5 + 4 · 1) / 5 = 0.9.
  const [x, y] = centroidOf([[square(0, 0, 1)], [square(10, 0, 2).toReversed()]]) ?? [NaN, NaN];
  expect(x).toBeCloseTo(8.9, 12);
  expect(y).toBeCloseTo(0.9, 12);
  expect(
    centroidOf([
      [
        [
          [0, 0],
          [1, 1],
          [2, 2],
        ],
      ],
    ]),
  ).toBeNull();
});

test('rings that cross, touch or fold back are found', () => {
  expect(selfCrossing(square(0, 0, 1))).toBeNull();
  expect(
    selfCrossing([
      [0, 0],
      [1, 1],
      [1, 0],
      [0, 1],
    ]),
  ).toEqual([0, 2]);
  expect(
    selfCrossing([
      [0, 0],
      [4, 0],
      [4, 2],
      [2, 0],
      [0, 2],
    ]),
  ).not.toBeNull();
  expect(
    selfCrossing([
      [0, 0],
      [2, 0],
      [1, 0],
      [1, 1],
    ]),
  ).not.toBeNull();
});

test('inside and outside, with a hole', () => {
  const ring = [square(0, 0, 3), square(1, 1, 1)];
  expect(
    [
      [0.5, 0.5],
      [1.5, 1.5],
      [4, 0.5],
    ].map(([x = 0, y = 0]) => isInside([x, y], ring)),
  ).toEqual([true, false, false]);
});

function gap(a: Outline, b: Outline, scale?: Point): number {
  const [p, q] = nearestPoints(edgesOf(a), edgesOf(b), scale);
  const [kx, ky] = scale ?? [1, 1];
  return Math.hypot(kx * (p[0] - q[0]), ky * (p[1] - q[1]));
}

test('nearest points: beside, at corners, touching, one in the other, one in the hole of the other', () => {
  const one: Outline = [[square(0, 0, 2)]];
  expect(gap(one, [[square(5, 1, 2)]])).toBe(3);
  expect(gap(one, [[square(5, 6, 2)]])).toBe(5);
  expect(gap(one, [[square(2, 0, 2)]])).toBe(0);
  expect(gap(one, [[square(1, 1, 5)]])).toBe(0);
  expect(gap(one, [[square(0.5, 0.5, 0.5)]])).toBe(0);
  expect(gap([[square(0, 0, 10), square(2, 2, 6)]], [[square(4, 4, 2)]])).toBe(2);
  expect(gap(one, [[[[5, 1]]]])).toBe(3);
  expect(gap(one, [[square(5, 1, 2)]], [0.5, 1])).toBe(1.5);
});

test('branch and bound finds what a plain search over points on the edges finds', () => {
  const radius = fc.double({ min: 0.5, max: 2, noNaN: true });
  const star = (x: number, radii: readonly number[]): Outline => [
    [
      radii.map((r, i): Point => [
        x + r * Math.cos((6.283 * i) / radii.length),
        r * Math.sin((6.283 * i) / radii.length),
      ]),
    ],
  ];
  const radii = fc.array(radius, { minLength: 3, maxLength: 40 });
  fc.assert(
    fc.property(radii, radii, (a, b) => {
      const [one, other] = [star(0, a), star(4.5, b)];
      const dense = (outline: Outline): readonly Point[] =>
        (outline[0]?.[0] ?? []).flatMap((from, i, ring) => {
          const to = ring[(i + 1) % ring.length] ?? from;
          return Array.from({ length: 20 }, (_, k): Point => {
            return [from[0] + ((to[0] - from[0]) * k) / 20, from[1] + ((to[1] - from[1]) * k) / 20];
          });
        });
      let least = Infinity;
      for (const p of dense(one))
        for (const q of dense(other)) least = Math.min(least, Math.hypot(p[0] - q[0], p[1] - q[1]));
      const found = gap(one, other);
      expect(found).toBeLessThanOrEqual(least + 1e-12);
      expect(found).toBeGreaterThan(least - 0.3);
    }),
    { seed: 4301, numRuns: 60 },
  );
});
