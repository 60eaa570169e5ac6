// Where patches lie: from places and outlines in the units of the spec to kilometres on a plane, or degrees on WGS84.
import { geodesicAreaKm2, kmPerDegree, longitudeNear } from '../numeric/geodesic.ts';
import { centroidOf, ringArea } from '../numeric/plane/measure.ts';
import type { Outline, Point } from '../numeric/plane/point.ts';
import type { Patch } from './model.ts';

/** The place of a patch in the units of the spec. */
export interface Located {
  readonly at: Point | null;
  readonly outline: Outline | null;
}

/** What a patch knows of where it lies. */
export type Ground = Pick<Patch, 'at' | 'degrees' | 'outline' | 'degreesOutline'> & { readonly areaKm2: number | null };

export function onPlane({ at, outline }: Located, unitKm: number): Ground {
  const inKm = ([x, y]: Point): Point => [x * unitKm, y * unitKm];
  const outlineKm = outline === null ? null : mapOutline(outline, inKm);
  const centre = at === null ? (outlineKm === null ? null : centroidOf(outlineKm)) : inKm(at);
  return {
    at: centre,
    ...(outlineKm === null ? {} : { outline: outlineKm }),
    areaKm2: outlineKm === null ? null : areaOf(outlineKm, ringArea),
  };
}

/**
 * All patches at once, since they are drawn on one plane: kilometres east and north of the middle of them all, with the length
 * of a degree as it is there. Distances and areas never come from that plane but from the ellipsoid.
 */
export function onEllipsoid(all: readonly Located[]): readonly Ground[] {
  const reference = all.flatMap(({ at, outline }) => at ?? outline?.[0]?.[0]?.[0] ?? [])[0] ?? 0;
  const near = ([longitude, latitude]: Point): Point => [longitudeNear(longitude, reference), latitude];
  const unwrapped = all.map(({ at, outline }) => ({
    at: at === null ? null : near(at),
    outline: outline === null ? null : mapOutline(outline, near),
  }));
  const centres = unwrapped.map((one) => one.at ?? (one.outline === null ? null : centreOfDegrees(one.outline)));
  const toPlane = drawingPlane(centres.flatMap((centre) => (centre === null ? [] : [centre])));
  return unwrapped.map(({ outline }, i): Ground => {
    const degrees = centres[i] ?? null;
    return {
      at: degrees === null ? null : toPlane(degrees),
      ...(degrees === null ? {} : { degrees }),
      ...(outline === null ? {} : { outline: mapOutline(outline, toPlane), degreesOutline: outline }),
      areaKm2: outline === null ? null : areaOf(outline, geodesicAreaKm2),
    };
  });
}

/** Holes taken out; rounded to 1 m². */
function areaOf(outline: Outline, ofRing: (ring: Outline[number][number]) => number): number {
  let area = 0;
  for (const polygon of outline) polygon.forEach((ring, r) => (area += (r === 0 ? 1 : -1) * ofRing(ring)));
  return Math.round(area * 1e6) / 1e6;
}

/** Centre of area on a plane that touches the patch, to 1e-9 degrees (a tenth of a millimetre). */
function centreOfDegrees(outline: Outline): Point | null {
  const latitudes = outline.flat(2).map(([, latitude]) => latitude);
  const [kx, ky] = kmPerDegree(middle(latitudes));
  const [x0, y0] = outline[0]?.[0]?.[0] ?? [0, 0];
  const centre = centroidOf(mapOutline(outline, ([x, y]) => [(x - x0) * kx, (y - y0) * ky]));
  if (centre === null) return null;
  const round = (degrees: number): number => Math.round(degrees * 1e9) / 1e9;
  return [round(x0 + centre[0] / kx), round(y0 + centre[1] / ky)];
}

function drawingPlane(centres: readonly Point[]): (point: Point) => Point {
  const [x0, y0] = [middle(centres.map(([x]) => x)), middle(centres.map(([, y]) => y))];
  const [kx, ky] = kmPerDegree(y0);
  const round = (km: number): number => Math.round(km * 1e6) / 1e6;
  return ([x, y]) => [round((x - x0) * kx), round((y - y0) * ky)];
}

function middle(values: readonly number[]): number {
  let [least, most] = [Infinity, -Infinity];
  for (const value of values) {
    least = Math.min(least, value);
    most = Math.max(most, value);
  }
  return values.length === 0 ? 0 : (least + most) / 2;
}

function mapOutline(outline: Outline, change: (point: Point) => Point): Outline {
  return outline.map((polygon) => polygon.map((ring) => ring.map(change)));
}
