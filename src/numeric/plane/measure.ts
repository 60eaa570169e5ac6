// Areas and centres of rings on a plane.
import type { Outline, Point, Ring } from './point.ts';

interface Moments {
  readonly area: number;
  readonly x: number;
  readonly y: number;
}

/** Σ (x_i y_j − x_j y_i) / 2 and its first moments, about the first point so that large coordinates cost no digits. */
function momentsOf(ring: Ring): Moments {
  const [x0, y0] = ring[0] ?? [0, 0];
  let [area, x, y] = [0, 0, 0];
  ring.forEach(([rawX, rawY], i) => {
    const [nextX, nextY] = ring[(i + 1) % ring.length] ?? [x0, y0];
    const [ax, ay, bx, by] = [rawX - x0, rawY - y0, nextX - x0, nextY - y0];
    const cross = ax * by - bx * ay;
    area += cross / 2;
    x += ((ax + bx) * cross) / 6;
    y += ((ay + by) * cross) / 6;
  });
  const sign = area < 0 ? -1 : 1;
  return { area: sign * area, x: sign * (x + area * x0), y: sign * (y + area * y0) };
}

/** In the square of the unit of the points, whichever way round the ring runs. */
export function ringArea(ring: Ring): number {
  return momentsOf(ring).area;
}

/** Centre of all polygons together, their holes taken out; null where they have no area. */
export function centroidOf(outline: Outline): Point | null {
  let [area, x, y] = [0, 0, 0];
  for (const polygon of outline) {
    polygon.forEach((ring, r) => {
      const own = momentsOf(ring);
      const sign = r === 0 ? 1 : -1;
      area += sign * own.area;
      x += sign * own.x;
      y += sign * own.y;
    });
  }
  return area > 0 ? [x / area, y / area] : null;
}
