// The model with all names resolved, as plain data and as text that can be compared line by line.
import { stringify } from 'yaml';
import { catastropheJson, uncertaintyJson, variationJson } from './variation.ts';
import type { AddPhase, BreedingPhase, Model, MovePhase, Phase, RateTable, TakePhase } from '../../model/model.ts';

export function modelText(model: Model): string {
  return stringify(modelJson(model), { lineWidth: 0, flowCollectionPadding: true });
}

export function modelJson(model: Model): Readonly<Record<string, unknown>> {
  const { phases, crowding, variation, catastrophes, uncertainty, draws, outcomes, patches, start, ...head } = model;
  const byPatch = (values: Float64Array) =>
    named(
      model.patches.map(({ name }) => name),
      values,
    );
  const mask = (values: Uint8Array) => model.classes.filter((_, c) => values[c] === 1);
  return {
    format: 'skein-model/1',
    ...head,
    patches: patches.map(({ name, at, areaKm2, capacity }) => ({ name, at, areaKm2, capacity })),
    phases: phases.map((phase) => phaseJson(model, phase)),
    crowding: crowding.map((one) => ({
      ...one,
      counted: named(model.classes, one.counted),
      changes: one.changes.map((change) => ({
        phase: phases[change.phase]?.name,
        part: change.part,
        classes: mask(change.classes),
      })),
      capacity: one.form === 'allee' ? null : byPatch(one.capacity),
      alleeHalf: byPatch(one.alleeHalf),
    })),
    ...(variation === null ? {} : { variation: variationJson(model, variation) }),
    ...(catastrophes.length === 0 ? {} : { catastrophes: catastrophes.map((one) => catastropheJson(model, one)) }),
    ...(uncertainty === null ? {} : { uncertainty: uncertaintyJson(uncertainty) }),
    ...(draws === 0 ? {} : { draws }),
    start: startJson(model, start),
    outcomes: outcomes.map(({ name, definition, event, counts, over, weights, patches: where }) => ({
      ...{ name, definition, event, counts, over },
      weights: weights.map((row) => named(model.classes, row)),
      in: patches.filter((_, p) => where[p] === 1).map(({ name }) => name),
    })),
  };
}

function phaseJson(model: Model, phase: Phase): unknown {
  const classes = (values: ArrayLike<number>) => named(model.classes, values);
  const mask = (values: Uint8Array) => model.classes.filter((_, c) => values[c] === 1);
  switch (phase.kind) {
    case 'count':
      return phase;
    case 'survival':
      return { ...phase, survival: tableJson(model, phase.survival) };
    case 'breeding':
      return {
        ...phase,
        ...(phase.waits === undefined ? {} : { waits: phase.waits.name }),
        births: tableJson(model, phase.births),
        into: classes(phase.into),
        ...(phase.offspring?.by === 'table'
          ? {
              offspring: {
                by: 'table',
                chances: Object.fromEntries(model.classes.map((name, c) => [name, chancesOf(phase, c)])),
              },
            }
          : {}),
        ...(phase.mating === undefined
          ? {}
          : { mating: { ...phase.mating, females: mask(phase.mating.females), males: mask(phase.mating.males) } }),
      };
    case 'ageing':
      return {
        ...phase,
        advance: classes(phase.advance),
        ...(phase.advanceIn === undefined
          ? {}
          : { advanceIn: tableJson(model, { epochs: [phase.advanceIn], epochOf: new Int32Array(0) }) }),
        ...(phase.stages === undefined
          ? {}
          : { stages: phase.stages.map((stage) => ({ ...stage, class: model.classes[stage.class] })) }),
        next: Object.fromEntries(model.classes.map((name, c) => [name, model.classes[phase.next[c] ?? -1] ?? null])),
      };
    case 'demography':
      return { ...phase, fates: matricesJson(model, phase.fates), births: matricesJson(model, phase.births) };
    case 'dispersal':
      return {
        ...phase,
        moves: model.classes.filter((_, c) => phase.moves[c] === 1),
        leaving: tableJson(model, phase.leaving),
        rule:
          phase.rule.by === 'shares'
            ? { by: 'shares', shares: sharesJson(model, phase.rule.shares) }
            : {
                ...phase.rule,
                attraction: named(
                  model.patches.map(({ name }) => name),
                  phase.rule.attraction,
                ),
              },
      };
    case 'take':
    case 'move':
    case 'add':
      return handlingJson(model, phase);
    case 'ceiling':
      return {
        ...phase,
        counted: model.classes.filter((_, c) => phase.counted[c] === 1),
        capacity: named(
          model.patches.map(({ name }) => name),
          phase.capacity,
        ),
      };
  }
}

