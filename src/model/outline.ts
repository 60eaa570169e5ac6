// The outlines of patches as their author wrote them: rings that end where they begin, that do not cross, with holes inside.
import { isInRing, selfCrossing } from '../numeric/plane/crossing.ts';
import type { Outline, Point, Polygon, Ring } from '../numeric/plane/point.ts';
import type { SpecPath } from '../spec/document.ts';
import type { Finding } from '../spec/finding.ts';
import type { InlinePatchSpec } from '../spec/schema/spec.ts';

type WrittenOutline = NonNullable<InlinePatchSpec['outline']>;

/** Whose outline, and where it stands. */
export interface OutlineOwner {
  readonly name: string;
  readonly path: SpecPath;
  readonly findings: Finding[];
}

/** In the units of the spec, rings without their repeated last point; null after telling what is wrong with it. */
export function readOutline(written: WrittenOutline, owner: OutlineOwner): Outline | null {
  const outline = written.map((polygon) => polygon.map(withoutRepeats));
  const checked = outline.map((polygon, i) => checkPolygon(polygon, i, owner));
  return checked.every((fine) => fine) ? outline : null;
}

/** A point that stands twice in a row is one, and so are the first and the last. */
function withoutRepeats(ring: readonly Point[]): Ring {
  const same = (a: Point | undefined, b: Point): boolean => a !== undefined && a[0] === b[0] && a[1] === b[1];
  const own = ring.filter((point, i) => i === 0 || !same(ring[i - 1], point));
  const [first] = own;
  return own.length > 1 && first !== undefined && same(own.at(-1), first) ? own.slice(0, -1) : own;
}

function checkPolygon(polygon: Polygon, index: number, owner: OutlineOwner): boolean {
  const [outer] = polygon;
  if (outer === undefined) return refuse(owner, [index], { message: `${owner.name} has a polygon without a ring` });
  return polygon
    .map(
      (ring, r) => checkRing(ring, [index, r], owner) && (r === 0 || checkHole(ring, outer, { at: [index, r], owner })),
    )
    .every((fine) => fine);
}

function checkRing(ring: Ring, at: readonly number[], owner: OutlineOwner): boolean {
  if (ring.length < 3) {
    const expected = 'at least three different places';
    return refuse(owner, at, { message: `${owner.name} has a ring without an inside`, expected });
  }
  const crossing = selfCrossing(ring);
  if (crossing === null) return true;
  const point = (i: number): string => `[${(ring[i % ring.length] ?? []).join(', ')}]`;
  const side = (i: number): string => `${point(i)} to ${point(i + 1)}`;
  owner.findings.push({
    severity: 'error',
    code: 'self-crossing',
    message: `The outline of ${owner.name} crosses or touches itself`,
    path: [...owner.path, ...at],
    details: {
      found: `the sides ${side(crossing[0])} and ${side(crossing[1])} meet`,
      expected: 'rings whose sides only meet at their ends',
      fix: 'Mend the geometry in a geographic information system, or cut the patch into several polygons.',
    },
  });
  return false;
}

interface Hole {
  readonly at: readonly number[];
  readonly owner: OutlineOwner;
}

function checkHole(hole: Ring, outer: Ring, { at, owner }: Hole): boolean {
  if (hole.some((point) => isInRing(point, outer))) return true;
  return refuse(owner, at, {
    message: `${owner.name} has a hole that lies outside its polygon`,
    expected: 'first the outer ring, then the rings of its holes',
  });
}

function refuse(
  { path, findings }: OutlineOwner,
  at: readonly number[],
  { message, expected }: { readonly message: string; readonly expected?: string },
): false {
  const details = expected === undefined ? {} : { details: { expected } };
  findings.push({ severity: 'error', code: 'outline-ring', message, path: [...path, ...at], ...details });
  return false;
}
