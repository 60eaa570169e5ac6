import fc from 'fast-check';
import { expect, test } from 'vitest';
import { phaseElasticitySum, phaseSensitivities } from '../../src/analysis/phase-sensitivity.ts';
import { patchRoles } from '../../src/analysis/patches.ts';
import { entrySensitivities, vectorsOf } from '../../src/analysis/sensitivity.ts';
import { generationTimes, nextGeneration } from '../../src/analysis/life-history.ts';
import { leading } from '../../src/numeric/leading.ts';
import { principalPart } from '../../src/numeric/principal-part.ts';
import { product } from '../../src/numeric/sparse-product.ts';
import { forEachEntry, sparseFromRows } from '../../src/numeric/sparse.ts';
import { anyIrreducible } from '../numeric/random-matrix.ts';
import { ringBlock } from './landscape-block.ts';

const anyLandscape = fc
  .record({
    patches: fc.integer({ min: 2, max: 7 }),
    classes: fc.integer({ min: 2, max: 4 }),
    reach: fc.integer({ min: 1, max: 2 }),
    seed: fc.integer({ min: 1, max: 2_000_000_000 }),
  })
  .map(ringBlock);
const runs = { seed: 424242, numRuns: 60 };

test('elasticities of entries sum to 1, and as much flows into each state as out of it', () => {
  fc.assert(
    fc.property(anyIrreducible, (rows) => {
      const matrix = sparseFromRows(rows);
      const { elasticity } = entrySensitivities(matrix, vectorsOf(leading(matrix))!);
      const [into, outOf] = [new Float64Array(rows.length), new Float64Array(rows.length)];
      forEachEntry(matrix, (row, column, _value, k) => {
        into[row] = into[row]! + elasticity[k]!;
        outOf[column] = outOf[column]! + elasticity[k]!;
      });
      expect(elasticity.reduce((sum, value) => sum + value, 0)).toBeCloseTo(1, 11);
      into.forEach((value, i) => expect(value).toBeCloseTo(outOf[i]!, 11));
    }),
    runs,
  );
});

test('sensitivities agree with central differences', () => {
  fc.assert(
    fc.property(anyIrreducible, (rows) => {
      const matrix = sparseFromRows(rows);
      const { sensitivity } = entrySensitivities(matrix, vectorsOf(leading(matrix))!);
      const grown = (row: number, column: number, factor: number): number =>
        leading(
          sparseFromRows(
            rows.map((line, i) => line.map((value, j) => (i === row && j === column ? value * factor : value))),
          ),
        ).growthRate;
      forEachEntry(matrix, (row, column, value, k) => {
        const h = 1e-5;
        const difference = (grown(row, column, 1 + h) - grown(row, column, 1 - h)) / (2 * h * value);
        expect(Math.abs(sensitivity[k]! - difference)).toBeLessThan(1e-6 * (1 + Math.abs(difference)));
      });
    }),
    { seed: 11, numRuns: 12 },
  );
});

test('elasticities sum to 1 over demography and over dispersal', () => {
  fc.assert(
    fc.property(anyLandscape, ({ block }) => {
      const vectors = vectorsOf(leading(block.matrix))!;
      const places = block.states.map((_, s) => s);
      for (const phase of phaseSensitivities(block.phaseMaps, places, vectors)) {
        expect(phaseElasticitySum(phase, vectors.growthRate)).toBeCloseTo(1, 11);
      }
    }),
    runs,
  );
});

test('contributions weighted by the shares of the patches sum to the growth', () => {
  fc.assert(
    fc.property(anyLandscape, ({ block }) => {
      const { right, growthRate } = vectorsOf(leading(block.matrix))!;
      const roles = patchRoles(block.matrix, block.states, right, block.patches.length);
      const sum = block.states.reduce((total, { patch }, s) => total + right[s]! * roles[patch]!.contribution!, 0);
      expect(sum).toBeCloseTo(growthRate, 11);
    }),
    runs,
  );
});

test('the order of the patches changes nothing but the order', () => {
  fc.assert(
    fc.property(anyLandscape, ({ block }) => {
      const order = block.states.map((_, s) => s).reverse();
      const turned = principalPart(block.matrix, order);
      const states = order.map((s) => block.states[s]!);
      const [one, other] = [vectorsOf(leading(block.matrix))!, vectorsOf(leading(turned))!];
      const before = patchRoles(block.matrix, block.states, one.right, block.patches.length);
      const after = patchRoles(turned, states, other.right, block.patches.length);
      before.forEach((role, p) => {
        expect(after[p]!.contribution!).toBeCloseTo(role.contribution!, 11);
        expect(after[p]!.growthAlone).toBeCloseTo(role.growthAlone, 11);
        expect(after[p]!.role).toBe(role.role);
      });
    }),
    runs,
  );
});

test('the net reproductive rate and the growth are on the same side of 1, and generation times agree at 1', () => {
  fc.assert(
    fc.property(anyLandscape, ({ block, split }) => {
      const vectors = vectorsOf(leading(block.matrix))!;
      const next = nextGeneration(split)!;
      expect(Math.sign(next.netRate - 1)).toBe(Math.sign(vectors.growthRate - 1));
      const times = generationTimes(split, vectors, next);
      const [shortest, longest] = [Math.min(times.cohort!, times.stable!), Math.max(times.cohort!, times.stable!)];
      expect(times.replacement!).toBeGreaterThan(shortest * (1 - 1e-9));
      expect(times.replacement!).toBeLessThan(longest * (1 + 1e-9));
    }),
    runs,
  );
});

test('with a class that is empty at the count left out, phases still carry the whole elasticity', () => {
  const breeding = sparseFromRows([
    [1, 1.1, 0, 0],
    [0, 1, 0, 0],
    [0, 0, 1, 1.4],
    [0, 0, 0, 1],
  ]);
  const survival = sparseFromRows([
    [0, 0, 0, 0],
    [0.5, 0.6, 0, 0],
    [0, 0, 0, 0],
    [0, 0, 0.4, 0.7],
  ]);
  const movement = sparseFromRows([
    [0, 0, 0, 0],
    [0, 0.8, 0, 0.2],
    [0, 0, 0, 0],
    [0, 0.2, 0, 0.8],
  ]);
  const maps = [breeding, survival, movement].map((map, k) => ({ phase: String(k), map }));
  const places = [1, 3];
  const matrix = principalPart(product(movement, product(survival, breeding)), places);
  const vectors = vectorsOf(leading(matrix))!;
  for (const phase of phaseSensitivities(maps, places, vectors)) {
    expect(phaseElasticitySum(phase, vectors.growthRate)).toBeCloseTo(1, 12);
  }
});
