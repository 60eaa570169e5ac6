// The ways that lead out of each patch, put together as a movement.
import type { Movement } from './landscape.ts';

/** Of those that leave, the share that ends in `to` alive. */
export interface Way {
  readonly to: number;
  readonly chance: number;
  /** Null where no distance is used. */
  readonly km: number | null;
}

/** The movements of several stretches of years as one, over all ways that are taken in any of them. */
export function movementByYear(movements: readonly Movement[], epochOf: Int32Array): Movement | undefined {
  const [first] = movements;
  if (first === undefined || movements.length === 1) return first;
  const patches = first.start.length - 1;
  const merged = Array.from({ length: patches }, (_, from) => {
    const ways = new Map<number, Way>();
    for (const movement of movements)
      for (const way of waysFrom(movement, from)) if (!ways.has(way.to)) ways.set(way.to, way);
    return [...ways.values()];
  });
  // Every way is kept by a chance above zero, then given its own of each stretch.
  const all = movementOf(merged);
  const chances = movements.map((movement) =>
    Float64Array.from(
      Array.from({ length: patches }, (_, from) => {
        const own = new Map(waysFrom(movement, from).map(({ to, chance }) => [to, chance]));
        return Array.from(all.destinations.subarray(all.start[from], all.start[from + 1]), (to) => own.get(to) ?? 0);
      }).flat(),
    ),
  );
  return { ...all, chance: chances[0] ?? all.chance, byYear: { chances, epochOf } };
}

function waysFrom({ start, destinations, chance, lengthKm }: Movement, from: number): readonly Way[] {
  const first = start[from] ?? 0;
  return Array.from({ length: (start[from + 1] ?? first) - first }, (_, i) => ({
    to: destinations[first + i] ?? 0,
    chance: chance[first + i] ?? 0,
    km: lengthKm?.[first + i] ?? null,
  }));
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
