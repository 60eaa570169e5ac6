// Straight distances: on the plane, or along the ellipsoid; between the middles of patches or their nearest edges.
import type { Patch } from '../model/model.ts';
import { geodesicKm, kmPerDegree } from '../numeric/geodesic.ts';
import { edgesOf, nearestPoints, type Edges } from '../numeric/plane/nearest.ts';
import type { Point } from '../numeric/plane/point.ts';

/** From where to where a distance is measured. */
export type Between = 'centroids' | 'nearest edges';

/** Kilometres between the middles of two patches, rounded to 1 mm so that every machine has the same number. */
export function distanceKm(a: Patch, b: Patch): number {
  if (a.degrees !== undefined && b.degrees !== undefined) return geodesicKm(a.degrees, b.degrees);
  return a.at === null || b.at === null ? NaN : planeKm(a.at, b.at);
}

function planeKm(a: Point, b: Point): number {
  const [dx, dy] = [a[0] - b[0], a[1] - b[1]];
  return Math.round(Math.sqrt(dx * dx + dy * dy) * 1e6) / 1e6;
}

export interface Neighbour {
  readonly patch: number;
  readonly km: number;
}

export interface Neighbourhood {
  readonly patches: readonly Patch[];
  /** Null for all. */
  readonly reachKm: number | null;
  readonly between?: Between | undefined;
}

/** For each patch the others within reach, in the order of the patches. */
export function neighboursWithin({ patches, reachKm, between }: Neighbourhood): readonly (readonly Neighbour[])[] {
  const measure = between === 'nearest edges' ? betweenEdges(patches, reachKm) : distanceKm;
  const places = patches.map((patch) => northward(patch, between));
  const southFirst = patches.map((_, p) => p).sort((a, b) => (places[a]?.from ?? 0) - (places[b]?.from ?? 0) || a - b);
  const found: Neighbour[][] = patches.map(() => []);
  southFirst.forEach((p, i) => {
    const limit = (places[p]?.to ?? 0) + (reachKm ?? Infinity) + 1e-6;
    for (let k = i + 1; k < southFirst.length; k++) {
      const q = southFirst[k] ?? 0;
      if ((places[q]?.from ?? 0) > limit) break;
      const [from, to] = [patches[p], patches[q]];
      if (from === undefined || to === undefined) continue;
      // Always the same way round, so that the order of sweeping does not change the last bit.
      const km = p < q ? measure(from, to) : measure(to, from);
      if (reachKm !== null && km > reachKm) continue;
      found[p]?.push({ patch: q, km });
      found[q]?.push({ patch: p, km });
    }
  });
  for (const list of found) list.sort((a, b) => a.patch - b.patch);
  return found;
}

/** No two places on the ellipsoid are nearer than this for each degree of latitude between them. */
const leastKmPerDegree = 110.5;

/** How far north a patch begins and ends, in kilometres: two patches are at least as far apart as these stretches. */
function northward(patch: Patch, between: Between | undefined): { readonly from: number; readonly to: number } {
  const scale = patch.degrees === undefined ? 1 : leastKmPerDegree;
  const y = (patch.degrees ?? patch.at)?.[1] ?? 0;
  const outline = between === 'nearest edges' ? (patch.degreesOutline ?? patch.outline) : undefined;
  let [from, to] = [y, y];
  for (const [, north] of outline?.flat(2) ?? []) {
    from = Math.min(from, north);
    to = Math.max(to, north);
  }
  return { from: from * scale, to: to * scale };
}

/** A patch without an outline is its point. Pairs whose middles are too far apart to have edges within reach are not measured. */
function betweenEdges(patches: readonly Patch[], reachKm: number | null): (a: Patch, b: Patch) => number {
  const known = new Map<Patch, { readonly edges: Edges; readonly radiusKm: number }>();
  const shape = (patch: Patch) => {
    const own = known.get(patch) ?? { edges: edgesOf(outlineOf(patch)), radiusKm: radiusOf(patch) };
    known.set(patch, own);
    return own;
  };
  const inDegrees = patches.some((patch) => patch.degrees !== undefined);
  return (a, b) => {
    const [one, other] = [shape(a), shape(b)];
    if (reachKm !== null && distanceKm(a, b) > reachKm + one.radiusKm + other.radiusKm) return Infinity;
    const scale = inDegrees ? kmPerDegree(((a.degrees?.[1] ?? 0) + (b.degrees?.[1] ?? 0)) / 2) : undefined;
    const [from, to] = nearestPoints(one.edges, other.edges, scale);
    return inDegrees ? geodesicKm(from, to) : planeKm(from, to);
  };
}

/** No point of the outline is farther from the middle of the patch. */
function radiusOf(patch: Patch): number {
  const middle = patch.degrees ?? patch.at;
  const measure = patch.degrees === undefined ? planeKm : geodesicKm;
  const corners = outlineOf(patch).flat(2);
  // A side that is straight in degrees bulges beyond its ends by far less than a hundredth.
  return middle === null
    ? Infinity
    : 1.01 * corners.reduce((most, corner) => Math.max(most, measure(middle, corner)), 0);
}

function outlineOf(patch: Patch): readonly (readonly (readonly Point[])[])[] {
  const outline = patch.degrees === undefined ? patch.outline : patch.degreesOutline;
  return outline ?? [[[patch.degrees ?? patch.at ?? [NaN, NaN]]]];
}
