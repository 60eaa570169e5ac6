// Samples whole states after a few steps and holds their means and covariances against exact ones.
import { expect } from 'vitest';
import { openOwnImage } from '../../src/kernel/open.ts';
import { imageOf, type Sketch } from './models.ts';

/** State r of the replicates at r * cells: animals after the steps, P × C. */
export interface States {
  readonly cells: number;
  readonly replicates: number;
  readonly animals: Float64Array;
}

export function sampleStates(sketch: Sketch, replicates: number, steps = 1): States {
  const machine = openOwnImage(imageOf(sketch));
  const cells = sketch.start.length;
  const animals = new Float64Array(replicates * cells);
  for (let first = 0; first < replicates; first += 16) {
    new Uint32Array(machine.memory.buffer, machine.replicates(), 16).set(
      Array.from({ length: 16 }, (_, i) => first + i),
    );
    machine.start(16, 12345, 6);
    machine.run(steps);
    const state = new Int32Array(machine.memory.buffer, machine.animals(), cells * 16);
    for (let lane = 0; lane < 16 && first + lane < replicates; lane++) {
      for (let cell = 0; cell < cells; cell++) animals[(first + lane) * cells + cell] = state[cell * 16 + lane]!;
    }
  }
  return { cells, replicates, animals };
}

/**
 * Holds the sample against exact means and covariances (row by row; all zero where none is given). Standard errors of
 * covariances come from the sample. The bound of 6.2 standard errors has a chance of 6e-10 a comparison, so that the
 * thousand comparisons of one file stay below 1e-6 in all.
 */
export function expectMoments(
  states: States,
  means: readonly number[],
  covariances: readonly (readonly number[])[],
): void {
  const { cells, replicates, animals } = states;
  const bound = 6.2;
  for (let i = 0; i < cells; i++) {
    const variance = covariances[i]![i]!;
    let sum = 0;
    for (let r = 0; r < replicates; r++) sum += animals[r * cells + i]! - means[i]!;
    const limit = bound * Math.sqrt(variance / replicates);
    expect(Math.abs(sum / replicates), `mean of cell ${String(i)}`).toBeLessThanOrEqual(limit + 1e-9);
    for (let j = i; j < cells; j++) {
      let [products, squares] = [0, 0];
      for (let r = 0; r < replicates; r++) {
        const product = (animals[r * cells + i]! - means[i]!) * (animals[r * cells + j]! - means[j]!);
        products += product;
        squares += product * product;
      }
      const mean = products / replicates;
      const error = Math.sqrt(Math.max(squares / replicates - mean * mean, 0) / replicates);
      expect(Math.abs(mean - covariances[i]![j]!), `covariance of ${String(i)} and ${String(j)}`).toBeLessThanOrEqual(
        bound * error + 1e-9,
      );
    }
  }
}

export function zeros(cells: number): number[][] {
  return Array.from({ length: cells }, () => new Array<number>(cells).fill(0));
}

/** Adds the covariances of a multinomial draw of n over cells with these chances. */
export function addMultinomial(target: number[][], n: number, chances: ReadonlyMap<number, number>): void {
  for (const [i, p] of chances) {
    for (const [j, q] of chances) target[i]![j]! += i === j ? n * p * (1 - p) : -n * p * q;
  }
}
