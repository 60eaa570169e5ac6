// Where there is no patch any more, or not yet, nobody lives: at the start of the year all who are there die.
import type { Context } from './context.ts';
import { byYears } from './epochs.ts';
import type { Model, SurvivalPhase } from './model.ts';

/** A phase of this name stands first in the year of a model whose patches come or go. */
export const patchesLost = 'patches lost';

export function resolvePatchesLost(context: Context): readonly SurvivalPhase[] {
  const { patches, classes } = context;
  if (patches.every(({ exists }) => exists === undefined)) return [];
  const survival = byYears(context, true, (year) =>
    Float64Array.from({ length: patches.length * classes.length }, (_, i) => {
      const { from = -Infinity, until = Infinity } = patches[Math.floor(i / classes.length)]?.exists ?? {};
      return from <= year && year <= until ? 1 : 0;
    }),
  );
  return [{ kind: 'survival', name: patchesLost, survival }];
}

/** The model as if all its patches were always there: how strong crowding is in one does not rest on when it comes. */
export function asIfAlwaysThere(model: Model): Model {
  const always = new Float64Array(model.patches.length * model.classes.length).fill(1);
  const survival = { epochs: [always], epochOf: new Int32Array(0) };
  return {
    ...model,
    phases: model.phases.map((phase) =>
      phase.kind === 'survival' && phase.name === patchesLost ? { ...phase, survival } : phase,
    ),
  };
}
