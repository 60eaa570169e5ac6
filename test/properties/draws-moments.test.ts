// Each phase from a fixed state of whole animals: means and all covariances of the draws against exact ones (derived).
import { describe, expect, it } from 'vitest';
import type { CrowdingCoefficients } from '../../src/compile/coefficients.ts';
import type { Crowding, Phase } from '../../src/model/model.ts';
import { everywhere, movement, type Sketch, table } from '../kernel/models.ts';
import { addMultinomial, expectMoments, sampleStates, zeros } from '../kernel/moments.ts';

const replicates = 24_000;
const patches = ['east', 'north', 'west'];
const classes = ['young', 'adult'];
const start = [7, 20, 90, 3, 0, 300];
const base = { patches, classes, start };

const diagonal = (values: readonly number[]) => values.map((v, i) => values.map((_, j) => (i === j ? v : 0)));

describe('survival', () => {
  const rates = [0.2, 0.9, 0.55, 1, 0.5, 0.97];
  const phases: Phase[] = [{ kind: 'survival', name: 'survival', survival: table(rates) }];

  it('draws each class in each patch apart, binomially', () => {
    const variances = start.map((n, i) => n * rates[i]! * (1 - rates[i]!));
    expectMoments(
      sampleStates({ ...base, phases }, replicates),
      start.map((n, i) => n * rates[i]!),
      diagonal(variances),
    );
  });
});

describe('breeding', () => {
  const births = [0, 0.7, 0.1, 2.5, 0, 1.4];
  const into = [0.55, 0.45];
  const phases: Phase[] = [
    { kind: 'breeding', name: 'breeding', births: table(births), into: Float64Array.from(into) },
  ];

  it('adds independent Poisson young to each class that they enter', () => {
    const young = [0, 2, 4].map((i) => start[i]! * births[i]! + start[i + 1]! * births[i + 1]!);
    const expected = start.map((_, i) => young[i >> 1]! * into[i & 1]!);
    expectMoments(
      sampleStates({ ...base, phases }, replicates),
      start.map((n, i) => n + expected[i]!),
      diagonal(expected),
    );
  });

  it('counts only those that survived where it comes after survival', () => {
    const alive: Phase = { kind: 'survival', name: 'survival', survival: everywhere(1, [1, 0.6]) };
    const bred: Phase = {
      kind: 'breeding',
      name: 'breeding',
      births: everywhere(1, [0, 1.5]),
      into: Float64Array.of(1, 0),
    };
    const sketch: Sketch = { patches: ['east'], classes, start: [0, 40], phases: [alive, bred] };
    // Var(young) = m n s + m² n s (1 − s); Cov(young, adults) = m n s (1 − s).
    const [survivors, spread] = [40 * 0.6, 40 * 0.6 * 0.4];
    expectMoments(
      sampleStates(sketch, replicates),
      [1.5 * survivors, survivors],
      [
        [1.5 * survivors + 2.25 * spread, 1.5 * spread],
        [1.5 * spread, spread],
      ],
    );
  });
});

describe('ageing', () => {
  it('moves a share on, all at once, and lets the oldest leave where they have no next class', () => {
    const phases: Phase[] = [
      { kind: 'ageing', name: 'ageing', advance: Float64Array.of(1, 0.3, 0.8), next: Int32Array.of(1, 2, -1) },
    ];
    const sketch: Sketch = { patches: ['east'], classes: ['a', 'b', 'c'], start: [11, 50, 30], phases };
    const covariances = zeros(3);
    addMultinomial(covariances, 50, new Map([[1, 0.7], [2, 0.3]])); // prettier-ignore
    addMultinomial(covariances, 30, new Map([[2, 0.2]]));
    expectMoments(sampleStates(sketch, replicates), [0, 11 + 35, 15 + 6], covariances);
  });
});

