// Growth at very many points of one model: the whole command with its folder, its kernel alone, and a loop over numpy.linalg.
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { buildBlock } from '../../src/compile/block.ts';
import { openManySolver } from '../../src/kernel/many-growths.ts';
import { toDense } from '../../src/numeric/sparse.ts';
import { compileSpec } from '../../src/pipeline.ts';
import { openChange } from '../../src/sweep/point/change.ts';
import { compareGrowths, mostForNumpy } from './many.ts';
import { settledSeconds } from './measure.ts';
import type { Comparison, Options } from './options.ts';
import { openSweep, overRates, sweepCommand, tenPatches } from './sweeps.ts';
import { compileText } from './workload.ts';

const order = 50;

/** Ten patches of five classes; every matrix is held against what the compiler makes of its point. */
export function compareSweep({ quick, rounds }: Options): Comparison {
  const count = quick ? 20_000 : 100_000;
  const matrices = matricesOf(count);
  const solver = openManySolver();
  const base = solver.solve({ matrices: matrices.subarray(0, order * order), order, vectors: true });
  const start = { right: base.right ?? new Float64Array(0), left: base.left ?? new Float64Array(0) };
  const rest = Math.ceil(count / mostForNumpy);
  const kernel = (): void => {
    for (let k = 0; k < rest; k++) solver.solve({ matrices, order, start });
  };
  const { folder } = sweepCommand(count);
  const lines = readFileSync(join(folder, 'points.csv'), 'utf8').split('\n');
  const column = lines[0]?.split(',').indexOf('growth') ?? -1;
  return compareGrowths(
    `${count} growth rates of 10 patches × 5 classes, start, design, files, table and summary included`,
    {
      count,
      matrices,
      growth: lines.slice(1).map((line) => Number(line.split(',')[column])),
      order,
      words: ['growth'],
      contenders: [
        { name: 'skein', run: () => sweepCommand(count).seconds },
        { name: 'kernel alone', run: () => (settledSeconds(kernel) * count) / (rest * mostForNumpy) },
      ],
      rounds,
      floor: 15,
    },
  );
}

/** Of the first points, row by row. */
function matricesOf(points: number): Float64Array {
  const model = compileText(readFileSync(tenPatches, 'utf8'));
  const { design } = openSweep(model, { over: overRates, design: 'sobol', points, measures: ['growth'] });
  const change = openChange(model.spec, design.plan.factors);
  const all = new Float64Array(mostForNumpy * order * order);
  for (let point = 0; point < mostForNumpy; point++) {
    const { compiled } = compileSpec(change(design.at(point)));
    if (compiled === null) throw new Error('A point of the bench is no model.');
    const { values, rows } = toDense(buildBlock(compiled, 'zero').matrix);
    if (rows !== order) throw new Error(`The matrix has ${rows} states.`);
    all.set(values, point * order * order);
  }
  return all;
}
