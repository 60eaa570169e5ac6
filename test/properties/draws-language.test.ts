// Phases beyond the spine, each from a fixed state of whole animals: means and all covariances of the draws against exact ones
// (derived).
import { describe, it } from 'vitest';
import type { AddPhase, CeilingPhase, MovePhase, Phase, TakePhase } from '../../src/model/model.ts';
import { everywhere, table, type Sketch } from '../kernel/models.ts';
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

const take = (own: Partial<TakePhase>): TakePhase => ({
  kind: 'take',
  name: 'bag',
  active: null,
  patches: Uint8Array.of(1, 1),
  classes: Uint8Array.of(1, 1),
  amounts: everywhere(2, [10, 0]),
  rule: 'number',
  together: false,
  byClass: false,
  levels: new Float64Array(2),
  ...own,
});

/** Adds the covariances of `taken` animals drawn without replacement from cells with these numbers. */
function addWithout(target: number[][], cells: ReadonlyMap<number, number>, taken: number): void {
  const all = [...cells.values()].reduce((a, b) => a + b, 0);
  const spread = (taken * (all - taken)) / (all - 1);
  for (const [i, n] of cells) {
    for (const [j, m] of cells)
      target[i]![j]! += spread * (i === j ? (n / all) * (1 - n / all) : -(n / all) * (m / all));
  }
}

const herd = { patches: ['a', 'b'], classes: ['x', 'y'], start: [12, 30, 4, 2] };

describe('a take', () => {
  it('of a number in each patch draws over the classes without replacement, never more than there are', () => {
    const covariances = zeros(4);
    addWithout(covariances, new Map([[0, 12], [1, 30]]), 10); // prettier-ignore
    const left = 32 / 42;
    const states = sampleStates({ ...herd, phases: [take({})] }, replicates);
    expectMoments(states, [12 * left, 30 * left, 0, 0], covariances);
  });

  it('of a number as a whole draws over the patches, too', () => {
    const covariances = zeros(4);
    addWithout(covariances, new Map([[0, 12], [1, 30], [2, 4], [3, 2]]), 20); // prettier-ignore
    const phases = [take({ together: true, amounts: everywhere(2, [20, 0]) })];
    expectMoments(
      sampleStates({ ...herd, phases }, replicates),
      herd.start.map((n) => (n * 28) / 48),
      covariances,
    );
  });

  it('of a share by class is whole, its fraction by chance', () => {
    const phases = [take({ rule: 'share', byClass: true, amounts: everywhere(2, [0.25, 0.11]) })];
    const covariances = zeros(4);
    const fraction = (p: number) => p * (1 - p);
    [0, fraction(0.3), 0, fraction(0.22)].forEach((v, i) => (covariances[i]![i] = v));
    expectMoments(sampleStates({ ...herd, phases }, replicates), [9, 30 - 3.3, 3, 2 - 0.22], covariances);
  });

  it('of a share of the excess leaves those alone who are below the level', () => {
    const phases = [take({ rule: 'excess', amounts: everywhere(2, [0.5, 0]), levels: Float64Array.of(22, 22) })];
    const covariances = zeros(4);
    addWithout(covariances, new Map([[0, 12], [1, 30]]), 10); // prettier-ignore
    const left = 32 / 42;
    expectMoments(sampleStates({ ...herd, phases }, replicates), [12 * left, 30 * left, 4, 2], covariances);
  });

  it('is not done in years without it', () => {
    const phases = [take({ active: Int32Array.of(0, 1, 0, 0, 0, 0, 0, 0, 0, 0) })];
    expectMoments(sampleStates({ ...herd, phases }, 64), herd.start, zeros(4));
  });
});

describe('a move', () => {
  it('debits its source, and brings those that live through it', () => {
    const move: MovePhase = {
      ...take({ patches: Uint8Array.of(1, 0), byClass: true, amounts: everywhere(2, [6, 40]) }),
      kind: 'move',
      name: 'moves',
      to: 1,
      survival: Float64Array.of(0.8, 0.8),
      homing: 0,
    };
    // 6 of 12, and all 30 of the 40 wanted; each arrives with chance 0.8.
    const covariances = zeros(4);
    covariances[2]![2] = 6 * 0.16;
    covariances[3]![3] = 30 * 0.16;
    const states = sampleStates({ ...herd, phases: [move] }, replicates);
    expectMoments(states, [6, 0, 4 + 4.8, 2 + 24], covariances);
  });

  it('lets classes differ in what they live through, and a share go back', () => {
    const move: MovePhase = {
      ...take({ patches: Uint8Array.of(1, 0), byClass: true, amounts: everywhere(2, [6, 40]) }),
      kind: 'move',
      name: 'moves',
      to: 1,
      survival: Float64Array.of(0.8, 0.5),
      homing: 0.25,
    };
    // Each of the 6 stays there with chance 0.6, is back with 0.2; each of the 30 with 0.375 and 0.125.
    const covariances = zeros(4);
    const set = (source: number, target: number, [n, back, there]: readonly [number, number, number]) => {
      covariances[source]![source] = n * back * (1 - back);
      covariances[target]![target] = n * there * (1 - there);
      covariances[source]![target] = covariances[target]![source] = -n * back * there;
    };
    set(0, 2, [6, 0.2, 0.6]);
    set(1, 3, [30, 0.125, 0.375]);
    const states = sampleStates({ ...herd, phases: [move] }, replicates);
    expectMoments(states, [6 + 1.2, 3.75, 4 + 3.6, 2 + 11.25], covariances);
  });
});

describe('a release', () => {
  it('adds whole animals of whom a share lives', () => {
    const add: AddPhase = {
      kind: 'add',
      name: 'release',
      active: null,
      patches: Uint8Array.of(0, 1),
      classes: Uint8Array.of(0, 1),
      amounts: table([0, 0, 0, 7.25]),
      survival: Float64Array.of(0.6, 0.6),
    };
    const covariances = zeros(4);
    covariances[3]![3] = 7.25 * 0.24 + 0.36 * 0.25 * 0.75;
    const states = sampleStates({ ...herd, phases: [add] }, replicates);
    expectMoments(states, [12, 30, 4, 2 + 7.25 * 0.6], covariances);
  });
});
