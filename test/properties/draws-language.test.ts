// Phases beyond the spine, each from a fixed state of whole animals: means and all covariances of the draws against exact ones
// (derived).
import { describe, it } from 'vitest';
import type { CeilingPhase, Phase } from '../../src/model/model.ts';
import { everywhere, type Sketch } from '../kernel/models.ts';
import { expectMoments, sampleStates, zeros } from '../kernel/moments.ts';

const replicates = 24_000;

describe('a ceiling that takes the youngest first', () => {
  it('empties one class after the other, and holds a fraction of an animal by chance', () => {
    const phases: Phase[] = [
      {
        kind: 'ceiling',
        name: 'room',
        counted: Uint8Array.of(1, 0, 1),
        capacity: Float64Array.of(25.25, 100),
        takes: 'youngest first',
      },
    ];
    const sketch: Sketch = { patches: ['a', 'b'], classes: ['x', 'y', 'z'], start: [12, 9, 30, 40, 2, 3], phases };
    // 25 or 26 of 42 may stay: all 12 of the youngest go, and 4 or 5 of the next.
    const covariances = zeros(6);
    covariances[2]![2] = 0.25 * 0.75;
    expectMoments(sampleStates(sketch, replicates), [0, 9, 25.25, 40, 2, 3], covariances);
  });
});

describe('a ceiling under which the surplus waits', () => {
  it('lets all live, and no more than the capacity breed, drawn at random', () => {
    const room: CeilingPhase = {
      kind: 'ceiling',
      name: 'room',
      counted: Uint8Array.of(0, 1, 1),
      capacity: Float64Array.of(15),
      takes: 'nobody',
    };
    const young = [0, 0.5, 2];
    const phases: Phase[] = [
      room,
      { kind: 'breeding', name: 'breeding', births: everywhere(1, young), into: Float64Array.of(1, 0, 0), waits: room },
    ];
    const start = [7, 30, 12];
    const sketch: Sketch = { patches: ['a'], classes: ['x', 'y', 'z'], start, phases };
    // Breeders of class z: hypergeometric, 15 of 42 of which 12; the others are of class y. Young are Poisson given the breeders.
    const [all, taken, share] = [42, 15, 12 / 42];
    const spread = taken * share * (1 - share) * ((all - taken) / (all - 1));
    const mean = taken * (share * 2 + (1 - share) * 0.5);
    const covariances = zeros(3);
    covariances[0]![0] = mean + 1.5 * 1.5 * spread;
    expectMoments(sampleStates(sketch, replicates), [7 + mean, 30, 12], covariances);
  });
});
