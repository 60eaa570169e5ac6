// The nearest points of two outlines, by branch and bound over boxes of a few sides each.
import { isInside, segmentsMeet } from './crossing.ts';
import type { Outline, Point } from './point.ts';

/** A stretch of an outline; a single point is a stretch without length. */
type Side = readonly [Point, Point];

interface Box {
  readonly west: number;
  readonly south: number;
  readonly east: number;
  readonly north: number;
}

interface Bundle {
  readonly box: Box;
  readonly sides: readonly Side[];
}

/** An outline made ready to be measured from. */
export interface Edges {
  readonly outline: Outline;
  readonly bundles: readonly Bundle[];
}

const sidesInBundle = 12;

export function edgesOf(outline: Outline): Edges {
  const sides = outline.flat().flatMap((ring) => {
    return ring.map((from, i): Side => [from, ring[(i + 1) % ring.length] ?? from]);
  });
  const bundles: Bundle[] = [];
  for (let i = 0; i < sides.length; i += sidesInBundle) {
    const own = sides.slice(i, i + sidesInBundle);
    bundles.push({ box: boxOf(own), sides: own });
  }
  return { outline, bundles };
}

/**
 * One point of each outline, as near as any two are; the same point twice where they touch or overlap. A step along x counts
 * `scale[0]` and one along y `scale[1]`, so that degrees can be measured where they are.
 */
export function nearestPoints(a: Edges, b: Edges, scale: Point = [1, 1]): readonly [Point, Point] {
  const inside = insideOther(a, b) ?? insideOther(b, a);
  if (inside !== null) return [inside, inside];
  // The pair of bundles whose boxes are nearest gives a bound at once, which few of the others get under.
  let nearest: Pair | null = null;
  for (const one of a.bundles) {
    for (const other of b.bundles) {
      const least = gapSquared(one.box, other.box, scale);
      if (nearest === null || least < nearest.least) nearest = { one, other, least };
    }
  }
  if (nearest === null) throw new RangeError('An outline has at least one point.');
  let best = nearestOfBundles(nearest, scale);
  for (const one of a.bundles) {
    for (const other of b.bundles) {
      const least = gapSquared(one.box, other.box, scale);
      if (least >= best.squared || (one === nearest.one && other === nearest.other)) continue;
      const found = nearestOfBundles({ one, other, least }, scale);
      if (found.squared < best.squared) best = found;
    }
  }
  return best.points;
}

interface Pair {
  readonly one: Bundle;
  readonly other: Bundle;
  /** No two points of theirs are nearer; squared. */
  readonly least: number;
}

interface Found {
  readonly points: readonly [Point, Point];
  readonly squared: number;
}

function nearestOfBundles({ one, other }: Pair, scale: Point): Found {
  let best: Found | null = null;
  for (const side of one.sides) {
    for (const opposite of other.sides) {
      const points = nearestOfSides(side, opposite, scale);
      const squared = distanceSquared(points[0], points[1], scale);
      if (best === null || squared < best.squared) best = { points, squared };
    }
  }
  if (best === null) throw new RangeError('A bundle has at least one side.');
  return best;
}

/** A corner of the first that lies inside the second. */
function insideOther(a: Edges, b: Edges): Point | null {
  for (const [outer] of a.outline) {
    const corner = outer?.[0];
    if (corner !== undefined && b.outline.some((polygon) => isInside(corner, polygon))) return corner;
  }
  return null;
}

function nearestOfSides([a, b]: Side, [c, d]: Side, scale: Point): readonly [Point, Point] {
  if (segmentsMeet(a, b, c, d)) {
    const common = meetingPoint([a, b], [c, d]);
    return [common, common];
  }
  const candidates: readonly (readonly [Point, Point])[] = [
    [a, onto(a, [c, d], scale)],
    [b, onto(b, [c, d], scale)],
    [onto(c, [a, b], scale), c],
    [onto(d, [a, b], scale), d],
  ];
  return candidates.reduce((best, one) => {
    return distanceSquared(one[0], one[1], scale) < distanceSquared(best[0], best[1], scale) ? one : best;
  });
}

/** Where two stretches that meet do so; an end where they lie on one line. */
function meetingPoint([a, b]: Side, [c, d]: Side): Point {
  const [dx, dy, ex, ey] = [b[0] - a[0], b[1] - a[1], d[0] - c[0], d[1] - c[1]];
  const cross = dx * ey - dy * ex;
  if (cross === 0) return onto(a, [c, d], [1, 1]);
  const along = ((c[0] - a[0]) * ey - (c[1] - a[1]) * ex) / cross;
  return [a[0] + along * dx, a[1] + along * dy];
}

/** The point of a stretch that is nearest to a point. */
function onto(point: Point, [a, b]: Side, [kx, ky]: Point): Point {
  const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
  const length = kx * kx * dx * dx + ky * ky * dy * dy;
  const [px, py] = [point[0] - a[0], point[1] - a[1]];
  const along = length === 0 ? 0 : (kx * kx * px * dx + ky * ky * py * dy) / length;
  const share = Math.min(1, Math.max(0, along));
  return [a[0] + share * dx, a[1] + share * dy];
}

function distanceSquared(a: Point, b: Point, [kx, ky]: Point): number {
  const [dx, dy] = [kx * (a[0] - b[0]), ky * (a[1] - b[1])];
  return dx * dx + dy * dy;
}

function boxOf(sides: readonly Side[]): Box {
  const box = { west: Infinity, south: Infinity, east: -Infinity, north: -Infinity };
  for (const [x, y] of sides.flat()) {
    box.west = Math.min(box.west, x);
    box.east = Math.max(box.east, x);
    box.south = Math.min(box.south, y);
    box.north = Math.max(box.north, y);
  }
  return box;
}

function gapSquared(a: Box, b: Box, [kx, ky]: Point): number {
  const dx = kx * Math.max(0, a.west - b.east, b.west - a.east);
  const dy = ky * Math.max(0, a.south - b.north, b.south - a.north);
  return dx * dx + dy * dy;
}
