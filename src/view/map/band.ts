// Movement from one patch to another: a bent band, wide where animals set out and thin where they arrive.
import { areaWithin } from '../path.ts';

export interface Ends {
  readonly from: readonly [number, number];
  readonly to: readonly [number, number];
  readonly fromRadius: number;
  readonly toRadius: number;
}

/** Along a band: as many as a bend of this length (pixels) needs to look round. */
function stepsFor(length: number): number {
  return Math.max(4, Math.min(14, Math.round(length / 6)));
}

/** The outline of a band of this width (pixels) at its origin. It keeps to the right of the straight line. */
export function bandPath(ends: Ends, width: number, bent = 0.16): string {
  const [dx, dy] = [ends.to[0] - ends.from[0], ends.to[1] - ends.from[1]];
  const distance = Math.hypot(dx, dy);
  if (distance === 0) return '';
  const [ux, uy] = [dx / distance, dy / distance];
  const bend = Math.min(34, distance * bent);
  const middle: Point = [ends.from[0] + dx / 2 - uy * bend, ends.from[1] + dy / 2 + ux * bend];
  const start = towards(ends.from, middle, ends.fromRadius + 1.5);
  const end = towards(ends.to, middle, ends.toRadius + 2.5);
  return areaWithin(outline(start, middle, end, width));
}

type Point = [number, number];

function towards(from: readonly [number, number], to: Point, away: number): Point {
  const distance = Math.hypot(to[0] - from[0], to[1] - from[1]);
  const share = distance > 0 ? Math.min(0.9, away / distance) : 0;
  return [from[0] + (to[0] - from[0]) * share, from[1] + (to[1] - from[1]) * share];
}

function outline(start: Point, middle: Point, end: Point, width: number): Point[] {
  const [there, back]: [Point[], Point[]] = [[], []];
  const steps = stepsFor(Math.hypot(end[0] - start[0], end[1] - start[1]));
  for (let i = 0; i <= steps; i++) {
    const t = i / steps;
    const x = (1 - t) ** 2 * start[0] + 2 * t * (1 - t) * middle[0] + t ** 2 * end[0];
    const y = (1 - t) ** 2 * start[1] + 2 * t * (1 - t) * middle[1] + t ** 2 * end[1];
    const slopeX = (1 - t) * (middle[0] - start[0]) + t * (end[0] - middle[0]);
    const slopeY = (1 - t) * (middle[1] - start[1]) + t * (end[1] - middle[1]);
    const slope = Math.max(Math.hypot(slopeX, slopeY), 1e-9);
    const half = (width * (1 - t) + Math.min(width, 0.7) * t) / 2;
    there.push([x - (slopeY / slope) * half, y + (slopeX / slope) * half]);
    back.unshift([x + (slopeY / slope) * half, y - (slopeX / slope) * half]);
  }
  return [...there, ...back];
}