function handlingJson(model: Model, phase: TakePhase | MovePhase | AddPhase): unknown {
  const patches = model.patches.map(({ name }) => name);
  return {
    ...phase,
    active:
      phase.active === null
        ? null
        : [...phase.active.keys()].filter((t) => phase.active?.[t] === 1).map((t) => model.firstYear + t),
    patches: patches.filter((_, p) => phase.patches[p] === 1),
    classes: model.classes.filter((_, c) => phase.classes[c] === 1),
    amounts: tableJson(model, phase.amounts),
    ...(phase.kind === 'add' ? {} : { levels: named(patches, phase.levels) }),
    ...(phase.kind === 'move' ? { to: patches[phase.to] } : {}),
  };
}

function chancesOf({ offspring }: BreedingPhase, c: number): readonly number[] {
  return offspring?.by === 'table' ? Array.from(offspring.chances[c] ?? []) : [];
}

function named(names: readonly string[], values: ArrayLike<number>): Readonly<Record<string, number>> {
  return Object.fromEntries(names.map((name, i) => [name, values[i] ?? 0]));
}

/** One table where it is constant, else one for each stretch of steps. */
function inEpochs(table: RateTable, one: (epoch: Float64Array) => unknown): unknown {
  const [only, ...others] = table.epochs;
  if (only !== undefined && others.length === 0) return one(only);
  return { epochs: table.epochs.map(one), epochOf: Array.from(table.epochOf) };
}

function tableJson(model: Model, table: RateTable): unknown {
  const n = model.classes.length;
  return inEpochs(table, (epoch) =>
    Object.fromEntries(
      model.patches.map(({ name }, p) => [name, named(model.classes, epoch.subarray(p * n, p * n + n))]),
    ),
  );
}

function matricesJson(model: Model, table: RateTable): unknown {
  const n = model.classes.length;
  const rows = (own: Float64Array) => model.classes.map((_, to) => Array.from(own.subarray(to * n, to * n + n)));
  return inEpochs(table, (epoch) =>
    Object.fromEntries(model.patches.map(({ name }, p) => [name, rows(epoch.subarray(p * n * n, (p + 1) * n * n))])),
  );
}

function sharesJson(model: Model, shares: Float64Array): unknown {
  const count = model.patches.length;
  return Object.fromEntries(
    model.patches.map(({ name }, from) => [
      name,
      Object.fromEntries(
        model.patches.flatMap((to, q) => {
          const share = shares[q * count + from] ?? 0;
          return share > 0 ? [[to.name, share]] : [];
        }),
      ),
    ]),
  );
}

function startJson(model: Model, start: Model['start']): unknown {
  const n = model.classes.length;
  switch (start.by) {
    case 'table':
      return {
        by: 'table',
        animals: Object.fromEntries(
          model.patches.map(({ name }, p) => [name, named(model.classes, start.animals.subarray(p * n, p * n + n))]),
        ),
      };
    case 'total':
      return start;
    case 'counted':
      return {
        ...start,
        counted: named(
          model.patches.map(({ name }) => name),
          start.counted,
        ),
        of: model.classes.filter((_, c) => start.of[c] === 1),
      };
  }
}
