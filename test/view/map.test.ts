// The geometry of the map.
import { describe, expect, it } from 'vitest';
import type { PatchView } from '../../src/view/contract.ts';
import { bandPath } from '../../src/view/map/band.ts';
import { dotPath, sizeDiscs } from '../../src/view/map/discs.ts';
import { placeLabels } from '../../src/view/map/labels.ts';
import { placePatches } from '../../src/view/map/place.ts';
import { circleShape } from '../../src/view/map/shape.ts';
import { placesOf } from './places-of.ts';

const flat = [5, 5];
const fan = { mean: flat, p05: flat, p25: flat, median: flat, p75: flat, p95: flat };

function patchAt(at: readonly [number, number] | null, capacity: number | null = 100): PatchView {
  return { name: 'a', at, capacity, areaKm2: null, outline: null, fan, empty: null, worth: null };
}

const frame = { left: 0, right: 100, top: 0, bottom: 100 };

describe('places', () => {
  it('keep the shape of the plane, north up, in the middle of the frame', () => {
    const placing = placePatches([patchAt([0, 0]), patchAt([10, 0]), patchAt([0, 5])], frame);
    expect(placing.pixelsPerKm).toBe(10);
    expect(placing.points).toEqual([
      [0, 75],
      [100, 75],
      [0, 25],
    ]);
  });

  it('are a ring without a scale where one patch has none, or all have the same', () => {
    expect(placePatches([patchAt([0, 0]), patchAt(null)], frame).pixelsPerKm).toBeNull();
    const same = placePatches([patchAt([3, 3]), patchAt([3, 3])], frame);
    expect(same.pixelsPerKm).toBeNull();
    expect(same.points[0]?.[1]).toBeCloseTo(0, 9);
    expect(same.points[1]?.[1]).toBeCloseTo(100, 9);
  });

  it('stand in a line where the patches do', () => {
    const placing = placePatches([patchAt([0, 0]), patchAt([0, 8])], frame);
    expect(placing.pixelsPerKm).toBe(12.5);
    expect(placing.points).toEqual([
      [50, 100],
      [50, 0],
    ]);
  });
});

describe('circles', () => {
  it('have an area in proportion to what a patch can hold', () => {
    const discs = sizeDiscs(
      [patchAt([0, 0], 400), patchAt([9, 9], 100)],
      [
        [0, 0],
        [400, 400],
      ],
      760,
    );
    expect(discs.radius[0]).toBeCloseTo(2 * (discs.radius[1] ?? 0), 9);
    expect(discs.sizeMeans).toBe('capacity');
  });

  it('hold as many dots as there are, all inside', () => {
    const path = dotPath(37, 60, 20, [50, 50]);
    const dots = [...path.matchAll(/M([\d.]+) ([\d.]+)h0/g)].map(
      (match) => [Number(match[1]), Number(match[2])] as const,
    );
    expect(dots).toHaveLength(37);
    for (const [x, y] of dots) expect(Math.hypot(x - 50, y - 50)).toBeLessThan(20);
  });

  it('never let a dot stand for less than one animal', () => {
    expect(sizeDiscs([patchAt([0, 0], 3)], [[50, 50]], 760).perDot).toBe(1);
    expect(sizeDiscs([patchAt([0, 0], 1e6)], [[50, 50]], 760).perDot).toBeGreaterThan(100);
  });
});

describe('bands', () => {
  it('are as wide as asked at the origin and thin at the end', () => {
    const corners = placesOf(bandPath({ from: [0, 0], to: [100, 0], fromRadius: 0, toRadius: 0 }, 10, 0));
    const widthAt = (x: number) => {
      const ys = corners.filter((one) => Math.abs(one[0] - x) < 4).map((one) => one[1]);
      return Math.max(...ys) - Math.min(...ys);
    };
    expect(widthAt(0)).toBeCloseTo(10, 0);
    expect(widthAt(98)).toBeLessThan(2);
  });

  it('draw nothing from a patch to itself', () => {
    expect(bandPath({ from: [1, 1], to: [1, 1], fromRadius: 0, toRadius: 0 }, 10)).toBe('');
  });
});

describe('names', () => {
  it('stay inside the frame and off the circles', () => {
    const labels = placeLabels(['Long holm', 'Eel pond'], [circleShape([50, 50], 20), circleShape([120, 50], 20)], {
      left: 0,
      right: 200,
      top: 0,
      bottom: 100,
    });
    expect(labels.map((one) => one.text).sort()).toEqual(['Eel pond', 'Long holm']);
    for (const label of labels) expect(Math.abs(label.y - 50)).toBeGreaterThan(20);
  });

  it('are left out in a crowd where none fits', () => {
    const many = Array.from({ length: 60 }, () => 'Same place');
    const labels = placeLabels(
      many,
      many.map(() => circleShape([50, 50], 10)),
      { left: 0, right: 200, top: 0, bottom: 100 },
    );
    expect(labels.length).toBeGreaterThan(0);
    expect(labels.length).toBeLessThan(12);
  });
});