describe('demography', () => {
  const fates = [0.3, 0.05, 0.2, 0.5, 0.9, 0.1, 0, 0, 0.6];
  const births = [0, 0.4, 2, 0, 0, 0.3, 0, 0, 0];
  const phases: Phase[] = [{ kind: 'demography', name: 'life', fates: table(fates), births: table(births) }];
  const sketch: Sketch = { patches: ['east'], classes: ['a', 'b', 'c'], start: [30, 80, 140], phases };

  it('draws one fate for each animal and Poisson births for each entry, from the state before', () => {
    const means = [0, 0, 0];
    const covariances = zeros(3);
    sketch.start.forEach((n, from) => {
      const column = [0, 1, 2].map((to) => fates[to * 3 + from]!);
      addMultinomial(covariances, n, new Map(column.entries()));
      for (let to = 0; to < 3; to++) {
        means[to]! += n * (column[to]! + births[to * 3 + from]!);
        covariances[to]![to]! += n * births[to * 3 + from]!;
      }
    });
    expectMoments(sampleStates(sketch, replicates), means, covariances);
  });
});

describe('dispersal', () => {
  const leaving = [0.5, 0.2, 0.9, 0, 0, 0.35];
  const ways = [[0, 1, 0.5], [0, 2, 0.3], [1, 0, 1], [2, 0, 0.2], [2, 1, 0.7]] as const; // prettier-ignore
  const phases: Phase[] = [
    {
      kind: 'dispersal',
      name: 'natal',
      moves: Uint8Array.of(1, 1),
      leaving: table(leaving),
      rule: { by: 'shares', shares: new Float64Array(9) },
    },
  ];
  const sketch: Sketch = { ...base, phases, movements: [movement(3, ways), null] };

  it.each([
    { animals: 'few', scale: 1 },
    { animals: 'many', scale: 9 },
  ])('gives each of $animals animals one fate: stay, a destination, or death on the way', ({ scale }) => {
    const before = start.map((n) => n * scale);
    const means = before.map(() => 0);
    const covariances = zeros(6);
    before.forEach((n, cell) => {
      const [from, c] = [cell >> 1, cell & 1];
      const fates = new Map([[cell, 1 - leaving[cell]!]]);
      for (const [origin, to, chance] of ways) if (origin === from) fates.set(to * 2 + c, leaving[cell]! * chance);
      for (const [to, chance] of fates) means[to]! += n * chance;
      addMultinomial(covariances, n, fates);
    });
    expectMoments(sampleStates({ ...sketch, start: before }, replicates), means, covariances);
  });

  it('lets all that leave die where no way leads out', () => {
    const lost: Sketch = { ...sketch, start: [0, 50, 0, 0, 0, 0], movements: [movement(3, []), null] };
    const covariances = zeros(6);
    covariances[1]![1] = 50 * 0.2 * 0.8;
    expectMoments(sampleStates(lost, replicates), [0, 40, 0, 0, 0, 0], covariances);
  });
});

describe('a ceiling', () => {
  it('removes the surplus at random, without replacement, and holds a fraction of an animal by chance', () => {
    const phases: Phase[] = [
      { kind: 'ceiling', name: 'room', counted: Uint8Array.of(1, 1, 0), capacity: Float64Array.of(25.25) },
    ];
    const sketch: Sketch = { patches: ['east'], classes: ['a', 'b', 'c'], start: [30, 12, 100], phases };
    const [all, capacity, counts] = [42, 25.25, [30, 12]];
    const covariances = zeros(3);
    for (const i of [0, 1]) {
      for (const j of [0, 1]) {
        const [p, q] = [counts[i]! / all, counts[j]! / all];
        for (const [k, weight] of [
          [25, 0.75],
          [26, 0.25],
        ] as const) {
          covariances[i]![j]! += weight * k * (i === j ? p * (1 - p) : -p * q) * ((all - k) / (all - 1));
        }
        covariances[i]![j]! += p * q * 0.25 * 0.75;
      }
    }
    const states = sampleStates(sketch, replicates);
    expectMoments(states, [(30 * capacity) / all, (12 * capacity) / all, 100], covariances);
  });

  it('touches nothing where there is room', () => {
    const phases: Phase[] = [
      { kind: 'ceiling', name: 'room', counted: Uint8Array.of(1, 1), capacity: Float64Array.of(27, 500.5, 300) },
    ];
    expectMoments(sampleStates({ ...base, phases }, 64), start, zeros(6));
  });
});

