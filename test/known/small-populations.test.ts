import { describe, expect, it } from 'vitest';
import { runReplicates } from '../kernel/collect.ts';
import type { Phase } from '../../src/model/model.ts';
import { everywhere, imageOf, table } from '../kernel/models.ts';
import { expectMoments, sampleStates } from '../kernel/moments.ts';

const replicates = 20_000;

function counts(phases: readonly Phase[], start: number, steps: number): (step: number) => Float64Array {
  const image = imageOf({ patches: ['only'], classes: ['a'], start: [start], phases, steps });
  const run = runReplicates(image, { replicates, steps, seed: 2024 });
  return (step) => run.counts.subarray(step * 2 * replicates, step * 2 * replicates + replicates);
}

const extinct = (animals: Float64Array) => animals.filter((n) => n === 0).length / animals.length;
const within = (chance: number) => 5 * Math.sqrt((chance * (1 - chance)) / replicates);
/** Every animal is replaced by its young, as in a branching process: births to all, and nobody of the parents lives. */
const branching = (mean: number): Phase[] => [
  { kind: 'demography', name: 'life', fates: table([0]), births: table([mean]) },
];

describe('a branching process with Poisson young', () => {
  // Watson & Galton 1874 and Harris 1963 for the recursion q[t] = exp(m (q[t-1] − 1)); numbers derived.
  it('dies out by generations 1, 2, 5 and 10 with the exact chances', () => {
    const at = counts(branching(1.2), 1, 10);
    for (const [generation, chance] of [
      [1, 0.3011942],
      [2, 0.4323296],
      [5, 0.584697],
      [10, 0.6546898],
    ] as const) {
      expect(Math.abs(extinct(at(generation)) - chance)).toBeLessThan(within(chance));
    }
  });

  // derived: q = exp(1.5 (q − 1)); after sixty generations a surviving line is beyond danger.
  it('dies out in the end with the root of the generating function', () => {
    const at = counts(branching(1.5), 1, 30);
    expect(Math.abs(extinct(at(30)) - 0.4171883561)).toBeLessThan(within(0.4172));
  });

  // Harris 1963: Var N[t] = N0 σ² m^(t−1) (m^t − 1)/(m − 1); derived for m = 1.2, N0 = 10, t = 10.
  it('has the exact mean and variance after ten generations', () => {
    const sketch = { patches: ['only'], classes: ['a'], start: [10], phases: branching(1.2) };
    expectMoments(sampleStates(sketch, replicates, 10), [61.9173642], [[1607.2932]]);
  });
});

describe('a pure death process', () => {
  // derived: (1 − s^t)^n for s = 0.8, n = 20, t = 10.
  it('is extinct by year ten with the exact chance', () => {
    const phases: Phase[] = [{ kind: 'survival', name: 'survival', survival: everywhere(1, [0.8]) }];
    const at = counts(phases, 20, 10);
    expect(Math.abs(extinct(at(10)) - 0.1031309)).toBeLessThan(within(0.1031309));
  });
});

describe('one multinomial draw', () => {
  // derived: variances n p (1 − p), covariances −n p q for n = 100 and p = 0.5, 0.3, 0.2.
  it('has variances 25, 21, 16 and covariance −15', () => {
    const fates = table([0.5, 0, 0, 0.3, 0, 0, 0.2, 0, 0]);
    const births = table(new Array<number>(9).fill(0));
    const phases: Phase[] = [{ kind: 'demography', name: 'life', fates, births }];
    const states = sampleStates(
      { patches: ['only'], classes: ['a', 'b', 'c'], start: [100, 0, 0], phases },
      replicates,
    );
    expectMoments(states, [50, 30, 20], [[25, -15, -10], [-15, 21, -6], [-10, -6, 16]]); // prettier-ignore
  });
});
