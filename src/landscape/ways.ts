// The ways that lead out of each patch, put together as a movement.
import type { Movement } from './landscape.ts';

/** Of those that leave, the share that ends in `to` alive. */
export interface Way {
  readonly to: number;
  readonly chance: number;
  /** Null where no distance is used. */
  readonly km: number | null;
}

/** One list of ways a patch; ways that nobody takes are left out, the others put in the order of their ends. */
export function movementOf(waysOut: readonly (readonly Way[])[]): Movement {
  const start = new Int32Array(waysOut.length + 1);
  const used = waysOut.map((ways) => ways.filter(({ chance }) => chance > 0).sort((a, b) => a.to - b.to));
  used.forEach((ways, from) => (start[from + 1] = (start[from] ?? 0) + ways.length));
  const all = used.flat();
  return {
    start,
    destinations: Int32Array.from(all, ({ to }) => to),
    chance: Float64Array.from(all, ({ chance }) => chance),
    lengthKm: all.some(({ km }) => km === null) ? null : Float64Array.from(all, ({ km }) => km ?? 0),
  };
}
