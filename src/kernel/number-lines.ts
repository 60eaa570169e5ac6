// Columns of numbers as lines of text, written in the kernel module: very many numbers in a tenth of the time that text by text takes.
import type { Machine } from '../machine/instance.ts';
import { loadMachine } from '../machine/machine.ts';

export interface NumberLines {
  /**
   * Bytes of so many lines, numbers as JavaScript writes them, with commas between; what is not finite is left empty. They are
   * good until the next call.
   */
  readonly bytesOf: (columns: readonly Float64Array[], rows: number) => Uint8Array;
}

/** Ten to these powers has all that the digits of a number can need. */
const [leastPower, mostPower] = [-292, 324] as const;

/** So many rows at most at a time. Errors: throws RangeError where memory does not suffice. */
export function openNumberLines(columns: number, mostRows: number, machine: Machine = loadMachine()): NumberLines {
  if (machine.openLines(columns, mostRows) === 0) throw new RangeError(`No memory for lines of ${columns} numbers.`);
  const { buffer } = machine.memory;
  const powers = new BigUint64Array(buffer, machine.linePowers(), 2 * (mostPower - leastPower + 1));
  const put = (power: number, bits: bigint): void => {
    powers[2 * (power - leastPower)] = bits >> 64n;
    powers[2 * (power - leastPower) + 1] = bits & 0xffffffffffffffffn;
  };
  let size = 1n;
  for (let power = 0; power <= mostPower; power++, size *= 10n) {
    put(power, firstBits(power, size));
    if (-power >= leastPower) put(-power, firstBits(-power, size));
  }
  const cells = new Float64Array(buffer, machine.lineCells(), columns * mostRows);
  return {
    bytesOf: (own, rows) => {
      own.forEach((column, k) => {
        cells.set(column.subarray(0, rows), k * mostRows);
      });
      return new Uint8Array(buffer, machine.lineText(), machine.writeLines(rows));
    },
  };
}

/** The first 128 bits of ten to a power, rounded up; `size` is ten to the size of that power. */
function firstBits(power: number, size: bigint): bigint {
  // Of ten to this power the logarithm to the base 2, rounded down.
  const shift = BigInt(127 - ((power * 1741647) >> 19));
  if (power < 0) return ((1n << shift) + size - 1n) / size;
  return shift >= 0n ? size << shift : (size + (1n << -shift) - 1n) >> -shift;
}
