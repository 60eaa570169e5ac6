// Whole numbers in the binary format of WebAssembly.
import { expect, test } from 'vitest';
import { readUnsigned, signed, unsigned } from '../../src/export/leb.ts';

// Bytes of 624485 from the example of the DWARF standard; the others derived.
test.each([
  [0, [0]],
  [127, [0x7f]],
  [128, [0x80, 0x01]],
  [624_485, [0xe5, 0x8e, 0x26]],
  [4_294_967_295, [0xff, 0xff, 0xff, 0xff, 0x0f]],
])('%d', (value, bytes) => {
  expect(unsigned(value)).toEqual(bytes);
  expect(readUnsigned(Uint8Array.from([9, ...bytes, 9]), 1)).toEqual({ value, next: 1 + bytes.length });
});

test.each([
  [63, [0x3f]],
  [64, [0xc0, 0x00]],
  [8192, [0x80, 0xc0, 0x00]],
  [131_072, [0x80, 0x80, 0x08]],
])('%d with a sign', (value, bytes) => {
  expect(signed(value)).toEqual(bytes);
});
