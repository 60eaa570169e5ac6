// The geometry of a feature as the place or the outline of a patch.
import { put, type Report } from '../shape/report.ts';
import type { SourceEntry, SourceList, SourceMap, SourceNode } from '../text/source.ts';

interface Told {
  readonly feature: SourceMap;
  readonly report: Report;
}

/** `at` for a point, `outline` for a polygon or several. */
export function placesOf(geometry: SourceEntry | undefined, called: string, told: Told): SourceEntry | undefined {
  const value = geometry?.value;
  const type = part(value, 'type');
  const coordinates = part(value, 'coordinates');
  const kind = type?.kind === 'scalar' ? type.source : undefined;
  if (geometry === undefined || coordinates?.kind !== 'list' || coordinates.items.length === 0) {
    return refuse(called, { ...told, at: value ?? told.feature, found: kind ?? 'no geometry' });
  }
  const entry = { keySpan: geometry.keySpan, plain: false };
  switch (kind) {
    case 'Point':
      return { ...entry, key: 'at', value: flat(coordinates) };
    case 'Polygon':
      return outline(entry, { ...coordinates, items: [coordinates] }, called, told.report);
    case 'MultiPolygon':
      return outline(entry, coordinates, called, told.report);
    default:
      return refuse(called, { ...told, at: value ?? told.feature, found: kind ?? 'no type' });
  }
}

function part(node: SourceNode | undefined, key: string): SourceNode | undefined {
  return node?.kind === 'map' ? node.entries.find((entry) => entry.key === key)?.value : undefined;
}

function refuse(called: string, { at, found, report }: Told & { at: SourceNode; found: string }): undefined {
  put(
    report,
    {
      code: 'geojson-shape',
      message: `${called} has a geometry that cannot be a patch`,
      span: { ...at.span, length: 1 },
    },
    { found, expected: 'a Point, Polygon or MultiPolygon with coordinates' },
  );
  return undefined;
}

function outline(
  entry: Pick<SourceEntry, 'keySpan' | 'plain'>,
  polygons: SourceList,
  called: string,
  report: Report,
): SourceEntry | undefined {
  let closed = true;
  const items = lists(polygons).map((rings) => {
    const own = lists(rings).map((ring) => {
      if (!isClosed(ring)) {
        closed = false;
        tellOpen(ring, called, report);
      }
      return { ...ring, items: ring.items.map(flat) };
    });
    return { ...rings, items: own };
  });
  return closed ? { ...entry, key: 'outline', value: { ...polygons, items } } : undefined;
}

function lists(list: SourceList): readonly SourceList[] {
  return list.items.filter((item) => item.kind === 'list');
}

/** A height is left out: a position is longitude and latitude, or x and y. */
function flat(position: SourceNode): SourceNode {
  return position.kind === 'list' ? { ...position, items: position.items.slice(0, 2) } : position;
}

function isClosed({ items }: SourceList): boolean {
  const [first, last] = [items[0], items.at(-1)];
  const numbers = (node: SourceNode | undefined): string =>
    node?.kind === 'list' ? node.items.map((item) => (item.kind === 'scalar' ? String(item.value) : '')).join() : '';
  return items.length >= 4 && numbers(first) === numbers(last);
}

function tellOpen(ring: SourceList, called: string, report: Report): void {
  const many = ring.items.length >= 4;
  put(
    report,
    {
      code: 'open-ring',
      message: `${called} has a ring that ${many ? 'does not end where it begins' : 'is too short'}`,
      span: { ...ring.span, length: 1 },
    },
    { expected: 'at least four positions, the last the same as the first' },
  );
}
