// Runs under weather, of whole animals (W3, W4) and of mean ones (W2): the kernel against C, NumPy and R. All must agree on the animals
// at the end before any time counts: C has the same streams of random numbers, so each replicate must be the same; the others by
// their means.
import * as layout from '../../assembly/layout.ts';
import { openOwnCourses } from '../../src/kernel/open-path.ts';
import { openOwnImage } from '../../src/kernel/open.ts';
import type { Machine } from '../../src/machine/instance.ts';
import { inTurns, meanOf, processorSeconds, type Contender } from './measure.ts';
import type { Comparison, Options } from './options.ts';
import { compileC, runBaseline, script } from './tools.ts';
import { openWorkload, type Workload } from './workload.ts';

/** Standard errors that means may lie apart: beyond this by chance once in a million. */
const apartAtMost = 4.9;
const seed = 1;

type Runner = (replicates: number) => readonly number[];

interface Way {
  /** Name of the baselines. */
  readonly baseline: string;
  readonly open: (workload: Workload) => Runner;
  /** Whether a replicate of C is ours. */
  readonly same: (theirs: number, ours: number) => boolean;
}

export function compareAnimals(name: string, options: Options): Comparison {
  return compareRuns(name, options, { baseline: 'animals', open: kernelRunner, same: (a, b) => a === b });
}

/** Mean animals: C may round otherwise. */
export function compareCourses(name: string, options: Options): Comparison {
  const same = (a: number, b: number): boolean => Math.abs(a / b - 1) < 1e-9;
  return compareRuns(name, options, { baseline: 'courses', open: courseRunner, same });
}

function compareRuns(name: string, { quick, rounds }: Options, { baseline, open, same }: Way): Comparison {
  const workload = openWorkload(name);
  const replicates = quick ? 64 : workload.replicates;
  const words = [String(replicates), String(seed)];
  const ours = open(workload);
  const expected = ours(replicates);
  const contenders: Contender[] = [{ name: 'skein', run: () => processorSeconds(() => void ours(replicates)) }];
  const agreement: string[] = [];
  for (const [label, command] of compileC(baseline)) {
    const run = [command, workload.imageFile, ...words];
    const { numbers } = runBaseline(run);
    const alike = numbers.filter((value, k) => same(value, expected[k] ?? NaN)).length;
    if (numbers.length !== replicates || alike < 0.99 * replicates) {
      throw new Error(`${label} agrees in ${alike} of ${replicates} replicates only.`);
    }
    agreement.push(`${label}: ${alike} of ${replicates} replicates end with the same animals`);
    contenders.push({ name: label, run: () => runBaseline(run).seconds });
  }
  for (const [label, file, most] of [
    ['NumPy', `${baseline}.py`, 3],
    ['R', `${baseline}.R`, 1],
  ] as const) {
    const start = script(file);
    if (start === null) continue;
    const first = runBaseline([...start, workload.numbersFile, ...words]);
    agreement.push(agreeInMean(label, first.numbers, expected));
    const run = (): number => runBaseline([...start, workload.numbersFile, ...words]).seconds;
    // The run that agreed counts, where one is enough.
    contenders.push({ name: label, rounds: most, run: most === 1 ? () => first.seconds : run });
  }
  const seconds = inTurns(contenders, rounds);
  const cells = workload.patches * workload.classes * workload.years * replicates;
  return { name: name.toUpperCase(), cells, seconds: Object.fromEntries(seconds), agreement };
}

/** Animals at the end of each replicate, on one instance. */
export function kernelRunner({ image, years }: Workload): Runner {
  const machine = openOwnImage(image);
  return inBatches(machine, () => {
    machine.run(years);
    return machine.observed();
  });
}

function courseRunner({ image, years }: Workload): Runner {
  const machine = openOwnCourses(image);
  return inBatches(machine, () => {
    machine.startCourses();
    for (let year = 0; year < years; year++) {
      machine.stepWeather();
      machine.stepCourses();
    }
    machine.sumCourses();
    return machine.courseTotals();
  });
}

/** `run` gives the address of the totals of its sixteen replicates. */
function inBatches(machine: Machine, run: () => number): Runner {
  return (replicates) => {
    const totals: number[] = [];
    for (let first = 0; first < replicates; first += layout.lanes) {
      const numbers = new Uint32Array(machine.memory.buffer, machine.replicates(), layout.lanes);
      for (let lane = 0; lane < layout.lanes; lane++) numbers[lane] = first + lane;
      machine.start(layout.lanes, seed, 0);
      const count = Math.min(layout.lanes, replicates - first);
      totals.push(...new Float64Array(machine.memory.buffer, run(), count));
    }
    return totals;
  };
}

function agreeInMean(label: string, found: readonly number[], expected: readonly number[]): string {
  const [a, b] = [meanOf(found), meanOf(expected)];
  const apart = Math.abs(a.mean - b.mean) / Math.hypot(a.error, b.error);
  const told = `${label}: mean ${a.mean.toFixed(0)} against ${b.mean.toFixed(0)}, ${apart.toFixed(1)} standard errors apart`;
  if (!(apart < apartAtMost)) throw new Error(told);
  return told;
}
