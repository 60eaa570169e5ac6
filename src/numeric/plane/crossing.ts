// Whether lines cross, and whether a point lies inside: exact in sign up to rounding of the products.
import type { Point, Polygon, Ring } from './point.ts';

/** Twice the area of a triangle: positive where c lies to the left of a to b. */
function turn(a: Point, b: Point, c: Point): number {
  return (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0]);
}

function within(value: number, one: number, other: number): boolean {
  return value >= Math.min(one, other) && value <= Math.max(one, other);
}

function onSegment(a: Point, b: Point, point: Point): boolean {
  return turn(a, b, point) === 0 && within(point[0], a[0], b[0]) && within(point[1], a[1], b[1]);
}

/** Whether two stretches have a point in common, their ends included. */
export function segmentsMeet(a: Point, b: Point, c: Point, d: Point): boolean {
  const [abc, abd, cda, cdb] = [turn(a, b, c), turn(a, b, d), turn(c, d, a), turn(c, d, b)];
  if (abc * abd < 0 && cda * cdb < 0) return true;
  return onSegment(a, b, c) || onSegment(a, b, d) || onSegment(c, d, a) || onSegment(c, d, b);
}

/**
 * The first two sides of a ring (by the index of the point they begin at) that meet elsewhere than at the point they share;
 * null where the ring is simple. Sides are swept from west to east, so that a long ring of short sides costs about n log n.
 */
export function selfCrossing(ring: Ring): readonly [number, number] | null {
  const sides = ring.map((from, i) => {
    const to = ring[(i + 1) % ring.length] ?? from;
    return { i, from, to, west: Math.min(from[0], to[0]), east: Math.max(from[0], to[0]) };
  });
  sides.sort((a, b) => a.west - b.west || a.i - b.i);
  let open: typeof sides = [];
  for (const side of sides) {
    open = open.filter((other) => other.east >= side.west);
    for (const other of open) {
      if (meetWrongly(ring, side, other)) return [Math.min(side.i, other.i), Math.max(side.i, other.i)];
    }
    open.push(side);
  }
  return null;
}

interface Side {
  readonly i: number;
  readonly from: Point;
  readonly to: Point;
}

function meetWrongly(ring: Ring, one: Side, other: Side): boolean {
  const follows = (a: Side, b: Side): boolean => (a.i + 1) % ring.length === b.i;
  // Neighbours share a point; they meet wrongly only where one folds back over the other.
  if (follows(one, other)) return onSegment(one.from, one.to, other.to) || onSegment(other.from, other.to, one.from);
  if (follows(other, one)) return meetWrongly(ring, other, one);
  return segmentsMeet(one.from, one.to, other.from, other.to);
}

/** Whether a point lies in a polygon and in none of its holes; its edges count as outside or inside as they come. */
export function isInside(point: Point, polygon: Polygon): boolean {
  return polygon.reduce((inside, ring) => inside !== isInRing(point, ring), false);
}

export function isInRing([x, y]: Point, ring: Ring): boolean {
  let inside = false;
  ring.forEach(([ax, ay], i) => {
    const [bx, by] = ring[(i + 1) % ring.length] ?? [ax, ay];
    if (ay > y !== by > y && x < ((bx - ax) * (y - ay)) / (by - ay) + ax) inside = !inside;
  });
  return inside;
}
