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
  return compareGrowths(`${count} life cycles of 50 classes: growth, both vectors, all elasticities`, {
    count,
    matrices,
    order: 50,
    words: ['vectors'],
    contenders: [{ name: 'skein', run: () => settledSeconds(() => void solve()) }],
    growth: solve().growthRate,
    rounds,
    floor: 10,
  });
}

export interface Case {
  readonly count: number;
  /** Of all of them, or of the first `mostForNumpy`. */
  readonly matrices: Float64Array;
  readonly growth: ArrayLike<number>;
  readonly order: number;
  readonly words: readonly string[];
  /** Ours, to which NumPy is added. */
  readonly contenders: readonly Contender[];
  readonly rounds: number;
  readonly floor: number;
}

/** NumPy solves so many of them at most, and its time is that of all in proportion. */
export const mostForNumpy = 1000;

export function compareGrowths(name: string, asked: Case): Comparison {
  const { count, matrices, order, words, growth, rounds, floor } = asked;
  const start = script('many.py');
  const contenders = [...asked.contenders];
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
