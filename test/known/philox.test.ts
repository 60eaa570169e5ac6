import { describe, expect, it } from 'vitest';
import { loadMachine } from '../../src/machine/machine.ts';

const machine = loadMachine();
const at = machine.reserve(1024);
const words = (from: number, count: number) => Array.from(new Uint32Array(machine.memory.buffer, from, count));

function block(counter: readonly number[], key: readonly [number, number]): readonly number[] {
  new Uint32Array(machine.memory.buffer, at, 4).set(counter);
  machine.probePhilox(at, key[0], key[1]);
  return words(at, 4);
}

const ones = 0xffffffff;

describe('Philox4x32-10', () => {
  // Salmon, Moraes, Dror & Shaw 2011, known-answer vectors of the reference implementation.
  it.each([
    { counter: [0, 0, 0, 0], key: [0, 0] as const, words: [0x6627e8d5, 0xe169c58d, 0xbc57ac4c, 0x9b00dbd8] },
    {
      counter: [ones, ones, ones, ones],
      key: [ones, ones] as const,
      words: [0x408f276d, 0x41c83b0e, 0xa20bc7c6, 0x6d5451fd],
    },
    {
      counter: [0x243f6a88, 0x85a308d3, 0x13198a2e, 0x03707344],
      key: [0xa4093822, 0x299f31d0] as const,
      words: [0xd16cfe09, 0x94fdcceb, 0x5001e420, 0x24126ea1],
    },
    // derived: computed apart from the published definition.
    { counter: [1, 0, 0, 0], key: [0, 0] as const, words: [0xf8e4cca4, 0x5cb200db, 0xb1a574eb, 0x097eff67] },
  ])('gives the known words for counter $counter', (known) => {
    expect(block(known.counter, known.key)).toEqual(known.words);
  });

  it('gives all lanes at once the words that it gives one by one', () => {
    const replicates = Array.from({ length: 16 }, (_, lane) => (lane * 2654435761 + 5) % 2 ** 32);
    const table = at + 64;
    const out = at + 256;
    // The sampling probe sets seed (1, 0) for what follows.
    machine.probeSample(out, 16, at + 512);
    new Uint32Array(machine.memory.buffer, table, 19).set([...replicates, 17, 0xdeadbeef, 0x12345678]);
    machine.probePhiloxLanes(out, table, table + 64);
    replicates.forEach((replicate, lane) => {
      const alone = block([replicate, 17, 0xdeadbeef, 0x12345678], [1, 0]);
      expect([...words(out + 8 * lane, 2), ...words(out + 128 + 8 * lane, 2)]).toEqual(alone);
    });
  });
});

describe('xoroshiro128++', () => {
  // derived: the definition of Blackman & Vigna 2019 written out again with whole numbers of any size.
  it('follows its definition', () => {
    const mask = (1n << 64n) - 1n;
    const turn = (x: bigint, k: bigint) => ((x << k) | (x >> (64n - k))) & mask;
    let [s0, s1] = [0x0123456789abcdefn, 0xfedcba9876543210n];
    for (let index = 0; index < 20; index++) {
      new BigUint64Array(machine.memory.buffer, at, 2).set([0x0123456789abcdefn, 0xfedcba9876543210n]);
      machine.probeStream(at + 16, at, index);
      expect(new BigUint64Array(machine.memory.buffer, at + 16, 1)[0]).toBe((turn((s0 + s1) & mask, 17n) + s0) & mask);
      s1 ^= s0;
      s0 = turn(s0, 49n) ^ s1 ^ ((s1 << 21n) & mask);
      s1 = turn(s1, 28n);
    }
  });
});
