import { describe, expect, test } from 'vitest';
import { patchRoles, roleOf, sinkSize } from '../../src/analysis/patches.ts';
import { linkValues, patchRemovalLosses } from '../../src/analysis/removal.ts';
import { metapopulationCapacity } from '../../src/analysis/metapopulation-capacity.ts';
import { movedInsteadOfStaying, phaseElasticitySum, phaseSensitivities } from '../../src/analysis/phase-sensitivity.ts';
import { vectorsOf } from '../../src/analysis/sensitivity.ts';
import { spectrum } from '../../src/analysis/spectrum.ts';
import { findRoot } from '../../src/numeric/root.ts';
import { leading } from '../../src/numeric/leading.ts';
import { multiply, product } from '../../src/numeric/sparse-product.ts';
import { entryAt, sparseFromRows, toDense } from '../../src/numeric/sparse.ts';
import { threePatches } from './three-patches.ts';

const growth = (rows: number[][]): number => leading(sparseFromRows(rows)).growthRate;
const twoPatches = (r1: number, r2: number, m: number): number[][] => [
  [(1 - m) * r1, m * r2],
  [m * r1, (1 - m) * r2],
];

describe('two patches that exchange a share m (derived)', () => {
  test('eigenvalues in closed form', () => {
    for (const [r1, r2, m, first, second] of [
      [1.2, 1.2, 0.1, 1.2, 0.96],
      [1.3, 0.8, 0.2, 1.1256571371, 0.5543429],
      [1.5, 0.5, 0.5, 1, 0],
    ] as const) {
      const matrix = sparseFromRows(twoPatches(r1, r2, m));
      const all = spectrum(matrix, leading(matrix))!.eigenvalues;
      expect(all[0]!.re).toBeCloseTo(first, 9);
      expect(all[1]!.re).toBeCloseTo(second, 7);
    }
  });

  test('mixing without loss never raises the growth (Karlin 1982 from memory)', () => {
    const found = [0, 0.05, 0.1, 0.2, 0.3, 0.5].map((m) => growth(twoPatches(1.3, 0.8, m)));
    const expected = [1.3, 1.240412, 1.1920324, 1.1256571, 1.0874557, 1.05];
    expected.forEach((value, k) => expect(found[k]).toBeCloseTo(value, 7));
    found.slice(1).forEach((value, k) => expect(value).toBeLessThanOrEqual(found[k]!));
  });

  test('a source lasts with a sink up to m = 6/17', () => {
    const excess = (m: number): number => growth(twoPatches(1.3, 0.6, m)) - 1;
    expect(findRoot(excess, { low: 0.01, high: 0.5 })).toBeCloseTo(6 / 17, 10);
    expect(findRoot((m) => growth(twoPatches(1.3, 0.8, m)) - 1, { low: 0, high: 0.5 })).toBeNull();
  });
});

test('a ring of six and five islands have their known eigenvalues (analytic)', () => {
  const ring = Array.from({ length: 6 }, (_, i) =>
    Array.from({ length: 6 }, (_unused, j) => {
      const apart = Math.min((i - j + 6) % 6, (j - i + 6) % 6);
      return 1.1 * (apart === 0 ? 0.7 : apart === 1 ? 0.15 : 0);
    }),
  );
  const islands = Array.from({ length: 5 }, (_, i) =>
    Array.from({ length: 5 }, (_unused, j) => (i === j ? 0.8 : 0.05)),
  );
  const all = (rows: number[][]): number[] => {
    const matrix = sparseFromRows(rows);
    return spectrum(matrix, leading(matrix))!.eigenvalues.map(({ re }) => re);
  };
  [1.1, 0.935, 0.935, 0.605, 0.605, 0.44].forEach((value, k) => expect(all(ring)[k]).toBeCloseTo(value, 10));
  [1, 0.75, 0.75, 0.75, 0.75].forEach((value, k) => expect(all(islands)[k]).toBeCloseTo(value, 10));
});

