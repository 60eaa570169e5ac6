// What stands for each patch: its outline, true to scale, or a circle; and how many animals one dot stands for.
import type { PatchView } from '../contract.ts';
import { roundUp } from '../number.ts';
import { largest, pick } from '../series.ts';
import { dotPath, sizeDiscs, type Discs } from './discs.ts';
import type { Placing } from './place.ts';
import { areaOf, circleShape, outlineShape, type Shape } from './shape.ts';
import { spotsIn } from './spots.ts';

export interface Marks {
  readonly shapes: readonly Shape[];
  readonly sizeMeans: Discs['sizeMeans'] | 'outline' | 'outline or area';
  /** Animals that one dot stands for; null where there is no room for dots. */
  readonly perDot: number | null;
  readonly dotRadius: number;
  /** So many dots in a patch, as one path. */
  readonly dots: (patch: number, count: number) => string;
}

export function sizeMarks(patches: readonly PatchView[], placing: Placing, width: number): Marks {
  if (placing.outlines.some((outline) => outline !== null)) return outlineMarks(patches, placing);
  const discs = sizeDiscs(patches, placing.points, width);
  const shapes = placing.points.map((at, p) => circleShape(at, pick(discs.radius, p)));
  const dots = (p: number, count: number) =>
    dotPath(count, pick(discs.slots, p), pick(discs.radius, p), pick(placing.points, p));
  return { shapes, sizeMeans: discs.sizeMeans, perDot: discs.perDot, dotRadius: discs.dotRadius, dots };
}

/** Pixels from dot to dot: as wide apart as costs no dots, never closer than they can be told apart. */
const widest = 11;
const closest = 5.5;
/** Of the area of an outline, the part that dots can fill. */
const usable = 0.7;

function outlineMarks(patches: readonly PatchView[], placing: Placing): Marks {
  const shapes = patches.map((patch, p) => shapeOf(patch, p, placing));
  const holds = patches.map((patch) => Math.max(patch.capacity ?? 0, largest(patch.fan.p75), 1));
  const animalsPerDot = (apart: number) => {
    const crowded = shapes.map((shape, p) => (pick(holds, p) * cell(apart)) / (usable * roomIn(shape)));
    return roundUp(Math.max(1, ...crowded));
  };
  const perDot = animalsPerDot(closest);
  let apart = widest;
  while (apart > closest && animalsPerDot(apart) > perDot) apart -= 0.5;
  const most = largest(patches.map((patch) => largest(patch.fan.median)));
  const dotRadius = Math.min(3, apart * 0.3);
  const slots = holds.map((count) => Math.max(1, Math.ceil(count / perDot)));
  const dots = patches.length <= 80 && (perDot === 1 || 3 * perDot <= most);
  const spots = dots ? shapes.map((shape, p) => spotsIn(shape, pick(slots, p), { apart, dotRadius })) : [];
  return {
    shapes,
    sizeMeans: shapes.every((shape) => shape.outline !== null) ? 'outline' : 'outline or area',
    perDot: dots ? perDot : null,
    dotRadius,
    dots: (p, count) =>
      pick(spots, p)
        .slice(0, count)
        .map(([x, y]) => `M${x.toFixed(1)} ${y.toFixed(1)}h0`)
        .join(''),
  };
}

/** Square pixels of a dot and its share of the gaps, in rows that are shifted against each other. */
function cell(apart: number): number {
  return 0.866 * apart * apart;
}

function roomIn({ outline, radius }: Shape): number {
  return Math.max(smallestRoom, outline === null ? Math.PI * radius * radius : areaOf(outline));
}

/** One dot at least in whatever is there. */
const smallestRoom = 40;
const smallestRadius = 4;

function shapeOf(patch: PatchView, p: number, { points, outlines, pixelsPerKm }: Placing): Shape {
  const [at, outline] = [pick(points, p), pick(outlines, p)];
  if (outline !== null) return outlineShape(at, outline);
  const radius = Math.sqrt((patch.areaKm2 ?? 0) / Math.PI) * (pixelsPerKm ?? 0);
  return circleShape(at, Math.max(smallestRadius, radius));
}
