// Outlines without what no reader could see, so that a page of many fine outlines stays light.
import type { OutlineView, RingView } from '../contract.ts';

type Point = RingView[number];

/** Pixels across the widest map; a stray of half of one is not seen. */
const pixelsAcross = 1000;

/** Thinned to half a pixel on the widest map of all of them together, and rounded well below that. */
export function thinOutlines(outlines: readonly (OutlineView | null)[]): readonly (OutlineView | null)[] {
  const extent = extentOf(outlines.flatMap((outline) => outline?.flatMap((polygon) => polygon[0] ?? []) ?? []));
  const toleranceKm = extent / pixelsAcross / 2;
  const digits = toleranceKm > 0 ? Math.max(0, Math.ceil(-Math.log10(toleranceKm / 4))) : 6;
  const short = (value: number) => Number(value.toFixed(digits));
  const thin = (ring: RingView): RingView => thinRing(ring, toleranceKm).map(([x, y]): Point => [short(x), short(y)]);
  return outlines.map((outline) => outline?.map((polygon) => polygon.map(thin)) ?? null);
}

/** Douglas & Peucker (1973) on a ring: it is cut at its first point and at the one farthest from it, which both stay. */
export function thinRing(ring: RingView, tolerance: number): RingView {
  const [first] = ring;
  if (first === undefined || ring.length <= 3) return ring;
  const far = farthest(ring, (point) => Math.hypot(point[0] - first[0], point[1] - first[1])).index;
  const there = thinLine(ring.slice(0, far + 1), tolerance);
  const back = thinLine([...ring.slice(far), first], tolerance);
  const thin = [...there, ...back.slice(1, -1)];
  return thin.length > 2 ? thin : ring.slice(0, 3);
}

/** Keeps both ends and what lies farther than the tolerance from the line between those kept. */
function thinLine(line: RingView, tolerance: number): RingView {
  const kept = new Set([0, line.length - 1]);
  const open: [number, number][] = [[0, line.length - 1]];
  for (let stretch = open.pop(); stretch !== undefined; stretch = open.pop()) {
    const [from, to] = stretch;
    const [a, b] = [line[from], line[to]];
    if (a === undefined || b === undefined || to - from < 2) continue;
    const { index, distance } = farthest(line.slice(from + 1, to), (point) => fromSegment(point, a, b));
    if (distance <= tolerance) continue;
    const middle = from + 1 + index;
    kept.add(middle);
    open.push([from, middle], [middle, to]);
  }
  return line.filter((_, i) => kept.has(i));
}

function fromSegment(point: Point, a: Point, b: Point): number {
  const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
  const square = dx * dx + dy * dy;
  const along = square > 0 ? ((point[0] - a[0]) * dx + (point[1] - a[1]) * dy) / square : 0;
  const t = Math.max(0, Math.min(1, along));
  return Math.hypot(point[0] - a[0] - t * dx, point[1] - a[1] - t * dy);
}

function farthest(points: RingView, distanceOf: (point: Point) => number) {
  let [index, distance] = [0, -1];
  points.forEach((point, i) => {
    const away = distanceOf(point);
    if (away > distance) [index, distance] = [i, away];
  });
  return { index, distance };
}

function extentOf(points: RingView): number {
  let [left, right, low, high] = [Infinity, -Infinity, Infinity, -Infinity];
  for (const [x, y] of points) {
    [left, right] = [Math.min(left, x), Math.max(right, x)];
    [low, high] = [Math.min(low, y), Math.max(high, y)];
  }
  return Math.max(0, right - left, high - low);
}
