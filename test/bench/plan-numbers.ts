// The numbers of a compiled plan of the flagship as JSON for a baseline. Errors: throws where the plan has something that the baseline
// does not know.
import type { CompiledModel } from '../../src/pipeline.ts';
import { chancesIn } from '../../src/landscape/landscape.ts';
import { distributionOf, numberAt } from '../../src/model/variation/distribution.ts';
import type { PatchNumbers, Varied } from '../../src/model/chance.ts';
import type { DenseMatrix } from '../../src/numeric/sparse.ts';
import type { Phase, RateTable } from '../../src/model/model.ts';

const [from, step] = [-6, 0.02];

export function planNumbers({ model, landscape, coefficients, startAnimals }: CompiledModel): string {
  const { patches, classes, steps, variation } = model;
  const [P, C] = [patches.length, classes.length];
  const phase = <Kind extends Phase['kind']>(kind: Kind): Extract<Phase, { kind: Kind }> & { readonly at: number } => {
    const at = model.phases.findIndex((one) => one.kind === kind);
    const found = model.phases[at];
    if (found === undefined || !isOf(found, kind)) throw new Error(`The plan has no ${kind}.`);
    return { ...found, at };
  };
  const [survival, natal, moved] = [phase('survival'), phase('dispersal'), model.phases.find(isMove)];
  const [crowding, crowd, outcome, flood] = [
    need(coefficients[0]),
    need(model.crowding[0]),
    need(model.outcomes[0]),
    need(model.catastrophes[0]),
  ];
  const reach = need(landscape.strikes?.[0]?.reach);
  const movement = need(landscape.movements[natal.at]);
  const varied = need(variation).varied.map((one) => ({ one, class: one.of.kind === 'rate' ? one.of.class : -1 }));
  const rows = (numbers: ArrayLike<number>): number[][] =>
    Array.from({ length: P }, (_, p) => Array.from(numbers).slice(p * C, (p + 1) * C));
  const steps_ = Array.from({ length: steps }, (_, t) => t + 1);
  const kinds = new Distinct<number[][]>();
  const numbers = new Distinct<number[]>();
  const ways = new Distinct<number[][]>();
  const quantiles = new Distinct<number[][][]>();
  const epoch = steps_.map((t) => ({
    survival: kinds.place(rows(at(survival.survival, t))),
    crowding: numbers.place(
      Array.from(crowding.coefficientByYear === undefined ? crowding.coefficient : at(crowding.coefficientByYear, t)),
    ),
    ways: ways.place(
      patches.map((_, p) => {
        const row = Array<number>(P + 1).fill(0);
        const chances = chancesIn(movement, t);
        for (let k = movement.start[p] ?? 0; k < (movement.start[p + 1] ?? 0); k++)
          row[movement.destinations[k] ?? 0] = chances[k] ?? 0;
        row[P] = 1 - row.reduce((sum, chance) => sum + chance, 0);
        return row;
      }),
    ),
    varied: quantiles.place(varied.map(({ one }) => quantilesIn(one, t, P))),
  }));
  return JSON.stringify({
    years: steps,
    start: rows(startAnimals),
    births: rows(at(phase('breeding').births, 1)),
    survival: kinds.all,
    crowding: numbers.all,
    ceiling: crowding.form.map((form) => form === 'ceiling'),
    counted: Array.from(crowd.counted),
    leaving: rows(at(natal.leaving, 1)).map(([newborn]) => newborn),
    ways: ways.all,
    from,
    varied: varied.map((one, k) => ({ class: one.class, quantiles: quantiles.all.map((tables) => tables[k]) })),
    betweenRates: square(need(variation).betweenRates.of, varied.length),
    betweenPatches: square(need(landscape.weather).of, P),
    flood: {
      chance: flood.chance,
      reach: flood.origins.map((_, i) => {
        const hit = new Set(reach.patches.subarray(reach.start[i], reach.start[i + 1]));
        return patches.map((__, p) => hit.has(p));
      }),
      multiplies: classes.map((_, c) => flood.multiplies.find((one) => one.class === c)?.times ?? 1),
    },
    move:
      moved === undefined
        ? null
        : {
            years: steps_.flatMap((t) => (moved.active === null || moved.active[t - 1] === 1 ? [t - 1] : [])),
            from: moved.patches.indexOf(1),
            to: moved.to,
            class: moved.classes.indexOf(1),
            number: Math.max(...at(moved.amounts, 1)),
            survival: moved.survival[moved.classes.indexOf(1)],
          },
    weights: Array.from(need(outcome.weights[0])),
    threshold: outcome.event.is === 'below' ? outcome.event.than : NaN,
    epoch,
  });
}

/** Each value once, by what it holds. */
class Distinct<Value> {
  readonly all: Value[] = [];
  readonly #known = new Map<string, number>();

  place(value: Value): number {
    const key = JSON.stringify(value);
    const known = this.#known.get(key) ?? this.all.push(value) - 1;
    this.#known.set(key, known);
    return known;
  }
}

/** By patch, over the grid of normal numbers. */
function quantilesIn({ shape, mean, sd }: Varied, t: number, P: number): number[][] {
  return Array.from({ length: P }, (_, p) => {
    const found = distributionOf(shape, { mean: numberIn(mean, t, p), sd: numberIn(sd, t, p) });
    return Array.from({ length: Math.round((-2 * from) / step) + 1 }, (__, k) =>
      numberAt(need(found), from + k * step),
    );
  });
}

function numberIn({ epochs, epochOf }: PatchNumbers, t: number, p: number): number {
  return need(need(epochs[epochOf[t - 1] ?? 0])[p]);
}

function at({ epochs, epochOf }: RateTable, t: number): Float64Array {
  return need(epochs[epochOf[t - 1] ?? 0]);
}

function square(of: number | DenseMatrix, size: number): number[][] {
  return Array.from({ length: size }, (_, i) =>
    Array.from({ length: size }, (__, j) =>
      i === j ? 1 : typeof of === 'number' ? of : need(of.values[i * of.columns + j]),
    ),
  );
}

function isOf<Kind extends Phase['kind']>(phase: Phase, kind: Kind): phase is Extract<Phase, { kind: Kind }> {
  return phase.kind === kind;
}

function isMove(phase: Phase): phase is Extract<Phase, { kind: 'move' }> {
  return phase.kind === 'move';
}

function need<Value>(value: Value | null | undefined): Value {
  if (value === null || value === undefined) throw new Error('The plan is not one that the baseline knows.');
  return value;
}