describe('two equal patches of two stages whose newborns exchange 0.3 (derived)', () => {
  const stay = (survival: number): number[][] => {
    const demography = [
      [0, 1.2, 0, 0],
      [0.3, 0.8, 0, 0],
      [0, 0, 0, 1.2],
      [0, 0, 0.3, 0.8],
    ];
    const [s, g] = [0.7, 0.3 * survival];
    const movement = [
      [s, 0, g, 0],
      [0, 1, 0, 0],
      [g, 0, s, 0],
      [0, 0, 0, 1],
    ];
    return toRows(toDense(product(sparseFromRows(movement), sparseFromRows(demography))).values, 4);
  };
  const toRows = (values: Float64Array, n: number): number[][] =>
    Array.from({ length: n }, (_, i) => [...values.slice(i * n, i * n + n)]);

  test('growth is that of one patch; the other eigenvalues', () => {
    const matrix = sparseFromRows(stay(1));
    const all = spectrum(matrix, leading(matrix))!.eigenvalues;
    [1.12111, 0.951362, -0.32111, -0.151362].forEach((value, k) => expect(all[k]!.re).toBeCloseTo(value, 6));
  });

  test('with survival 0.8 on the way growth is that of diag(0.94, 1) A', () => {
    expect(growth(stay(0.8))).toBeCloseTo(1.1059745038, 9);
    expect(
      growth([
        [0, 1.2 * 0.94],
        [0.3, 0.8],
      ]),
    ).toBeCloseTo(1.1059745038, 9);
  });
});

test('Pulliam’s sink holds 250 animals (Pulliam 1988, from memory)', () => {
  expect(sinkSize({ animals: 100, growth: 1.5 }, 0.8)).toBeCloseTo(250, 10);
  expect(sinkSize({ animals: 100, growth: 0.9 }, 0.8)).toBeNull();
});

test('all permutations of patch-major to class-major: vec(Nᵀ) (from memory of Henderson & Searle 1981)', () => {
  const chosen = [1, 3, 5, 2, 4, 6];
  const permutation = sparseFromRows(chosen.map((k) => Array.from({ length: 6 }, (_, j) => (j === k - 1 ? 1 : 0))));
  expect([...multiply(permutation, Float64Array.of(1, 4, 2, 5, 3, 6))]).toEqual([1, 2, 3, 4, 5, 6]);
});

