// Whole sweeps against what their kernel takes alone: how much stands between it and a folder of results.
import { closeSync, fsyncSync, mkdirSync, openSync, readFileSync, rmSync, writeSync } from 'node:fs';
import { join } from 'node:path';
import { partPieces } from '../../src/cli/sweep/part-file.ts';
import { batchesOf } from '../../src/kernel/batch.ts';
import { openNext } from '../../src/kernel/reuse.ts';
import { loadMachine } from '../../src/machine/machine.ts';
import { compileSpec, type CompiledModel } from '../../src/pipeline.ts';
import type { SweepSpec } from '../../src/spec/schema/spec.ts';
import { openDesign, type Design } from '../../src/sweep/design/design.ts';
import { manifestOf, placeOfPart, type Manifest } from '../../src/sweep/manifest.ts';
import { openChange } from '../../src/sweep/point/change.ts';
import { openEvaluator, type Evaluator } from '../../src/sweep/point/evaluate.ts';
import { workPart } from '../../src/sweep/point/part.ts';
import { planSweep } from '../../src/sweep/request.ts';
import { command } from './command.ts';
import { inTurns, median, processorSeconds } from './measure.ts';
import type { Options } from './options.ts';
import { work } from './tools.ts';
import { compileText } from './workload.ts';

export const tenPatches = 'test/bench/workloads/ten-patches.yaml';

/** Of the ten patches, over all that is named in them: survival and births up to a sixth more or less, and half as many leavers or more. */
export const overRates = {
  young_survival: { from: 0.38, to: 0.52 },
  adult_survival: { from: 0.66, to: 0.78 },
  litter: { from: 1.35, to: 1.85 },
  leaving_share: { from: 0.1, to: 0.3 },
} as const;

export interface OpenedSweep {
  readonly compiled: CompiledModel;
  readonly design: Design;
  readonly evaluator: Evaluator;
  readonly manifest: Manifest;
}

/** Errors: throws where there is no such sweep. */
export function openSweep(compiled: CompiledModel, asked: SweepSpec): OpenedSweep {
  const { plan, findings } = planSweep(asked, compiled);
  if (plan === null) throw new Error(findings.map(({ message }) => message).join('\n'));
  const evaluator = openEvaluator(compiled.spec, plan);
  return { compiled, design: openDesign(plan.design), evaluator, manifest: manifestOf(compiled, plan, {}) };
}

export interface SweepFigures {
  /** Stochastic points of the flagship, its runs and all around them, over the kernel's own time for the same replicates. */
  readonly runs: { readonly points: number; readonly overKernel: number };
  /** Growth rates with their rows written, over the same without; then with the table of all points and the summary, too. */
  readonly writing: { readonly rows: number; readonly parts: number; readonly all: number };
  /** The most memory of a sweep of so many points, in MB. */
  readonly memory: { readonly points: number; readonly megabytes: number };
}

export function measureSweeps(options: Options): SweepFigures {
  return { runs: measureRuns(options), writing: measureWriting(options), memory: measureMemory(options) };
}

const replicates = 200;
const years = 50;

function measureRuns({ quick, rounds }: Options): SweepFigures['runs'] {
  const points = quick ? 40 : 1000;
  const hare = compileText(readFileSync('models/reed-hare.yaml', 'utf8'), { settings: { replicates, years } });
  const over = {
    adult_survival: { from: 0.5, to: 0.64 },
    newborn_survival: { from: 0.42, to: 0.58 },
    litter: { from: 2, to: 3 },
    natal_leaving: { from: 0.05, to: 0.3 },
  };
  const sweep = openSweep(hare, { over, design: 'sobol', points, measures: ['chance', 'animals'] });
  const change = openChange(hare.spec, sweep.design.plan.factors);
  const images = Array.from({ length: points }, (_, i) => {
    const { compiled } = compileSpec(change(sweep.design.at(i)));
    if (compiled === null) throw new Error('A point of the bench is no model.');
    return compiled.image;
  });
  const machine = loadMachine();
  const kernel = (): number => {
    let seconds = 0;
    for (const image of images) {
      openNext(machine, image);
      seconds += processorSeconds(() => {
        for (const { first, lanes } of batchesOf(replicates)) {
          const numbers = new Uint32Array(machine.memory.buffer, machine.replicates(), lanes);
          for (let lane = 0; lane < lanes; lane++) numbers[lane] = first + lane;
          machine.start(lanes, hare.model.seed, 0);
          machine.run(years);
        }
      });
    }
    return seconds;
  };
  const whole = (): number => processorSeconds(() => void bytesOfAll(sweep));
  whole();
  const ratios = Array.from({ length: quick ? rounds : 1 }, () => {
    const times = inTurns(
      [
        { name: 'kernel', run: kernel },
        { name: 'whole', run: whole },
      ],
      2,
    );
    return (times.get('whole') ?? NaN) / (times.get('kernel') ?? NaN);
  });
  return { points, overKernel: median(ratios) };
}

