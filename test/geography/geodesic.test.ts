// Distances and areas on the ellipsoid against published and derived numbers.
import { expect, test } from 'vitest';
import { geodesicAreaKm2, geodesicKm, kmPerDegree, longitudeNear } from '../../src/numeric/geodesic.ts';
import type { Point } from '../../src/numeric/plane/point.ts';

const millimetre = 1e-6;

/** Degrees, minutes and seconds as degrees. */
function angle(degrees: number, minutes: number, seconds: number): number {
  return degrees + minutes / 60 + seconds / 3600;
}

// Geoscience Australia, technical manual of the Geocentric Datum of Australia (from memory of): 54 972.271 m on GRS80, which
// differs from WGS84 by 0.1 mm in its polar radius; recomputed by the formulas of Vincenty (1975): 54 972.2711 m.
test('Flinders Peak to Buninyong is 54 972.271 m', () => {
  const flindersPeak: Point = [angle(144, 25, 29.5244), -angle(37, 57, 3.7203)];
  const buninyong: Point = [angle(143, 55, 35.3839), -angle(37, 39, 10.1561)];
  expect(Math.abs(geodesicKm(flindersPeak, buninyong) - 54.9722711)).toBeLessThanOrEqual(millimetre);
  expect(geodesicKm(buninyong, flindersPeak)).toBe(geodesicKm(flindersPeak, buninyong));
});

// Derived from the defining numbers of WGS84 (a = 6 378 137 m, 1/f = 298.257 223 563).
const wgs84: readonly (readonly [string, Point, Point, number])[] = [
  ['one degree of longitude at the equator', [0, 0], [1, 0], 111.3194908],
  ['one degree of latitude from the equator', [0, 0], [0, 1], 110.5743886],
  ['one degree of latitude to the pole', [0, 89], [0, 90], 111.6938649],
  ['a quarter of a meridian', [7, 0], [7, 90], 10001.9657293],
];

test.each(wgs84)('%s', (_, from, to, km) => {
  expect(Math.abs(geodesicKm(from, to) - km)).toBeLessThanOrEqual(millimetre);
});

// Derived: areas of cells between two parallels and two meridians. The sides of a ring are geodesics, which bend away from a
// parallel, so the cell is cut into many short sides: 1000 along each parallel leave less than 1e-6 of the difference.
test.each([
  ['at the equator', 0, 12308.4639],
  ['at 45 degrees', 45, 8686.495],
])('a cell of one degree %s', (_, south, km2) => {
  const steps = 1000;
  const along = Array.from({ length: steps + 1 }, (_unused, i) => i / steps);
  const ring: Point[] = [
    ...along.map((x): Point => [x, south]),
    ...along.toReversed().map((x): Point => [x, south + 1]),
  ];
  expect(Math.abs(geodesicAreaKm2(ring) - km2)).toBeLessThan(1e-4);
  expect(geodesicAreaKm2(ring.toReversed())).toBe(geodesicAreaKm2(ring));
});

test('areas of a small square agree with the lengths of its degrees, and cross the date line unharmed', () => {
  const square = (x: number): Point[] => [
    [x, 54],
    [longitudeNear(x + 0.01, 0), 54],
    [longitudeNear(x + 0.01, 0), 54.01],
    [x, 54.01],
  ];
  const [east, north] = kmPerDegree(54.005);
  expect(geodesicAreaKm2(square(9))).toBeCloseTo(0.01 * east * 0.01 * north, 4);
  expect(geodesicAreaKm2(square(179.995))).toBeCloseTo(geodesicAreaKm2(square(9)), 6);
});
