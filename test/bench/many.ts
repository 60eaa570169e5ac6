// Very many small life cycles: the batch kernel against NumPy's eigenvalue routines in a loop.
import { writeFileSync, mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { openManySolver } from '../../src/kernel/many-growths.ts';
import { inTurns, settledSeconds, stream, type Contender } from './measure.ts';
import type { Comparison, Options } from './options.ts';
import { runBaseline, script, work } from './tools.ts';

/** Random life cycles of 50 classes: growth, both vectors and all elasticities of each. */
export function compareLifeCycles({ quick, rounds }: Options): Comparison {
  const count = quick ? 3000 : 10_000;
  const matrices = lifeCycles(count, 50, 7);
  const solver = openManySolver();
  const wishes = { matrices, order: 50, vectors: true, elasticities: true };
  const reuse = solver.solve(wishes);
  const solve = () => solver.solve({ ...wishes, reuse });
  return compare(`${count} life cycles of 50 classes: growth, both vectors, all elasticities`, {
    matrices,
    order: 50,
    words: ['vectors'],
    contender: { name: 'skein', run: () => settledSeconds(() => void solve()) },
    growth: solve().growthRate,
    rounds,
    floor: 10,
  });
}

/** A model of ten patches and five classes over a sweep of its rates: growth alone, each from the vectors of the base. */
export function compareSweep({ quick, rounds }: Options): Comparison {
  const count = quick ? 2000 : 100_000;
  const order = 50;
  const matrices = sweep(count, 11);
  const solver = openManySolver();
  const base = solver.solve({ matrices: matrices.subarray(0, order * order), order, vectors: true });
  const start = { right: base.right ?? new Float64Array(0), left: base.left ?? new Float64Array(0) };
  const solve = () => solver.solve({ matrices, order, start });
  return compare(`${count} growth rates of 10 patches × 5 classes`, {
    matrices,
    order,
    words: ['growth'],
    contender: { name: 'skein', run: () => settledSeconds(() => void solve()) },
    growth: solve().growthRate,
    rounds,
    floor: 15,
  });
}

interface Case {
  readonly matrices: Float64Array;
  readonly order: number;
  readonly words: readonly string[];
  readonly contender: Contender;
  readonly growth: Float64Array;
  readonly rounds: number;
  readonly floor: number;
}

/** NumPy solves so many of them at most, and its time is that of all in proportion. */
const mostForNumpy = 1000;

function compare(name: string, { matrices, order, words, contender, growth, rounds, floor }: Case): Comparison {
  const count = growth.length;
  const start = script('many.py');
  const contenders = [contender];
  const agreement: string[] = [];
  if (start !== null) {
    mkdirSync(work, { recursive: true });
    const file = join(work, 'matrices.bin');
    const part = Math.min(count, mostForNumpy);
    writeFileSync(file, new Uint8Array(matrices.buffer, matrices.byteOffset, part * order * order * 8));
    const run = [...start, file, String(order), ...words];
    const { numbers } = runBaseline(run);
    const worst = numbers.reduce((most, value, k) => Math.max(most, Math.abs(value / (growth[k] ?? NaN) - 1)), 0);
    if (numbers.length !== part || !(worst < 1e-9)) throw new Error(`NumPy differs by ${worst} in growth.`);
    agreement.push(`NumPy: the growth of ${part} differs by ${worst.toExponential(1)} at most`);
    contenders.push({ name: 'NumPy', rounds: 3, run: () => (runBaseline(run).seconds * count) / part });
  }
  return {
    name,
    cells: count,
    seconds: Object.fromEntries(inTurns(contenders, rounds)),
    agreement,
    floors: { NumPy: floor },
  };
}

/** Each class stays, goes on, or falls back a little; all but the youngest fifth breed. */
function lifeCycles(count: number, order: number, seed: number): Float64Array {
  const next = stream(seed);
  const all = new Float64Array(count * order * order);
  for (let k = 0; k < count; k++) {
    const put = (row: number, column: number, value: number): void => {
      const at = (k * order + row) * order + column;
      all[at] = (all[at] ?? 0) + value;
    };
    for (let j = 0; j < order; j++) {
      if (j >= order / 5) put(0, j, 2 * next());
      put(Math.min(j + 1, order - 1), j, 0.3 + 0.4 * next());
      put(j, j, 0.3 * next());
      if (j > 0 && next() < 0.3) put(j - 1, j, 0.1 * next());
    }
  }
  return all;
}

/** The first is the base; in the others adult survival, births and the share that leaves differ by up to a sixth. */
function sweep(count: number, seed: number): Float64Array {
  const [patches, classes, order] = [10, 5, 50];
  const next = stream(seed);
  const births = Array.from({ length: patches }, () => 0.4 + 0.8 * next());
  const survival = Array.from({ length: order }, () => 0.5 + 0.35 * next());
  const near = Array.from({ length: patches * patches }, (_, k) =>
    Math.exp(-Math.abs((k % patches) - Math.floor(k / patches)) / 2),
  );
  const all = new Float64Array(count * order * order);
  for (let k = 0; k < count; k++) {
    const [lives, breeds, leaves] =
      k === 0 ? [1, 1, 0.2] : [0.92 + 0.16 * next(), 0.84 + 0.32 * next(), 0.1 + 0.2 * next()];
    for (let from = 0; from < order; from++) {
      const [patch, c] = [Math.floor(from / classes), from % classes];
      const put = (row: number, value: number): void => {
        const at = (k * order + row) * order + from;
        all[at] = (all[at] ?? 0) + value;
      };
      put(patch * classes + Math.min(c + 1, classes - 1), (survival[from] ?? 0) * lives);
      if (c < 2) continue;
      const young = (births[patch] ?? 0) * breeds;
      const around = near.slice(patch * patches, (patch + 1) * patches).reduce((a, b) => a + b, 0) - 1;
      for (let to = 0; to < patches; to++) {
        put(
          to * classes,
          to === patch ? young * (1 - leaves) : (young * leaves * (near[patch * patches + to] ?? 0)) / around,
        );
      }
    }
  }
  return all;
}
