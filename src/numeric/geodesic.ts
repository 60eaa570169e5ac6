// Distances and areas on the WGS84 ellipsoid, by the geodesics of Karney (2013).
import { Geodesic } from 'geographiclib-geodesic';
import type { Point, Ring } from './plane/point.ts';

const { WGS84, DISTANCE } = Geodesic;

/** Kilometres of the shortest way between two places in degrees [longitude, latitude], rounded to 1 mm. */
export function geodesicKm(a: Point, b: Point): number {
  const metres = WGS84.Inverse(a[1], a[0], b[1], b[0], DISTANCE).s12 ?? NaN;
  return Math.round(metres * 1e3) / 1e6;
}

/** Square kilometres within a ring of degrees whose sides are geodesics, whichever way round it runs; rounded to 1 m². */
export function geodesicAreaKm2(ring: Ring): number {
  const polygon = WGS84.Polygon(false);
  for (const [longitude, latitude] of ring) polygon.AddPoint(latitude, longitude);
  const squareMetres = Math.abs(polygon.Compute(false, true).area ?? NaN);
  return Math.round(squareMetres) / 1e6;
}

/** Kilometres of one degree of longitude and of one degree of latitude, around a latitude. */
export function kmPerDegree(latitude: number): Point {
  const [south, north] = [Math.max(-90, latitude - 0.5), Math.min(90, latitude + 0.5)];
  return [geodesicKm([-0.5, latitude], [0.5, latitude]), geodesicKm([0, south], [0, north]) / (north - south)];
}

/** At most half a turn to the east or west of another longitude. */
export function longitudeNear(longitude: number, other: number): number {
  return longitude - 360 * Math.round((longitude - other) / 360);
}