function piecesOfPart(sweep: OpenedSweep, part: number): readonly Uint8Array[] {
  return partPieces(sweep.manifest, workPart(sweep, placeOfPart(sweep.manifest, part)));
}

/** Every part as the bytes of its file. */
function bytesOfAll(sweep: OpenedSweep): readonly (readonly Uint8Array[])[] {
  return Array.from({ length: sweep.manifest.parts }, (_, part) => piecesOfPart(sweep, part));
}

/** Of the same points: worked out alone; with their parts on the disk; and the command that leaves all of it. */
function measureWriting({ quick, rounds }: Options): SweepFigures['writing'] {
  const rows = quick ? 200_000 : 5_000_000;
  const model = compileText(readFileSync(tenPatches, 'utf8'));
  const sweep = openSweep(model, { over: overRates, design: 'sobol', points: rows, measures: ['growth'] });
  const folder = join(work, 'sweep-parts');
  const eachPart = (action: (part: number) => void): number =>
    processorSeconds(() => {
      for (let part = 0; part < sweep.manifest.parts; part++) action(part);
    });
  const alone = (): number =>
    eachPart((part) => {
      const { first, count } = placeOfPart(sweep.manifest, part);
      sweep.evaluator.all(sweep.design.columns(first, count), count);
    });
  const written = (): number => {
    rmSync(folder, { recursive: true, force: true });
    mkdirSync(folder, { recursive: true });
    return eachPart((part) => {
      const descriptor = openSync(join(folder, `${part}.parquet`), 'w');
      for (const piece of piecesOfPart(sweep, part)) writeSync(descriptor, piece);
      fsyncSync(descriptor);
      closeSync(descriptor);
    });
  };
  const times = inTurns(
    [
      { name: 'alone', run: alone },
      { name: 'written', run: written },
      { name: 'command', run: () => sweepCommand(rows).seconds - sweepCommand(64).seconds },
    ],
    quick ? rounds : 1,
  );
  rmSync(folder, { recursive: true, force: true });
  const of = (name: string): number => (times.get(name) ?? NaN) / (times.get('alone') ?? NaN);
  return { rows, parts: of('written'), all: of('command') };
}

function measureMemory({ quick }: Options): SweepFigures['memory'] {
  const points = quick ? 200_000 : 1_000_000;
  return { points, megabytes: sweepCommand(points).megabytes };
}

/** The whole command over the ten patches, with its folder. */
export function sweepCommand(
  points: number,
  threads = 1,
): {
  readonly seconds: number;
  readonly megabytes: number;
  readonly folder: string;
} {
  const folder = join(work, 'sweep');
  rmSync(folder, { recursive: true, force: true });
  mkdirSync(work, { recursive: true });
  const over = Object.entries(overRates).flatMap(([name, { from, to }]) => ['--over', `${name}=${from}:${to}`]);
  const design = ['--design', 'sobol', '--points', String(points), '--measure', 'growth'];
  const told = command([
    'sweep',
    tenPatches,
    ...over,
    ...design,
    '--threads',
    String(threads),
    '--quiet',
    '--out',
    folder,
  ]);
  return { ...told, folder };
}
