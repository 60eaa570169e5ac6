// Growth of very many small life cycles of one pattern, made and solved in the kernel module, eight side by side.
import { loadMachine } from '../machine/machine.ts';
import type { Machine } from '../machine/instance.ts';
import { alikeProgram, type AlikeMatrices, type StartVectors } from './alike-program.ts';

export interface AlikeSolver {
  /**
   * Growth at so many points, from column s for source s: `count` numbers each at least. Not a number where an entry is no number
   * above 0, or where the bounds of both vectors do not close to 1e-12: such a matrix has to be solved by itself. Where they do,
   * the growth lies between them; it is their quotient, whose error is near that of rounding. Each depends on its own numbers and
   * on the vectors to start from, never on others or on how many there are.
   */
  readonly growthAt: (columns: readonly Float64Array[], count: number) => Float64Array;
}

/** Eight points take a row in every column. */
const together = 8;
const pointsAtATime = 2048;

/**
 * Opens an instance of the kernel module of its own. The matrix is irreducible where all its entries are above 0. Null where
 * elimination takes too much. Errors: throws RangeError where memory does not suffice.
 */
export function openAlikeSolver(
  matrices: AlikeMatrices,
  start: StartVectors,
  machine: Machine = loadMachine(),
): AlikeSolver | null {
  const program = alikeProgram(matrices, start);
  if (program === null) return null;
  const { words, numbers } = program;
  const fail = (): never => {
    throw new RangeError(`No memory for matrices of ${matrices.order} states.`);
  };
  if (machine.reserveAlike(words.length, numbers.length) === 0) fail();
  new Int32Array(machine.memory.buffer, machine.alikeProgram(), words.length).set(words);
  new Float64Array(machine.memory.buffer, machine.alikeNumbers(), numbers.length).set(numbers);
  if (machine.openAlike(pointsAtATime) === 0) fail();
  const { buffer } = machine.memory;
  const values = matrices.sources * pointsAtATime;
  const [inputs, growths] = [
    new Float64Array(buffer, machine.alikeValues(), values),
    new Float64Array(buffer, machine.alikeGrowths(), pointsAtATime),
  ];
  return {
    growthAt: (columns, count) => {
      const out = new Float64Array(count);
      for (let from = 0; from < count; from += pointsAtATime) {
        const own = Math.min(pointsAtATime, count - from);
        const whole = Math.ceil(own / together) * together;
        columns.forEach((column, source) => {
          const at = source * pointsAtATime;
          inputs.set(column.subarray(from, from + own), at);
          inputs.fill(column[from + own - 1] ?? 0, at + own, at + whole);
        });
        machine.solveAlike(whole);
        out.set(growths.subarray(0, own), from);
      }
      return out;
    },
  };
}
