// Whether areas in the plane lie over each other by more than a hair: neighbours may share an edge that was drawn twice.
import { isInside } from './crossing.ts';
import type { Outline, Point, Ring } from './point.ts';

/** Some corner of one lies inside the other, further than `hair` from all its edges. */
export function overlaps(a: Outline, b: Outline, hair: number): boolean {
  return reachesInto(a, b, hair) || reachesInto(b, a, hair);
}

function reachesInto(a: Outline, b: Outline, hair: number): boolean {
  const corners = a.flatMap(([outer = []]) => [...outer, middle(outer)]);
  return corners.some((corner) => b.some((polygon) => isInside(corner, polygon)) && fromEdges(corner, b) > hair);
}

/** Of the corners; inside of rings that are not bent too much, so that equal outlines are seen to be so. */
function middle(ring: Ring): Point {
  const sum = ring.reduce<Point>(([x, y], [px, py]) => [x + px, y + py], [0, 0]);
  return [sum[0] / Math.max(1, ring.length), sum[1] / Math.max(1, ring.length)];
}

function fromEdges(point: Point, outline: Outline): number {
  const squared = outline
    .flat()
    .flatMap((ring) => ring.map((from, i) => fromStretch(point, from, ring[(i + 1) % ring.length] ?? from)));
  return Math.sqrt(squared.reduce((least, one) => Math.min(least, one), Infinity));
}

function fromStretch([x, y]: Point, [ax, ay]: Point, [bx, by]: Point): number {
  const [dx, dy] = [bx - ax, by - ay];
  const length = dx * dx + dy * dy;
  const along = length === 0 ? 0 : Math.max(0, Math.min(1, ((x - ax) * dx + (y - ay) * dy) / length));
  const [ex, ey] = [x - ax - along * dx, y - ay - along * dy];
  return ex * ex + ey * ey;
}
