// Where each patch stands in the picture: on its plane where all have coordinates, else in a ring that is only a scheme.
import type { PatchView, Size } from '../contract.ts';
import { pick } from '../series.ts';

export interface Placing {
  /** Pixels. */
  readonly points: readonly (readonly [number, number])[];
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
  const places = patches.flatMap((patch) => (patch.at === null ? [] : [patch.at]));
  if (places.length < patches.length) return ring(patches.length, frame);
  const box = bounds(places);
  if (patches.length > 1 && Math.max(box.width, box.height) === 0) return ring(patches.length, frame);
  return onPlane(places, frame);
}

/** How tall a map of this width should be for the shape of its landscape. */
export function mapHeight(patches: readonly PatchView[], width: number): number {
  const side = margin(width);
  const shape = shapeOf(patches);
  const height = (width - 2 * side) * shape + 1.9 * side + head + foot;
  return Math.round(Math.min(1.05 * width, Math.max((width < 500 ? 0.8 : 0.5) * width, height)));
}

function shapeOf(patches: readonly PatchView[]): number {
  const places = patches.flatMap((patch) => (patch.at === null ? [] : [patch.at]));
  if (places.length < patches.length || places.length < 2) return 0.55;
  const box = bounds(places);
  return box.width > 0 ? box.height / box.width : 1.5;
}

function onPlane(places: readonly (readonly [number, number])[], frame: Frame): Placing {
  const box = bounds(places);
  const [width, height] = [frame.right - frame.left, frame.bottom - frame.top];
  const fits = [width / box.width, height / box.height].filter(Number.isFinite);
  const scale = fits.length > 0 ? Math.min(...fits) : null;
  const [middleX, middleY] = [(frame.left + frame.right) / 2, (frame.top + frame.bottom) / 2];
  const points = places.map(
    ([x, y]) =>
      [
        middleX + (x - box.left - box.width / 2) * (scale ?? 0),
        middleY - (y - box.low - box.height / 2) * (scale ?? 0),
      ] as const,
  );
  return { points, pixelsPerKm: scale };
}

function ring(count: number, frame: Frame): Placing {
  const [middleX, middleY] = [(frame.left + frame.right) / 2, (frame.top + frame.bottom) / 2];
  const [reachX, reachY] = [(frame.right - frame.left) / 2, (frame.bottom - frame.top) / 2];
  const points = Array.from({ length: count }, (_, i) => {
    const angle = (2 * Math.PI * i) / count - Math.PI / 2;
    const reach = count === 1 ? 0 : 1;
    return [middleX + Math.cos(angle) * reachX * reach, middleY + Math.sin(angle) * reachY * reach] as const;
  });
  return { points, pixelsPerKm: null };
}

function bounds(places: readonly (readonly [number, number])[]) {
  const first = pick(places, 0);
  let [left, right, low, high] = [first[0], first[0], first[1], first[1]];
  for (const [x, y] of places) {
    left = Math.min(left, x);
    right = Math.max(right, x);
    low = Math.min(low, y);
    high = Math.max(high, y);
  }
  return { left, low, width: right - left, height: high - low };
}

/** The frame inside which centres may lie, so that circles and names find room. */
export function innerFrame(size: Size): Frame {
  const side = margin(size.width);
  return { left: side, right: size.width - side, top: head + side * 0.95, bottom: size.height - foot - side * 0.95 };
}

/** Pixels for the year above and the scale below. */
const head = 42;
const foot = 26;

function margin(width: number): number {
  return width * 0.125;
}
