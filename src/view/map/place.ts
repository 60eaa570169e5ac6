// Where each patch stands in the picture: on its plane where all have coordinates, else in a ring that is only a scheme.
import type { OutlineView, PatchView, RingView, Size } from '../contract.ts';
import { pick } from '../series.ts';

type Point = readonly [number, number];

export interface Placing {
  /** Pixels. */
  readonly points: readonly Point[];
  /** In pixels, by patch; null where there is none, or the picture is only a scheme. */
  readonly outlines: readonly (OutlineView | null)[];
  /** Null where the picture is only a scheme. */
  readonly pixelsPerKm: number | null;
}

export interface Frame {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

export function placePatches(patches: readonly PatchView[], frame: Frame): Placing {
  const places = placesOf(patches);
  if (places === null) return ring(patches.length, frame);
  const points = extentOf(patches);
  const box = bounds(points);
  if (points.length > 1 && Math.max(box.width, box.height) === 0) return ring(patches.length, frame);
  return onPlane(patches, places, frame);
}

/** How tall a map of this width should be for the shape of its landscape. */
export function mapHeight(patches: readonly PatchView[], width: number): number {
  const side = margin(patches, width);
  const shape = shapeOf(patches);
  const height = (width - 2 * side) * shape + 1.9 * side + head + foot;
  return Math.round(Math.min(1.05 * width, Math.max((width < 500 ? 0.8 : 0.5) * width, height)));
}

/** The frame inside which centres and outlines may lie, so that circles and names find room. */
export function innerFrame(patches: readonly PatchView[], { width, height }: Size): Frame {
  const side = margin(patches, width);
  return { left: side, right: width - side, top: head + side * 0.95, bottom: height - foot - side * 0.95 };
}

function shapeOf(patches: readonly PatchView[]): number {
  const points = extentOf(patches);
  if (placesOf(patches) === null || points.length < 2) return 0.55;
  const box = bounds(points);
  return box.width > 0 ? box.height / box.width : 1.5;
}

function placesOf(patches: readonly PatchView[]): readonly Point[] | null {
  const places = patches.flatMap((patch) => (patch.at === null ? [] : [patch.at]));
  return places.length < patches.length ? null : places;
}

function extentOf(patches: readonly PatchView[]): readonly Point[] {
  return patches.flatMap(({ at, outline }) => outline?.flatMap((polygon) => polygon[0] ?? []) ?? (at ? [at] : []));
}

function onPlane(patches: readonly PatchView[], places: readonly Point[], frame: Frame): Placing {
  const box = bounds(extentOf(patches));
  const [width, height] = [frame.right - frame.left, frame.bottom - frame.top];
  const fits = [width / box.width, height / box.height].filter(Number.isFinite);
  const scale = fits.length > 0 ? Math.min(...fits) : null;
  const [middleX, middleY] = [(frame.left + frame.right) / 2, (frame.top + frame.bottom) / 2];
  const project = ([x, y]: Point): Point => [
    middleX + (x - box.left - box.width / 2) * (scale ?? 0),
    middleY - (y - box.low - box.height / 2) * (scale ?? 0),
  ];
  const projectRing = (line: RingView): RingView => line.map(project);
  const outlines = patches.map(({ outline }) => outline?.map((polygon) => polygon.map(projectRing)) ?? null);
  return { points: places.map(project), outlines, pixelsPerKm: scale };
}

function ring(count: number, frame: Frame): Placing {
  const [middleX, middleY] = [(frame.left + frame.right) / 2, (frame.top + frame.bottom) / 2];
  const [reachX, reachY] = [(frame.right - frame.left) / 2, (frame.bottom - frame.top) / 2];
  const points = Array.from({ length: count }, (_, i) => {
    const angle = (2 * Math.PI * i) / count - Math.PI / 2;
    const reach = count === 1 ? 0 : 1;
    return [middleX + Math.cos(angle) * reachX * reach, middleY + Math.sin(angle) * reachY * reach] as const;
  });
  return { points, outlines: points.map(() => null), pixelsPerKm: null };
}

function bounds(points: readonly Point[]) {
  const first = pick(points, 0);
  let [left, right, low, high] = [first[0], first[0], first[1], first[1]];
  for (const [x, y] of points) {
    left = Math.min(left, x);
    right = Math.max(right, x);
    low = Math.min(low, y);
    high = Math.max(high, y);
  }
  return { left, low, width: right - left, height: high - low };
}

/** Pixels for the year above and the scale below. */
const head = 42;
const foot = 26;

/** Outlines need less room than circles around points that may lie at the very edge. */
function margin(patches: readonly PatchView[], width: number): number {
  return width * (patches.every((patch) => patch.outline !== null) ? 0.085 : 0.125);
}