describe('crowding', () => {
  const crowding = (form: 'ricker' | 'beverton-holt', alleeHalf: number): readonly [Crowding, CrowdingCoefficients] => [
    {
      name: 'crowding',
      form,
      counted: Float64Array.of(0.5, 1),
      changes: [
        { phase: 0, part: 'survival', classes: Uint8Array.of(1, 0) },
        { phase: 1, part: 'births', classes: Uint8Array.of(1, 1) },
      ],
      capacity: new Float64Array(1),
      alleeHalf: Float64Array.of(alleeHalf),
      whereDeclining: null,
    },
    { form: [form], coefficient: Float64Array.of(0.02), alleeHalf: Float64Array.of(alleeHalf) },
  ];
  const phases: Phase[] = [
    { kind: 'survival', name: 'survival', survival: everywhere(1, [0.9, 0.8]) },
    { kind: 'breeding', name: 'breeding', births: everywhere(1, [0, 1.5]), into: Float64Array.of(1, 0) },
  ];

  it.each([
    { form: 'ricker' as const, half: 0, factor: Math.exp(-0.02 * 50) },
    { form: 'beverton-holt' as const, half: 10, factor: (1 / 2) * (50 / 60) },
  ])(
    'scales each named rate once, by the count before the first phase that it changes: $form',
    ({ form, half, factor }) => {
      const [condition, coefficients] = crowding(form, half);
      const sketch = {
        patches: ['east'],
        classes,
        start: [20, 40],
        phases,
        crowding: [condition],
        coefficients: [coefficients],
      };
      const [young, adults, births] = [20 * 0.9 * factor, 40 * 0.8, 1.5 * factor];
      const spread = 40 * 0.8 * 0.2;
      expectMoments(
        sampleStates(sketch, replicates),
        [young + births * adults, adults],
        [
          [young * (1 - 0.9 * factor) + births * adults + births * births * spread, births * spread],
          [births * spread, spread],
        ],
      );
    },
  );

  it('scales the fates of a whole-year matrix', () => {
    const life: Phase = {
      kind: 'demography',
      name: 'life',
      fates: table([0.2, 0, 0.5, 0.8]),
      births: table([0, 0, 0, 0]),
    };
    const [condition, coefficients] = crowding('ricker', 0);
    const changes = [{ phase: 0, part: 'fates' as const, classes: Uint8Array.of(1, 0) }];
    const sketch = {
      patches: ['east'],
      classes,
      start: [20, 40],
      phases: [life],
      crowding: [{ ...condition, changes }],
      coefficients: [coefficients],
    };
    const g = Math.exp(-1);
    const covariances = zeros(2);
    addMultinomial(covariances, 20, new Map([[0, 0.2 * g], [1, 0.5 * g]])); // prettier-ignore
    addMultinomial(covariances, 40, new Map([[1, 0.8]]));
    expectMoments(sampleStates(sketch, replicates), [4 * g, 10 * g + 32], covariances);
  });
});

describe('the moments test', () => {
  it('can fail', () => {
    const phases: Phase[] = [{ kind: 'survival', name: 'survival', survival: everywhere(1, [0.5]) }];
    const states = sampleStates({ patches: ['east'], classes: ['a'], start: [40], phases }, replicates);
    expect(() => expectMoments(states, [20.4], [[10]])).toThrow(/mean/);
    expect(() => expectMoments(states, [20], [[11.5]])).toThrow(/covariance/);
  });
});
