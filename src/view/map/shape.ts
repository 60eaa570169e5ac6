// The shape of a patch on the map: its outline, or a circle; and its edge, which tells a source from a sink.
import type { OutlineView, RingView, WorthView } from '../contract.ts';
import { mark, type Markup } from '../markup.ts';
import { ink, softInk } from '../palette.ts';
import { pick } from '../series.ts';

type Point = readonly [number, number];

/** Pixels. */
export interface Shape {
  /** The place of the patch. */
  readonly at: Point;
  /** Of the circle, or of one as large as the outline. */
  readonly radius: number;
  readonly outline: OutlineView | null;
  readonly box: Box;
}

export interface Box {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

export function circleShape(at: Point, radius: number): Shape {
  const [x, y] = at;
  return {
    at,
    radius,
    outline: null,
    box: { left: x - radius, right: x + radius, top: y - radius, bottom: y + radius },
  };
}

export function outlineShape(at: Point, outline: OutlineView): Shape {
  const points = outline.flatMap((polygon) => polygon[0] ?? []);
  const box = { left: Infinity, right: -Infinity, top: Infinity, bottom: -Infinity };
  for (const [x, y] of points) {
    [box.left, box.right] = [Math.min(box.left, x), Math.max(box.right, x)];
    [box.top, box.bottom] = [Math.min(box.top, y), Math.max(box.bottom, y)];
  }
  return { at, radius: Math.sqrt(areaOf(outline) / Math.PI), outline, box };
}

/** Square pixels, without the holes. */
export function areaOf(outline: OutlineView): number {
  const rings = outline.map((polygon) => polygon.map((ring) => Math.abs(signedArea(ring))));
  return rings.reduce((sum, [outer = 0, ...holes]) => sum + outer - holes.reduce((a, b) => a + b, 0), 0);
}

/** From its place to its edge on the way to another place. */
export function reachOf({ at, radius, outline }: Shape, to: Point): number {
  if (outline === null) return radius;
  const distance = Math.hypot(to[0] - at[0], to[1] - at[1]);
  const [ux, uy] = distance > 0 ? [(to[0] - at[0]) / distance, (to[1] - at[1]) / distance] : [1, 0];
  const aside = ([x, y]: Point) => (y - at[1]) * ux - (x - at[0]) * uy;
  const along = ([x, y]: Point) => (x - at[0]) * ux + (y - at[1]) * uy;
  let reach = 0;
  for (const ring of outline.flatMap((polygon) => polygon.slice(0, 1))) {
    ring.forEach((a, i) => {
      const b = pick(ring, (i + 1) % ring.length);
      const [sideA, sideB] = [aside(a), aside(b)];
      if (sideA > 0 === sideB > 0) return;
      reach = Math.max(reach, along(a) + ((along(b) - along(a)) * sideA) / (sideA - sideB));
    });
  }
  return reach;
}

export function drawShape({ at, radius, outline }: Shape, attributes: Markup): Markup {
  if (outline === null) return mark`<circle cx="${at[0]}" cy="${at[1]}" r="${radius}" ${attributes}/>`;
  const lines = outline.flat().map((ring) => `M${ring.map(([x, y]) => `${x.toFixed(1)} ${y.toFixed(1)}`).join('L')}Z`);
  return mark`<path d="${lines.join('')}" fill-rule="evenodd" ${attributes}/>`;
}

/** Solid with outward ticks for a source, dashed for a sink, dotted where it is undecided. */
export function edgeOf(role: WorthView['role'] | null, heavy: boolean): Markup {
  const width = heavy ? 2.25 : 1.5;
  switch (role) {
    case null:
      return mark`stroke="${softInk}"`;
    case 'source':
      return mark`stroke="${ink}" stroke-width="${width}"`;
    case 'sink':
      return mark`stroke="${ink}" stroke-width="${width}" stroke-dasharray="6 4"`;
    case 'undecided':
      return mark`stroke="${ink}" stroke-width="${width + 0.5}" stroke-dasharray="0.1 4.5" stroke-linecap="round"`;
  }
}

export function drawTicks(shape: Shape, heavy: boolean): Markup {
  const long = heavy ? 6 : 4.5;
  const lines = shape.outline === null ? circleTicks(shape, long) : ringTicks(shape.outline, long);
  return mark`<path d="${lines.join('')}" stroke="${ink}" stroke-width="${heavy ? 1.75 : 1.25}" fill="none"/>`;
}

/** Pixels from tick to tick. */
const apart = 9;

function circleTicks({ at: [x, y], radius }: Shape, long: number): readonly string[] {
  const count = Math.max(8, Math.round((2 * Math.PI * radius) / apart));
  return Array.from({ length: count }, (_, i) => {
    const angle = (2 * Math.PI * (i + 0.5)) / count;
    return tick([x + radius * Math.cos(angle), y + radius * Math.sin(angle)], [Math.cos(angle), Math.sin(angle)], long);
  });
}

function ringTicks(outline: OutlineView, long: number): readonly string[] {
  return outline.flatMap((polygon) => {
    const ring = polygon[0] ?? [];
    const side = signedArea(ring) > 0 ? 1 : -1;
    const ticks: string[] = [];
    let ahead = apart / 2;
    ring.forEach((a, i) => {
      const b = pick(ring, (i + 1) % ring.length);
      const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
      const [ux, uy] = [(b[0] - a[0]) / length, (b[1] - a[1]) / length];
      for (; ahead < length; ahead += apart) {
        ticks.push(tick([a[0] + ux * ahead, a[1] + uy * ahead], [uy * side, -ux * side], long));
      }
      ahead -= length;
    });
    return ticks;
  });
}

function tick([x, y]: Point, [dx, dy]: Point, long: number): string {
  return `M${x.toFixed(1)} ${y.toFixed(1)}l${(dx * long).toFixed(1)} ${(dy * long).toFixed(1)}`;
}

/** Above 0 where the ring runs clockwise on the screen, whose y goes down. */
function signedArea(ring: RingView): number {
  const twice = ring.reduce((sum, [x, y], i) => {
    const [nextX, nextY] = pick(ring, (i + 1) % ring.length);
    return sum + x * nextY - nextX * y;
  }, 0);
  return twice / 2;
}
