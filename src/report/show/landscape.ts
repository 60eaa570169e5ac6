// The landscape: where those that leave a patch end.
import type { Compiled } from '../../compile/year-map.ts';
import { significant } from '../rounded.ts';
import { columnsOf } from '../terminal.ts';

interface Way {
  readonly from: string;
  readonly to: string;
  /** Null where no distance is used. */
  readonly km: number | null;
  /** Chance of arriving there alive, given that the animal left. */
  readonly chance: number;
}

export function landscapeJson(compiled: Compiled): unknown {
  return {
    format: 'skein-landscape/1',
    patches: compiled.model.patches.map(({ name, at, areaKm2 }) => ({ patch: name, at, areaKm2 })),
    dispersals: compiled.model.phases.flatMap((phase, i) =>
      phase.kind === 'dispersal' ? [{ phase: phase.name, ways: waysOf(compiled, i) }] : [],
    ),
  };
}

export function landscapeText(compiled: Compiled): string {
  const { phases } = compiled.model;
  const parts = phases.flatMap((phase, i) => {
    if (phase.kind !== 'dispersal') return [];
    const rows = waysOf(compiled, i).map(({ from, to, km, chance }) => [
      from,
      to,
      km === null ? '-' : significant(km, 7),
      significant(chance, 8),
    ]);
    const title = `${phase.name}: chance of arriving there alive, for an animal that left`;
    return [`${title}\n${columnsOf(['from', 'to', 'km', 'chance'], rows, { colour: false, width: 100 })}`];
  });
  return parts.length === 0 ? 'Nobody leaves any patch.' : parts.join('\n\n');
}

function waysOf({ model, landscape }: Compiled, phase: number): readonly Way[] {
  const movement = landscape.movements[phase];
  if (movement === null || movement === undefined) return [];
  return model.patches.flatMap((patch, p) => {
    const [first = 0, end = 0] = movement.start.subarray(p, p + 2);
    return Array.from(movement.destinations.subarray(first, end), (to, k) => ({
      from: patch.name,
      to: model.patches[to]?.name ?? '',
      km: movement.lengthKm?.[first + k] ?? null,
      chance: movement.chance[first + k] ?? 0,
    }));
  });
}
