// Patches that exchange animals: the order of the states, and growth in closed form.
import { describe, expect, test } from 'vitest';
import { buildBlock } from '../../src/compile/block.ts';
import { spectrum } from '../../src/analysis/spectrum.ts';
import { leading } from '../../src/numeric/leading.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';
import { blockRows, largestDifference, leadingOf, pathOf } from '../pipeline/measure.ts';

describe('the state is one vector, patch by patch, classes in order (derived; Hunter & Caswell 2005)', () => {
  // Class i in patch j holds entry (i, j) of [[1, 2, 3], [4, 5, 6]].
  const text = framed(
    `classes: [young, old]
oldest: open-ended
survival: { young: 1, old: 1 }
year: [count, survival]
start:
  table: { A: { young: 1, old: 4 }, B: { young: 2, old: 5 }, C: { young: 3, old: 6 } }
`,
    { patches: '[{ name: A }, { name: B }, { name: C }]' },
  );

  test('stacked by columns', () => {
    const compiled = compileText(text);
    expect([...compiled.startAnimals]).toEqual([1, 4, 2, 5, 3, 6]);
    expect(pathOf(compiled)[1]).toEqual([1, 4, 2, 5, 3, 6]);
    const states = buildBlock(compiled, 'zero').states.map((state) => [state.patch, state.class]);
    expect(states).toEqual([
      [0, 0],
      [0, 1],
      [1, 0],
      [1, 1],
      [2, 0],
      [2, 1],
    ]);
  });
});

/** Two patches of one class that all breed once and die; a share moves to the other. */
function exchange(rates: readonly [number, number], share: number): string {
  return framed(
    `classes: [animal]
demography: { births: [[${rates[0]}]] }
in: { B: { demography: { births: [[${rates[1]}]] } } }
year: [count, demography, moving]
moving: { kind: dispersal, classes: [animal], shares: { A: { B: ${share} }, B: { A: ${share} } } }
start: { table: { A: { animal: 10 } } }
`,
    { patches: '[{ name: A }, { name: B }]' },
  );
}

describe('two scalar patches: λ = a + √(a² − (1 − 2m) R₁R₂), a = (1 − m)(R₁ + R₂) / 2 (derived)', () => {
  test.each([
    { rates: [1.2, 1.2], share: 0.1, wanted: [1.2, 0.96] },
    { rates: [1.3, 0.8], share: 0.2, wanted: [1.1256571371, 0.5543429] },
    { rates: [1.5, 0.5], share: 0.5, wanted: [1, 0] },
  ] as const)('growth $rates, exchange $share', ({ rates, share, wanted }) => {
    const { matrix } = buildBlock(compileText(exchange(rates, share)), 'zero');
    const found = leading(matrix);
    expect(Math.abs(found.growthRate - wanted[0])).toBeLessThan(1e-9);
    expect(spectrum(matrix, found)!.eigenvalues[1]!.re).toBeCloseTo(wanted[1], 7);
  });

  test('more mixing never raises growth without losses (from memory of Karlin 1982)', () => {
    const shares = [0, 0.05, 0.1, 0.2, 0.3, 0.5];
    const growth = shares.map((share) => leadingOf(compileText(exchange([1.3, 0.8], share))).growthRate);
    const wanted = [1.3, 1.240412, 1.1920324, 1.1256571, 1.0874557, 1.05];
    expect(largestDifference(growth, wanted)).toBeLessThan(6e-8);
    growth.slice(1).forEach((rate, i) => expect(rate).toBeLessThan(growth[i]!));
  });

  test('a sink with growth 0.6 pulls a source with 1.3 to a standstill at m = 6/17', () => {
    expect(leadingOf(compileText(exchange([1.3, 0.6], 6 / 17))).growthRate).toBeCloseTo(1, 12);
  });
});

/** Two alike patches of two ages; of the newborn 0.3 move to the other. */
function alike(survivalOnTheWay: number): string {
  return framed(
    `position: plane
unit: km
classes: [young, adult]
oldest: open-ended
demography: { survival: [0.3, 0.8], fecundity: [0, 1.2] }
year: [count, demography, natal]
natal:
  kind: dispersal
  classes: [young]
  leaving: 0.3
  kernel: { shape: exponential, mean: 3 km }
  leavers: all arrive
  survival-on-the-way: ${survivalOnTheWay}
start: { total: 100 }
`,
    { patches: '[{ name: A, at: [0, 0] }, { name: B, at: [5, 0] }]' },
  );
}

describe('alike age-structured patches with exchange of newborn (derived)', () => {
  test('without losses the growth is that of one patch', () => {
    const { matrix } = buildBlock(compileText(alike(1)), 'zero');
    const found = leading(matrix);
    expect(Math.abs(found.growthRate - 1.1211102551)).toBeLessThan(1e-9);
    const all = spectrum(matrix, found)!.eigenvalues.map((value) => value.re);
    const wanted = [1.12111, 0.951362, -0.32111, -0.151362];
    expect(largestDifference([...all].sort(bySize), [...wanted].sort(bySize))).toBeLessThan(1e-6);
  });

  test('with 0.8 of the leavers surviving, that of one patch whose newborn survive 0.94', () => {
    const found = leadingOf(compileText(alike(0.8))).growthRate;
    expect(Math.abs(found - 1.1059745038)).toBeLessThan(1e-9);
    expect(largestDifference(blockRows(compileText(alike(0.8)))[0]!, [0, 0.84, 0, 0.288])).toBeLessThan(1e-15);
  });
});

function bySize(a: number, b: number): number {
  return Math.abs(b) - Math.abs(a);
}
