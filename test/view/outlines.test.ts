// Outlines of patches on the map: thinned, true to scale, with dots inside.
import { describe, expect, it } from 'vitest';
import type { OutlineView, PatchView, RingView } from '../../src/view/contract.ts';
import { sizeMarks } from '../../src/view/map/marks.ts';
import { placePatches } from '../../src/view/map/place.ts';
import { areaOf, outlineShape, reachOf } from '../../src/view/map/shape.ts';
import { isInside, spotsIn } from '../../src/view/map/spots.ts';
import { thinOutlines, thinRing } from '../../src/view/map/thin.ts';

const square: RingView = [
  [0, 0],
  [100, 0],
  [100, 100],
  [0, 100],
];
const hole: RingView = [
  [40, 40],
  [60, 40],
  [60, 60],
  [40, 60],
];
const holed: OutlineView = [[square, hole]];

describe('thinning', () => {
  it('takes away what lies within the tolerance of a side and nothing else', () => {
    const fine = square.flatMap(([x, y], i): RingView => {
      const [nextX, nextY] = square[(i + 1) % 4]!;
      return [0, 0.25, 0.5, 0.75].map((t) => [x + t * (nextX - x), y + t * (nextY - y) + (t === 0.5 ? 0.3 : 0)]);
    });
    expect(fine.length).toBe(16);
    expect(thinRing(fine, 0.5)).toEqual(square);
    expect(thinRing(fine, 0.1).length).toBeGreaterThan(4);
  });

  it('leaves a triangle, however small, and one outline for each patch', () => {
    const tiny: RingView = [
      [0, 0],
      [0.001, 0],
      [0, 0.001],
    ];
    const [first, second, third] = thinOutlines([[[square]], null, [[tiny]]]);
    expect(first).toEqual([[square]]);
    expect(second).toBeNull();
    expect(third?.[0]?.[0]?.length).toBe(3);
  });
});

describe('a shape', () => {
  it('has the area of its polygons without their holes', () => {
    expect(areaOf(holed)).toBe(10_000 - 400);
    expect(outlineShape([50, 20], holed).box).toEqual({ left: 0, right: 100, top: 0, bottom: 100 });
  });

  it('reaches to its edge on the way to elsewhere', () => {
    const shape = outlineShape([50, 20], [[square]]);
    expect(reachOf(shape, [500, 20])).toBeCloseTo(50, 9);
    expect(reachOf(shape, [50, 500])).toBeCloseTo(80, 9);
  });
});

describe('dots', () => {
  it('stand inside, clear of the edge and of holes, the nearest to the place first', () => {
    const shape = outlineShape([20, 20], holed);
    const spots = spotsIn(shape, 50, { apart: 10, dotRadius: 3 });
    expect(spots.length).toBeGreaterThanOrEqual(50);
    const away = spots.map(([x, y]) => Math.hypot(x - 20, y - 20));
    expect(away).toEqual([...away].sort((a, b) => a - b));
    for (const [x, y] of spots) {
      expect(isInside([x, y], holed)).toBe(true);
      expect(Math.min(x, y, 100 - x, 100 - y)).toBeGreaterThanOrEqual(3);
    }
  });

  it('are as many as wanted even where there is no room', () => {
    const sliver = outlineShape(
      [5, 0.5],
      [
        [
          [
            [0, 0],
            [10, 0],
            [10, 1],
          ],
        ],
      ],
    );
    expect(spotsIn(sliver, 7, { apart: 6, dotRadius: 2 }).length).toBe(7);
  });

  it('count what is there: so many in each outline, as all patches agree', () => {
    const patches = [patch(0, 30), patch(200, 12)];
    const placing = placePatches(patches, { left: 0, right: 600, top: 0, bottom: 300 });
    const marks = sizeMarks(patches, placing, 600);
    expect(marks.perDot).toBe(1);
    expect(marks.dots(0, 30).split('M').length - 1).toBe(30);
    expect(marks.dots(1, 12).split('M').length - 1).toBe(12);
    expect(placing.pixelsPerKm).toBe(2);
    expect(marks.shapes[1]?.box.right).toBeCloseTo(600, 9);
  });
});

function patch(left: number, animals: number): PatchView {
  const flat = [animals, animals];
  const fan = { mean: flat, p05: flat, p25: flat, median: flat, p75: flat, p95: flat };
  const outline: OutlineView = [[square.map(([x, y]): RingView[number] => [x + left, y])]];
  return { name: 'a', at: [left + 50, 50], outline, capacity: null, areaKm2: null, fan, empty: null, worth: null };
}
