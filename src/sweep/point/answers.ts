// What the measures say of one compiled point, and of the plans that are set beside each other at it.
import { equilibriumFrom } from '../../analysis/equilibrium.ts';
import { spectrum } from '../../analysis/spectrum.ts';
import { moneyIn } from '../../compare/plans-of.ts';
import { buildBlock } from '../../compile/block.ts';
import { linearisedBlock } from '../../compile/slopes/linearised.ts';
import { wholeYear, type Compiled } from '../../compile/year-map.ts';
import { batchesOf, tapedRunnerOn } from '../../kernel/batch.ts';
import { runPath } from '../../kernel/path.ts';
import { openNext } from '../../kernel/reuse.ts';
import type { Machine } from '../../machine/instance.ts';
import type { PlanCost } from '../../model/costs.ts';
import { leading } from '../../numeric/leading.ts';
import { isPaired, type Quantity } from '../measures.ts';
import { pairedNumbers, perhapsBest, type Futures } from './paired.ts';
import { Tally } from './tally.ts';
import type { Tapes } from './tapes.ts';

export interface CompiledPoint extends Compiled {
  /** Absent where no measure needs them. */
  readonly startAnimals?: Float64Array;
  readonly image?: ArrayBuffer;
  /** Of the plan; absent where there is none. */
  readonly cost?: PlanCost;
}

export interface Asking {
  readonly quantities: readonly Quantity[];
  /** Null where no measure is from runs. */
  readonly runs: { readonly machine: Machine; readonly tapes: Tapes } | null;
  /** Whether the runs of each plan are set beside those of the others. */
  readonly paired: boolean;
}

export interface Answered {
  /** In the order of the columns of the quantities. */
  readonly numbers: readonly number[];
  /** Null without runs. */
  readonly runs: Tally | null;
}

export function answerPoint(point: CompiledPoint, asking: Asking): Answered {
  const runs = tallied(point, asking);
  const plain = new PlainAnswers(point);
  const numbers = asking.quantities.flatMap((quantity) =>
    quantity.chance ? [...(runs?.numbersOf(quantity) ?? [])] : [plain.of(quantity)],
  );
  return { numbers, runs };
}

/** In the order of `pairColumnsOf`; of the plans in the order of the scenarios. */
export function pairedAnswers(quantities: readonly Quantity[], plans: readonly Answered[]): readonly number[] {
  return quantities.filter(isPaired).flatMap((quantity) => {
    const [base, ...others] = plans.flatMap(({ runs }): Futures[] =>
      runs === null ? [] : [{ values: runs.futuresOf(quantity), mean: runs.numbersOf(quantity)[0] }],
    );
    if (base === undefined) return [];
    return [
      ...others.flatMap((own) => pairedNumbers(quantity, base, own)),
      ...(quantity.better === null ? [] : perhapsBest(quantity, [base, ...others])),
    ];
  });
}

function tallied({ model, image, cost }: CompiledPoint, { quantities, runs, paired }: Asking): Tally | null {
  if (runs === null || image === undefined) return null;
  const { steps, seed } = model;
  openNext(runs.machine, image);
  const run = tapedRunnerOn(runs.machine, image, { steps, seed, reuse: true });
  const moneyOf = cost === undefined ? null : moneyIn({ model, cost });
  const tally = new Tally(model, quantities, { moneyOf, keepsFutures: paired });
  const batches = batchesOf(model.replicates);
  const tapes = runs.tapes.of({ image, steps, seed, batches: batches.length });
  batches.forEach((batch, i) => {
    tally.take(run(batch, tapes[i] ?? null));
  });
  return tally;
}

/** Answers without chance; the matrix near zero is built once for all that need it. */
class PlainAnswers {
  readonly #point: CompiledPoint;
  #found: { readonly growth: number; readonly damping: () => number } | null = null;

  constructor(point: CompiledPoint) {
    this.#point = point;
  }

  of({ measure }: Quantity): number {
    switch (measure) {
      case 'growth':
        return this.#nearZero().growth;
      case 'damping':
        return this.#nearZero().damping();
      case 'standing':
        return this.#standing();
      case 'path-end':
        return this.#pathEnd();
      default:
        return NaN;
    }
  }

  #nearZero() {
    if (this.#found !== null) return this.#found;
    const { matrix } = linearisedBlock(this.#point) ?? buildBlock(this.#point, 'zero');
    const found = leading(matrix);
    this.#found = {
      growth: found.growthRate,
      damping: () => spectrum(matrix, found)?.dampingRatio ?? NaN,
    };
    return this.#found;
  }

  #standing(): number {
    const { startAnimals: start } = this.#point;
    const found = start === undefined ? null : equilibriumFrom(wholeYear(this.#point), start);
    return found === null ? NaN : found.animals.reduce((sum, animals) => sum + animals, 0);
  }

  #pathEnd(): number {
    const { model, image } = this.#point;
    if (image === undefined) return NaN;
    const { animals } = runPath(image, { steps: model.steps });
    const cells = model.patches.length * model.classes.length;
    return animals.subarray(model.steps * cells).reduce((sum, value) => sum + value, 0);
  }
}
