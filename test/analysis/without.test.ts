// What the growth loses without each patch and each link, all at once, against taking them away one by one.
import { describe, expect, test } from 'vitest';
import { placesOf } from '../../src/analysis/label.ts';
import { statesByPatch } from '../../src/analysis/patches.ts';
import { phaseSensitivities } from '../../src/analysis/phase-sensitivity.ts';
import { linkValues, patchRemovalLosses } from '../../src/analysis/removal.ts';
import { vectorsOf } from '../../src/analysis/sensitivity.ts';
import { aroundGrowth, lossWithoutStates } from '../../src/analysis/without.ts';
import { buildBlock } from '../../src/compile/block.ts';
import { growthRateOf, leading } from '../../src/numeric/leading.ts';
import { principalPart } from '../../src/numeric/principal-part.ts';
import { seriesValue } from '../../src/numeric/series.ts';
import { largeModel } from '../large/landscape.ts';
import { compileText } from '../pipeline/compile-text.ts';

test('a series of few poles is summed beyond where it grows (derived: Σ x^k = 1/(1 − x))', () => {
  const terms = Array.from({ length: 8 }, (_, k) => 3 + 2 * 0.5 ** k);
  expect(seriesValue(terms, 0.9).value).toBeCloseTo(3 / 0.1 + 2 / (1 - 0.45), 9);
  expect(seriesValue(terms, -3).value).toBeCloseTo(3 / 4 + 2 / 2.5, 9);
  expect(seriesValue([2, 0, 0, 0], 5)).toEqual({ value: 2, change: 0 });
});

describe.each([1, 2])('a landscape of 40 patches, %i', (seed) => {
  const { text, files } = largeModel({ patches: 40, classes: 3, seed, neighbours: 8 });
  const block = buildBlock(compileText(text, {}, files), 'zero');
  const vectors = vectorsOf(leading(block.matrix))!;
  const around = aroundGrowth(block.matrix, vectors)!;
  const places = placesOf(block);
  const phases = phaseSensitivities(block.phaseMaps, places, vectors);
  const shared = { matrix: block.matrix, vectors };

  test('without each link', () => {
    const request = { ...shared, phases, places, classCount: block.classes.length };
    const [together, apart] = [linkValues({ ...request, around }), linkValues({ ...request, around: null })];
    expect(together.length).toBeGreaterThan(150);
    together.forEach(({ exact, removalLoss }, k) => {
      expect(exact && apart[k]!.exact).toBe(true);
      expect(Math.abs(removalLoss - apart[k]!.removalLoss)).toBeLessThan(1e-6 * removalLoss + 2e-10);
    });
  });

  test('without each patch', () => {
    const importance = new Float64Array(40).fill(1);
    const request = { ...shared, states: block.states, importance };
    const losses = patchRemovalLosses({ ...request, around });
    const groups = statesByPatch(block.states, 40);
    let told = 0;
    groups.forEach((own, p) => {
      const rest = block.states.flatMap((_, s) => (own.includes(s) ? [] : [s]));
      const loss = vectors.growthRate - growthRateOf(principalPart(block.matrix, rest));
      expect(Math.abs(losses[p]! - loss)).toBeLessThan(1e-6 * loss + 2e-10);
      const kept = around.resolvent.folding.kept;
      if (
        lossWithoutStates(
          around,
          own.filter((state) => kept.includes(state)),
        ) !== null
      )
        told++;
    });
    expect(told).toBeGreaterThan(30);
  });
});
