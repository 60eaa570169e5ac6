// The path without chance as the kernel follows it, against the compiler's own year applied over and over.
import { expect, test } from 'vitest';
import { runYear } from '../../src/compile/year-map.ts';
import { runPath } from '../../src/kernel/path.ts';
import { compileModel, modelNames } from '../golden/models.ts';

test.each(modelNames)('%s: both give the same animals at every count', (name) => {
  const compiled = compileModel(name);
  const { steps } = compiled.model;
  const { animals } = runPath(compiled.image, { steps });
  const cells = compiled.startAnimals.length;
  let state: Float64Array = compiled.startAnimals;
  for (let t = 0; t <= steps; t++) {
    if (t > 0) state = runYear(compiled, state, t).after;
    const kernel = animals.subarray(t * cells, (t + 1) * cells);
    state.forEach((value, i) => expect(Math.abs(kernel[i]! - value)).toBeLessThanOrEqual(1e-12 * Math.max(1, value)));
  }
});
