// How large each patch is drawn and how many animals one dot stands for. A circle's area is what the patch can hold, or
// its area, or the most animals seen there, whichever all patches have; dots fill it like seeds in a flower head.
import type { PatchView } from '../contract.ts';
import { roundUp } from '../number.ts';
import { largest, pick } from '../series.ts';

export interface Discs {
  /** Pixels, by patch. */
  readonly radius: readonly number[];
  readonly sizeMeans: 'capacity' | 'area' | 'animals';
  /** Animals that one dot stands for; null where the circles are too small for dots. */
  readonly perDot: number | null;
  readonly dotRadius: number;
  /** Places for dots in each circle. */
  readonly slots: readonly number[];
}

const smallest = 4;
const turn = Math.PI * (3 - Math.sqrt(5));

export function sizeDiscs(
  patches: readonly PatchView[],
  points: readonly (readonly [number, number])[],
  width: number,
): Discs {
  const { sizes, sizeMeans } = measure(patches);
  const most = Math.max(largest(sizes), 1e-9);
  const reach = Math.min(width * 0.11, room(sizes, points, most));
  const radius = sizes.map((size) => Math.max(smallest, reach * Math.sqrt(size / most)));
  const holds = patches.map((patch) => Math.max(patch.capacity ?? 0, largest(patch.fan.p75), 1));
  const crowded = holds.map((count, p) => (16 * count) / pick(radius, p) ** 2);
  const perDot = roundUp(Math.max(1, ...crowded));
  const slots = holds.map((count) => Math.max(1, Math.ceil(count / perDot)));
  const tightest = Math.min(...slots.map((count, p) => pick(radius, p) / Math.sqrt(count)));
  const dots = reach >= 12 && patches.length <= 80;
  return { radius, sizeMeans, perDot: dots ? perDot : null, dotRadius: Math.min(3, tightest * 0.62), slots };
}

/** The dots as one path of points without length, to be drawn with round caps. */
export function dotPath(count: number, slots: number, radius: number, centre: readonly [number, number]): string {
  const places = Math.max(slots, count);
  return Array.from({ length: count }, (_, i) => {
    const away = radius * 0.9 * Math.sqrt((i + 0.4) / places);
    const [x, y] = [centre[0] + away * Math.cos(i * turn), centre[1] + away * Math.sin(i * turn)];
    return `M${x.toFixed(1)} ${y.toFixed(1)}h0`;
  }).join('');
}

function measure(patches: readonly PatchView[]): { sizes: readonly number[]; sizeMeans: Discs['sizeMeans'] } {
  const capacities = patches.flatMap((patch) => (patch.capacity === null ? [] : [patch.capacity]));
  if (capacities.length === patches.length) return { sizes: capacities, sizeMeans: 'capacity' };
  const areas = patches.flatMap((patch) => (patch.areaKm2 === null ? [] : [patch.areaKm2]));
  if (areas.length === patches.length) return { sizes: areas, sizeMeans: 'area' };
  return { sizes: patches.map((patch) => largest(patch.fan.p95)), sizeMeans: 'animals' };
}

/**
 * The radius of the largest circle at which three in four circles keep clear of their nearest neighbour; were it all of
 * them, one close pair would shrink the whole map.
 */
function room(sizes: readonly number[], points: readonly (readonly [number, number])[], most: number): number {
  const clear = points.map((a, i) => {
    let reach = Infinity;
    points.forEach((b, j) => {
      const together = Math.sqrt(pick(sizes, i) / most) + Math.sqrt(pick(sizes, j) / most);
      if (j !== i && together > 0) reach = Math.min(reach, (0.84 * Math.hypot(a[0] - b[0], a[1] - b[1])) / together);
    });
    return reach;
  });
  clear.sort((a, b) => a - b);
  return Math.max(clear[Math.floor(clear.length / 4)] ?? Infinity, smallest);
}
