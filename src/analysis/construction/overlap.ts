// Patches that lie over each other: animals of the same ground would be counted in both.
import type { CompiledModel } from '../../pipeline.ts';
import { distanceKm } from '../../landscape/distance.ts';
import type { Patch } from '../../model/model.ts';
import { overlaps } from '../../numeric/plane/overlap.ts';
import type { Finding } from '../../spec/finding.ts';

/** Neighbours may be drawn with the same edge twice, a little apart. */
const hairKm = 0.005;

export function overlappingPatches({ model }: CompiledModel): readonly Finding[] {
  const boxes = model.patches.flatMap((patch) => {
    const box = boxOf(patch);
    return box === null ? [] : [box];
  });
  boxes.sort((a, b) => a.west - b.west || a.patch.fileOrder - b.patch.fileOrder);
  let open: Box[] = [];
  const found: (readonly [Box, Box])[] = [];
  for (const box of boxes) {
    open = open.filter((other) => other.east > box.west);
    for (const other of open) if (lieOver(box, other)) found.push([other, box]);
    open.push(box);
  }
  return found.map(([a, b]) => finding(a.patch, b.patch));
}

interface Box {
  readonly patch: Patch;
  readonly west: number;
  readonly east: number;
  readonly south: number;
  readonly north: number;
}

/** Of the outline; of a circle of its area where the patch is a point; null where neither is known. */
function boxOf(patch: Patch): Box | null {
  const { at, outline } = patch;
  if (outline !== undefined) {
    const points = outline.flat(2);
    const [x, y] = [points.map((point) => point[0]), points.map((point) => point[1])];
    const least = (values: readonly number[]) => values.reduce((a, b) => Math.min(a, b), Infinity);
    const most = (values: readonly number[]) => values.reduce((a, b) => Math.max(a, b), -Infinity);
    return { patch, west: least(x), east: most(x), south: least(y), north: most(y) };
  }
  const radius = radiusKm(patch);
  if (at === null || radius === 0) return null;
  return { patch, west: at[0] - radius, east: at[0] + radius, south: at[1] - radius, north: at[1] + radius };
}

function radiusKm({ areaKm2 }: Patch): number {
  return Math.sqrt((areaKm2 ?? 0) / Math.PI);
}

function lieOver(a: Box, b: Box): boolean {
  if (a.north <= b.south || b.north <= a.south) return false;
  const [one, other] = [a.patch.outline, b.patch.outline];
  if (one !== undefined && other !== undefined) return overlaps(one, other, hairKm);
  if (one !== undefined || other !== undefined) return false;
  // Circles are but a guess: only what lies over each other by far is told.
  return distanceKm(a.patch, b.patch) < (radiusKm(a.patch) + radiusKm(b.patch)) / 2;
}

function finding(a: Patch, b: Patch): Finding {
  const [first, second] = [a, b].sort((one, other) => one.fileOrder - other.fileOrder);
  const drawn = a.outline !== undefined;
  return {
    severity: drawn ? 'warning' : 'note',
    code: 'overlapping-patches',
    message: drawn
      ? `The patches ${first?.name ?? ''} and ${second?.name ?? ''} lie over each other`
      : `With their areas, the patches ${first?.name ?? ''} and ${second?.name ?? ''} would lie over each other`,
    path: ['patches', second?.fileOrder ?? 0],
    details: {
      fix: drawn
        ? 'Cut one out of the other, or make one patch of them.'
        : 'See whether areas and distances have the right units.',
      reason: 'Animals, room and area of the ground they share would count twice.',
    },
  };
}
