// Numbers are written in the kernel exactly as JavaScript writes them.
import { expect, test } from 'vitest';
import { openNumberLines } from '../../src/kernel/number-lines.ts';
import { stream } from '../numeric/random-matrix.ts';

const rows = 4096;
const lines = openNumberLines(2, rows);

function written(values: Float64Array): readonly string[] {
  const first = Float64Array.from(values.keys());
  return new TextDecoder()
    .decode(lines.bytesOf([first, values], values.length))
    .trimEnd()
    .split('\n');
}

function expectSame(values: Float64Array): void {
  const expected = Array.from(values, (value, i) => `${i},${Number.isFinite(value) ? String(value) : ''}`);
  expect(written(values)).toEqual(expected);
}

test('numbers at the edges of their ranges and of the ways to write them', () => {
  const ends = [
    0,
    -0,
    NaN,
    Infinity,
    -Infinity,
    5e-324,
    1.7976931348623157e308,
    2.2250738585072014e-308,
    2.225073858507201e-308,
  ];
  const round = [
    1,
    -1,
    10,
    100,
    0.1,
    0.3,
    1 / 3,
    123456789,
    2 ** 53,
    2 ** 53 + 2,
    9007199254740993,
    1e15,
    123e18,
    1e-5,
    0.05,
  ];
  const turns = [
    1e21, 999999999999999900000, 1e20, 1.5e21, 1e-6, 9.99e-7, 1e-7, 1.5e-7, -1.25e-9, 1e22, 1e23, 1.2e-290,
  ];
  expectSame(
    Float64Array.from([
      ...ends,
      ...round,
      ...turns,
      1e100,
      1e-100,
      9.5367431640625e-7,
      4.35,
      2 / 3,
      1e16,
      12345678901234567,
    ]),
  );
});

test('every power of two and of ten, and their neighbours', () => {
  const powers = [
    ...Array.from({ length: 2098 }, (_, i) => 2 ** (i - 1074)),
    ...Array.from({ length: 632 }, (_, i) => Number(`1e${i - 323}`)),
  ];
  const bits = new BigInt64Array(1);
  const number = new Float64Array(bits.buffer);
  const beside = (value: number, by: bigint): number => {
    number[0] = value;
    bits[0]! += by;
    return number[0];
  };
  for (const by of [-1n, 0n, 1n]) expectSame(Float64Array.from(powers, (value) => beside(value, by)));
});

test('a quarter of a million numbers of any bits, and as many of the sizes that tables have', () => {
  const next = stream(4);
  for (let round = 0; round < 64; round++) {
    const words = Uint32Array.from({ length: 2 * rows }, () => Math.floor(next() * 4294967296));
    expectSame(new Float64Array(words.buffer));
    expectSame(Float64Array.from({ length: rows }, () => Math.round(next() * 1e6) / 10 ** Math.floor(next() * 9)));
    expectSame(Float64Array.from({ length: rows }, () => (next() - 0.5) * 10 ** Math.floor(next() * 20 - 8)));
  }
});
