// For random models: the path of the kernel is the product of the compiler's maps, and the mean of a phase's draws is its map.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { runYear } from '../../src/compile/year-map.ts';
import { runPath } from '../../src/kernel/path.ts';
import { imageOf, modelOf, type Sketch } from '../kernel/models.ts';
import { sampleStates } from '../kernel/moments.ts';
import { sketches, steps } from '../kernel/random-models.ts';

const compiledOf = (sketch: Sketch) => ({
  model: modelOf(sketch),
  landscape: { movements: sketch.movements ?? [] },
  coefficients: sketch.coefficients ?? [],
});

describe('any model', () => {
  it('has a path without chance that is the maps of its phases, one after the other', () => {
    fc.assert(
      fc.property(sketches(5), (sketch) => {
        const path = runPath(imageOf(sketch), { steps });
        let state: Float64Array = Float64Array.from(sketch.start);
        for (let step = 1; step <= steps; step++) {
          state = runYear(compiledOf(sketch), state, step).after;
          state.forEach((n, i) => {
            const found = path.animals[step * state.length + i]!;
            expect(Math.abs(found - n)).toBeLessThanOrEqual(1e-11 * Math.max(1, Math.abs(n)));
          });
        }
      }),
      { seed: 20_251, numRuns: 300 },
    );
  });

  it('draws each phase with the mean of its map, from a fixed state of whole animals', () => {
    const replicates = 1600;
    fc.assert(
      fc.property(sketches(1), (sketch) => {
        const { animals, cells } = sampleStates(sketch, replicates);
        const expected = runYear(compiledOf(sketch), Float64Array.from(sketch.start), 1).after;
        expected.forEach((mean, i) => {
          const own = animals.filter((_, k) => k % cells === i);
          const average = own.reduce((a, b) => a + b, 0) / replicates;
          const variance = own.reduce((a, b) => a + (b - average) ** 2, 0) / replicates;
          // About 3000 comparisons at 7 standard errors; rare events that never came get their own room.
          expect(Math.abs(average - mean)).toBeLessThanOrEqual(7 * Math.sqrt(variance / replicates) + 25 / replicates);
        });
      }),
      { seed: 20_252, numRuns: 250 },
    );
  });
});
