// One record of a program.
import { none, recordWords } from '../../../assembly/layout.ts';

/** Opcode, key of the name, index for messages, then the operands; what is not used is -1. */
export function record(opcode: number, key: number, index: number, operands: readonly number[]): Int32Array {
  const words = new Int32Array(recordWords).fill(none);
  words.set([opcode, key, index, ...operands]);
  return words;
}
