// The path without chance over many sets of parameters (W1): the kernel, whose image gets the tables of each set, against C, NumPy and R.
import * as layout from '../../assembly/layout.ts';
import { readSections } from '../../src/compile/image/read.ts';
import { loadMachine } from '../../src/machine/machine.ts';
import { inTurns, settledSeconds, type Contender } from './measure.ts';
import type { Comparison, Options } from './options.ts';
import { compileC, runBaseline, script } from './tools.ts';
import { openWorkload, recordsOf, type Workload } from './workload.ts';

export function comparePaths({ quick, rounds }: Options): Comparison {
  const workload = openWorkload('w1');
  const sets = quick ? 100 : 1000;
  const ours = pathRunner(workload);
  const expected = ours(sets);
  const contenders: Contender[] = [{ name: 'skein', run: () => settledSeconds(() => void ours(sets)) }];
  const agreement: string[] = [];
  const others: (readonly [label: string, words: readonly string[] | null, rounds: number])[] = [
    ...compileC('path').map(([label, command]) => [label, [command], rounds] as const),
    ['NumPy', script('path.py'), 3],
    ['R', script('path.R'), 1],
  ];
  for (const [label, start, most] of others) {
    if (start === null) continue;
    const words = [...start, workload.numbersFile, String(sets)];
    const first = runBaseline(words);
    const worst = first.numbers.reduce((far, value, s) => Math.max(far, Math.abs(value / (expected[s] ?? NaN) - 1)), 0);
    if (first.numbers.length !== sets || !(worst < 1e-9)) throw new Error(`${label} differs by ${worst} on the path.`);
    agreement.push(`${label}: animals at the end differ by ${worst.toExponential(1)} at most`);
    const run = (): number => runBaseline(words).seconds;
    contenders.push({ name: label, rounds: most, run: most === 1 ? () => first.seconds : run });
  }
  const seconds = inTurns(contenders, rounds);
  const cells = workload.patches * workload.classes * workload.years * sets;
  return { name: 'W1', cells, seconds: Object.fromEntries(seconds), agreement };
}

/** Animals at the end of each set of parameters, on one instance. */
function pathRunner({ image, patches, classes, years }: Workload): (sets: number) => readonly number[] {
  const machine = loadMachine();
  const at = machine.reserve(image.byteLength);
  new Uint8Array(machine.memory.buffer, at, image.byteLength).set(new Uint8Array(image));
  if (machine.open(at, image.byteLength) !== layout.faultNone) throw new Error('The kernel does not open the image.');
  if (machine.openPath() === 0) throw new Error('The kernel has no room for the path.');
  const sections = readSections(image);
  const records = recordsOf(image);
  const rowOf = (opcode: number, word: number): number => records.get(opcode)?.[word] ?? -1;
  const movement = sections[rowOf(layout.opDispersal, layout.dispersalMovement)]?.data;
  const tables = [
    [rowOf(layout.opSurvival, layout.survivalRates), 3],
    [rowOf(layout.opBreeding, layout.breedingBirths), 7],
    [movement?.[layout.movementChance] ?? -1, 11],
  ].map(([row = -1, step = 0]) => {
    const { data, offset } = sections[row] ?? { data: new Float64Array(0), offset: 0 };
    return {
      base: Float64Array.from(data),
      target: new Float64Array(machine.memory.buffer, at + offset, data.length),
      step,
    };
  });
  const animals = new Float64Array(machine.memory.buffer, machine.pathAnimals(), patches * classes);
  return (sets) =>
    Array.from({ length: sets }, (_, s) => {
      for (const { base, target, step } of tables) {
        scale(target, base, 1 - 0.001 * ((s * step) % 100));
      }
      machine.startPath();
      for (let year = 0; year < years; year++) machine.stepPath();
      machine.readPath();
      return animals.reduce((a, b) => a + b, 0);
    });
}

/** A function of its own is compiled better than a loop within others. */
function scale(target: Float64Array, base: Float64Array, factor: number): void {
  for (let i = 0; i < base.length; i++) target[i] = (base[i] ?? 0) * factor;
}