describe('three patches from a kernel (derived, with independent arithmetic)', () => {
  const { matrix, maps, states } = threePatches();
  const found = leading(matrix);
  const vectors = vectorsOf(found)!;
  const places = states.map((_, s) => s);

  test('the compiled matrix and its growth', () => {
    expect(entryAt(matrix, 0, 3)).toBeCloseTo(0.15865226, 8);
    expect(entryAt(matrix, 4, 1)).toBeCloseTo(0.00319993, 8);
    expect(found.growthRate).toBeCloseTo(1.1217749866, 9);
    const alone = patchRoles(matrix, states, vectors.right, 3).map((role) => role.growthAlone);
    const ownBlock = growth([
      [0, 0.96],
      [0.3, 0.8],
    ]);
    expect(alone[0]).toBeCloseTo(ownBlock, 13);
  });

  test('isolated growth with nobody leaving', () => {
    const isolated = [
      [1.2, 0.3, 0.8],
      [0.9, 0.25, 0.75],
      [1.5, 0.3, 0.8],
    ].map(([f, s0, s]) =>
      growth([
        [0, f!],
        [s0!, s!],
      ]),
    );
    [1.1211103, 0.9796693, 1.181025].forEach((value, k) => expect(isolated[k]).toBeCloseTo(value, 7));
  });

  test('contributions over the stable distribution, and their weighted sum is the growth', () => {
    const roles = patchRoles(matrix, states, vectors.right, 3);
    const expected = [1.1086527, 0.8056673, 1.2505046];
    expected.forEach((value, p) => expect(roles[p]!.contribution).toBeCloseTo(value, 7));
    expect(roles.map((role) => role.role)).toEqual(['source', 'sink', 'source']);
    const shares = [0, 1, 2].map((p) => vectors.right[2 * p]! + vectors.right[2 * p + 1]!);
    const sum = shares.reduce((total, share, p) => total + share * roles[p]!.contribution!, 0);
    expect(sum).toBeCloseTo(found.growthRate, 12);
    roles.forEach((role) => expect(role.selfRecruitment!).toBeLessThanOrEqual(role.contribution!));
  });

  test('elasticities sum to 1 over each phase', () => {
    for (const phase of phaseSensitivities(maps, places, vectors)) {
      expect(phaseElasticitySum(phase, found.growthRate)).toBeCloseTo(1, 12);
    }
  });

  test('sensitivities of links agree with differences, alone and instead of staying', () => {
    const phases = phaseSensitivities(maps, places, vectors);
    const [demography, movement] = [maps[0]!.map, toDense(maps[1]!.map)];
    const grown = (changes: readonly (readonly [number, number, number])[]): number => {
      const values = movement.values.slice();
      for (const [i, j, by] of changes) values[i * 6 + j] = values[i * 6 + j]! + by;
      const rows = Array.from({ length: 6 }, (_, i) => [...values.slice(i * 6, i * 6 + 6)]);
      return leading(product(sparseFromRows(rows), demography)).growthRate;
    };
    const h = 1e-6;
    const links = linkValues({ matrix, vectors, phases, places, classCount: 2, around: null });
    expect(links).toHaveLength(6);
    for (const link of links) {
      const [i, j] = [link.to * 2 + link.class, link.from * 2 + link.class];
      expect(link.sensitivity).toBeCloseTo((grown([[i, j, h]]) - grown([[i, j, -h]])) / (2 * h), 7);
      const moved =
        (grown([
          [i, j, h],
          [j, j, -h],
        ]) -
          grown([
            [i, j, -h],
            [j, j, h],
          ])) /
        (2 * h);
      expect(link.sensitivityInsteadOfStaying).toBeCloseTo(moved, 7);
      expect(movedInsteadOfStaying(phases[1]!, i, j)).toBeCloseTo(moved, 7);
      expect(link.exact).toBe(true);
      expect(link.removalLoss).toBeCloseTo(found.growthRate - grown([[i, j, -link.share]]), 12);
    }
  });

  test('without a patch the growth is that of the other two', () => {
    const losses = patchRemovalLosses({
      matrix,
      states,
      vectors,
      importance: new Float64Array(3).fill(1),
      around: null,
    });
    const dense = toDense(matrix).values;
    [0, 1, 2].forEach((gone) => {
      const kept = [0, 1, 2, 3, 4, 5].filter((s) => Math.floor(s / 2) !== gone);
      const rest = kept.map((i) => kept.map((j) => dense[i * 6 + j]!));
      expect(losses[gone]).toBeCloseTo(Math.max(0, found.growthRate - growth(rest)), 12);
    });
  });
});

test('a patch is undecided where the interval of its contribution holds 1', () => {
  expect([roleOf(1.1, [0.9, 1.3]), roleOf(1.1, [1.05, 1.3]), roleOf(0.8, [0.7, 0.9]), roleOf(1, [1, 1])]).toEqual([
    'undecided',
    'source',
    'sink',
    'undecided',
  ]);
});

describe('metapopulation capacity (Hanski & Ovaskainen 2000; derived for two patches)', () => {
  test('two patches: e^(−d/α) A₁A₂, shared equally', () => {
    const found = metapopulationCapacity({ areasKm2: [2, 3], reach: [1, 1 / Math.E, 1 / Math.E, 1] });
    expect(found.capacity).toBeCloseTo(6 * Math.exp(-1), 12);
    found.patchValues!.forEach((value) => expect(value).toBeCloseTo(3 * Math.exp(-1), 12));
  });

  test('values of patches sum to the capacity, and one patch alone has none', () => {
    const reach = [0, 1, 4, 1, 0, 3, 4, 3, 0].map((km) => Math.exp(-km / 2));
    const found = metapopulationCapacity({ areasKm2: [1, 2, 3], reach });
    expect(found.patchValues!.reduce((sum, value) => sum + value, 0)).toBeCloseTo(found.capacity, 12);
    expect(metapopulationCapacity({ areasKm2: [4], reach: [1] }).capacity).toBe(0);
  });
});
