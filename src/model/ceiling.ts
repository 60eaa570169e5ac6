// Ceilings: how many of whom may stay, and what becomes of the surplus.
import type { CeilingSpec } from '../spec/schema/spec.ts';
import { classMask, fail, type Context } from './context.ts';
import { resolveCapacities } from './capacities.ts';
import type { CeilingPhase, Phase } from './model.ts';

export function resolveCeiling(context: Context, name: string, spec: CeilingSpec): CeilingPhase {
  const counted = classMask(context, spec.counted, [name, 'counted']);
  const capacities = resolveCapacities(context, spec.capacity, [name, 'capacity']);
  return {
    kind: 'ceiling',
    name,
    counted,
    ...capacities,
    ...(spec.takes === 'at random' ? {} : { takes: spec.takes }),
  };
}

/** Gives each breeding the ceiling under which the surplus waits: the last such one before it, round the year. */
export function withWaiting(context: Context, phases: readonly Phase[]): readonly Phase[] {
  const ceilings = phases.flatMap((phase, i) =>
    phase.kind === 'ceiling' && phase.takes === 'nobody' ? [{ phase, i }] : [],
  );
  if (ceilings.length === 0) return phases;
  if (phases.every((phase) => phase.kind !== 'breeding')) tellNoBreeding(context, ceilings[0]?.phase.name ?? '');
  return phases.map((phase, i) => {
    if (phase.kind !== 'breeding') return phase;
    const before = ceilings.filter((ceiling) => ceiling.i < i).at(-1) ?? ceilings.at(-1);
    return before === undefined ? phase : { ...phase, waits: before.phase };
  });
}

function tellNoBreeding(context: Context, name: string): void {
  fail(context, 'ceiling-without-breeding', [name, 'takes'], {
    message: `Under \`${name}\` the surplus waits to breed, but no phase of the year is a breeding`,
    details: { expected: '`breeding` in the year, or a ceiling that takes the surplus `at random`' },
  });
}
