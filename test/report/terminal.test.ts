// Text for terminals: plain text takes a short way, which must count and show as the long one does.
import { expect, test } from 'vitest';
import { printable, wide } from '../../src/report/terminal.ts';

const characters = Array.from({ length: 0xd800 }, (_, code) => String.fromCharCode(code));

test('every character is as wide alone as beside one of a wide script', () => {
  expect(characters.filter((one) => wide(one) !== wide(`${one}水`) - 2)).toEqual([]);
});

test('what is hidden is shown alone as beside a control', () => {
  expect(characters.filter((one) => `${printable(one)}\uFFFD` !== printable(`${one}\u0007`))).toEqual([]);
});
