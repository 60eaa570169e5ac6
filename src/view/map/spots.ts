// Places for dots inside a shape, those nearest to the middle first, so that a number always looks the same.
import type { OutlineView, RingView } from '../contract.ts';
import { pick } from '../series.ts';
import type { Shape } from './shape.ts';

type Point = readonly [number, number];

export interface Spacing {
  /** Pixels from dot to dot. */
  readonly apart: number;
  readonly dotRadius: number;
}

/** At least as many as wanted: where the grid has too few, it is drawn closer; at last dots go round the middle. */
export function spotsIn(shape: Shape, wanted: number, { apart, dotRadius }: Spacing): readonly Point[] {
  for (const closer of [1, 0.85, 0.7, 0.55]) {
    const found = gridIn(shape, apart * closer, dotRadius + 0.75);
    if (found.length >= wanted) return found.sort((a, b) => away(a, shape.at) - away(b, shape.at));
  }
  return Array.from({ length: wanted }, (_, i): Point => {
    const out = apart * 0.55 * Math.sqrt(i);
    return [shape.at[0] + out * Math.cos(i * turn), shape.at[1] + out * Math.sin(i * turn)];
  });
}

const turn = Math.PI * (3 - Math.sqrt(5));

/** Rows that are shifted against each other, through the place of the patch. */
function gridIn(shape: Shape, apart: number, clear: number): Point[] {
  const { at, box } = shape;
  const height = apart * 0.866;
  const found: Point[] = [];
  for (let row = Math.ceil((box.top - at[1]) / height); at[1] + row * height < box.bottom; row++) {
    const start = at[0] + (row % 2 === 0 ? 0 : apart / 2);
    for (let i = Math.ceil((box.left - start) / apart); start + i * apart < box.right; i++) {
      const point: Point = [start + i * apart, at[1] + row * height];
      if (isClear(point, shape, clear)) found.push(point);
    }
  }
  return found;
}

function isClear(point: Point, { at, radius, outline }: Shape, clear: number): boolean {
  if (outline === null) return away(point, at) <= radius - clear;
  const rings = outline.flat();
  return isInside(point, outline) && rings.every((ring) => fromRing(point, ring) >= clear);
}

/** Even-odd over all rings, so that holes are outside. */
export function isInside([x, y]: Point, outline: OutlineView): boolean {
  let inside = false;
  for (const ring of outline.flat()) {
    ring.forEach(([ax, ay], i) => {
      const [bx, by] = pick(ring, (i + 1) % ring.length);
      if (ay > y !== by > y && x < ax + ((y - ay) / (by - ay)) * (bx - ax)) inside = !inside;
    });
  }
  return inside;
}

function fromRing([x, y]: Point, ring: RingView): number {
  let nearest = Infinity;
  ring.forEach(([ax, ay], i) => {
    const [bx, by] = pick(ring, (i + 1) % ring.length);
    const square = (bx - ax) ** 2 + (by - ay) ** 2;
    const along = square > 0 ? ((x - ax) * (bx - ax) + (y - ay) * (by - ay)) / square : 0;
    const t = Math.max(0, Math.min(1, along));
    nearest = Math.min(nearest, Math.hypot(x - ax - t * (bx - ax), y - ay - t * (by - ay)));
  });
  return nearest;
}

function away(a: Point, b: Point): number {
  return Math.hypot(a[0] - b[0], a[1] - b[1]);
}
