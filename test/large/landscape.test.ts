// The models that other tests and the benches make by a program.
import { expect, test } from 'vitest';
import { compileText } from '../pipeline/compile-text.ts';
import { largeModel } from './landscape.ts';

test('have the patches and classes asked for, about as many neighbours, and the same text every time', () => {
  const size = { patches: 300, classes: 4, neighbours: 12 };
  const { text, files } = largeModel(size);
  const { model, landscape } = compileText(text, {}, files);
  expect([model.patches.length, model.classes.length]).toEqual([300, 4]);
  const ways = landscape.movements.flatMap((movement) => (movement === null ? [] : [movement.destinations.length]));
  // Those at the edge have fewer.
  expect(ways[0]! / 300).toBeGreaterThan(8);
  expect(ways[0]! / 300).toBeLessThan(13);
  expect(largeModel(size)).toEqual(largeModel(size));
  expect(largeModel({ ...size, seed: 2 }).patches).not.toBe(largeModel(size).patches);
});
