// Growth at very many points of one model: the whole command with its folder, its kernel alone, and a loop over numpy.linalg.
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { buildBlock } from '../../src/compile/block.ts';
import { toDense } from '../../src/numeric/sparse.ts';
import { compileSpec } from '../../src/pipeline.ts';
import type { Columns } from '../../src/sweep/design/factor.ts';
import { openChange } from '../../src/sweep/point/change.ts';
import { compareGrowths, mostForNumpy } from './many.ts';
import { elapsedSeconds, settledSeconds } from './measure.ts';
import type { Comparison, Options } from './options.ts';
import { openSweep, overRates, sweepCommand, tenPatches, type OpenedSweep } from './sweeps.ts';
import { compileText } from './workload.ts';

const order = 50;

/** Ten patches of five classes; every matrix is held against what the compiler makes of its point. */
export function compareSweep({ quick, rounds }: Options): Comparison {
  const count = pointsOf(quick);
  const { matrices, evaluator, columns } = opened(count);
  const kernel = (): void => void evaluator.all(columns, count);
  return compareGrowths(
    `${count} growth rates of 10 patches × 5 classes, start, design, files, table and summary included`,
    {
      count,
      matrices,
      growth: growthOf(sweepCommand(count).folder),
      order,
      words: ['growth'],
      contenders: [
        { name: 'skein', run: () => sweepCommand(count).seconds },
        { name: 'kernel alone', run: () => settledSeconds(kernel) },
      ],
      rounds,
      floor: 15,
    },
  );
}

/** The same in two threads, against NumPy in two processes whose start is not on the clock. */
export function compareSweepInTwo({ quick, rounds }: Options): Comparison {
  const count = pointsOf(quick);
  return compareGrowths(`${count} of them in two threads, by the clock on the wall`, {
    count,
    matrices: opened(count).matrices,
    growth: growthOf(sweepCommand(count, 2).folder),
    order,
    words: ['growth', '2'],
    contenders: [{ name: 'skein', run: () => elapsedSeconds(() => void sweepCommand(count, 2)) }],
    rounds,
    floor: 15,
  });
}

function pointsOf(quick: boolean): number {
  return quick ? 20_000 : 100_000;
}

function growthOf(folder: string): readonly number[] {
  const lines = readFileSync(join(folder, 'points.csv'), 'utf8').split('\n');
  const column = lines[0]?.split(',').indexOf('growth') ?? -1;
  return lines.slice(1).map((line) => Number(line.split(',')[column]));
}

interface Opened extends Pick<OpenedSweep, 'evaluator'> {
  readonly columns: Columns;
  /** Of the first points, row by row, as the compiler makes them. */
  readonly matrices: Float64Array;
}

function opened(points: number): Opened {
  const model = compileText(readFileSync(tenPatches, 'utf8'));
  const { design, evaluator } = openSweep(model, { over: overRates, design: 'sobol', points, measures: ['growth'] });
  const change = openChange(model.spec, design.plan.factors);
  const matrices = new Float64Array(mostForNumpy * order * order);
  for (let point = 0; point < mostForNumpy; point++) {
    const { compiled } = compileSpec(change(design.at(point)));
    if (compiled === null) throw new Error('A point of the bench is no model.');
    const { values, rows } = toDense(buildBlock(compiled, 'zero').matrix);
    if (rows !== order) throw new Error(`The matrix has ${rows} states.`);
    matrices.set(values, point * order * order);
  }
  return { evaluator, columns: design.columns(0, points), matrices };
}
