// Where the patches lie, for those that come from a map: a reader sees at once if degrees were taken for metres.
import { distanceKm } from '../landscape/distance.ts';
import type { Model, Patch } from '../model/model.ts';

/** Pairs beyond these many patches are not searched. */
const mostPatches = 500;

/** Nothing where places are plain numbers on a plane. */
export function placesWords({ patches }: Model): readonly string[] {
  const inDegrees = patches.some((patch) => patch.degrees !== undefined);
  const outlined = patches.filter((patch) => patch.outline !== undefined);
  if (!inDegrees && outlined.length === 0) return [];
  return [
    inDegrees
      ? 'Places are longitude and latitude; distances and areas are measured on the WGS84 ellipsoid.'
      : 'Places lie on a plane.',
    ...outlineWords(outlined),
    ...pairWords(patches),
  ];
}

function outlineWords(outlined: readonly Patch[]): readonly string[] {
  const [first, ...others] = outlined.toSorted((a, b) => (a.areaKm2 ?? 0) - (b.areaKm2 ?? 0));
  const last = others.at(-1);
  if (first === undefined) return [];
  const words = (patch: Patch): string => `${areaWords(patch.areaKm2 ?? 0)} (${patch.name})`;
  if (last === undefined) return [`The outline measures ${words(first)}.`];
  return [`The outlines of ${String(outlined.length)} patches measure from ${words(first)} to ${words(last)}.`];
}

/** Small ones in hectares. */
export function areaWords(areaKm2: number): string {
  return areaKm2 < 10 ? `${Number((areaKm2 * 100).toPrecision(3))} ha` : `${Number(areaKm2.toPrecision(4))} km2`;
}

function pairWords(patches: readonly Patch[]): readonly string[] {
  if (patches.length < 2 || patches.length > mostPatches) return [];
  const pairs = patches.flatMap((a, i) => patches.slice(i + 1).map((b) => ({ a, b, km: distanceKm(a, b) })));
  const placed = pairs.filter(({ km }) => Number.isFinite(km)).sort((x, y) => x.km - y.km);
  const [nearest, farthest] = [placed[0], placed.at(-1)];
  if (nearest === undefined || farthest === undefined) return [];
  const words = ({ a, b, km }: typeof nearest): string => `${a.name} and ${b.name}, ${Number(km.toPrecision(3))} km`;
  if (placed.length === 1) return [`From middle to middle: ${words(nearest)}.`];
  return [`From middle to middle the nearest are ${words(nearest)}; the farthest ${words(farthest)}.`];
}
