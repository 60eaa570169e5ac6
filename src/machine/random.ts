// Uniform random numbers on the host, keyed like those of the kernel: the same key gives the same numbers everywhere.
import { loadMachine } from './machine.ts';

const wordSize = 4294967296;
const machine = loadMachine();
const block = machine.reserve(16);

export interface RandomKey {
  /** A whole number below 2^53. */
  readonly seed: number;
  /** Three 32-bit words: what is drawn, and for which of its kind. */
  readonly words: readonly [number, number, number];
}

/** Number `index` (from 0) of the stream of a key, in (0, 1). */
export function uniformAt({ seed, words }: RandomKey, index: number): number {
  const view = new Uint32Array(machine.memory.buffer, block, 4);
  view.set([index, ...words]);
  machine.probePhilox(block, seed % wordSize, Math.floor(seed / wordSize));
  const [low = 0, high = 0] = new Uint32Array(machine.memory.buffer, block, 4);
  return ((high >>> 5) * 67108864 + (low >>> 6) + 0.5) / 9007199254740992;
}

/** A seed below 2^53 from a key. */
export function seedOf(key: RandomKey): number {
  return Math.floor(uniformAt(key, 0) * 9007199254740992);
}
