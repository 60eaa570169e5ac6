// The movement that the map shows, against numbers worked out by hand ('derived').
import { describe, expect, it } from 'vitest';
import type { ReportInput } from '../../src/report/input.ts';
import { estimateMovement } from '../../src/report/movement.ts';
import type { Crowding, Model, Phase, RateTable } from '../../src/model/model.ts';
import { fixture } from '../page/fixture.ts';

const classes = ['young', 'adult'];
const rates = (...values: number[]): RateTable => ({ epochs: [Float64Array.from(values)], epochOf: new Int32Array(0) });

const natal: Phase = {
  name: 'natal',
  kind: 'dispersal',
  moves: Uint8Array.of(1, 0),
  leaving: rates(0.5, 0, 0.25, 0),
  rule: { by: 'shares', shares: new Float64Array(4) },
};
const breeding: Phase = { name: 'breeding', kind: 'breeding', births: rates(0, 2, 0, 2), into: Float64Array.of(1, 0) };
const survival: Phase = { name: 'survival', kind: 'survival', survival: rates(0.5, 1, 0.5, 1) };

const crowding: Crowding = {
  name: 'crowding',
  form: 'beverton-holt',
  counted: Float64Array.of(0, 1),
  changes: [{ phase: 1, part: 'survival', classes: Uint8Array.of(1, 0) }],
  capacity: Float64Array.of(50, 50),
  alleeHalf: new Float64Array(2),
  whereDeclining: null,
};

/** Two patches with 30 and 10 animals at each of two counts, three quarters of them adult. */
function input(phases: readonly Phase[], crowding: readonly Crowding[] = []): ReportInput {
  const base = fixture();
  const years = [2026, 2027];
  const model: Model = {
    ...base.model,
    classes,
    patches: base.model.patches.slice(0, 2).map((patch, p) => ({ ...patch, name: ['a', 'b'][p]!, fileOrder: p })),
    phases,
    crowding,
  };
  const quantiles = { '0.05': 0, '0.25': 0, '0.5': 0, '0.75': 0, '0.95': 0 };
  const by = (mean: number) => years.map((year) => ({ year, mean, sd: 0, quantiles }));
  const abundance = {
    whole: by(40),
    patches: [
      { patch: 'a', byYear: by(30) },
      { patch: 'b', byYear: by(10) },
    ],
  };
  const path = years.flatMap((year) =>
    ['a', 'b'].flatMap((patch) => classes.map((name, c) => ({ year, patch, class: name, animals: [1, 3][c]! }))),
  );
  const movement = {
    start: Int32Array.of(0, 1, 2),
    destinations: Int32Array.of(1, 0),
    chance: Float64Array.of(0.8, 1),
    lengthKm: null,
  };
  return {
    ...base,
    model,
    landscape: { movements: phases.map((phase) => (phase.kind === 'dispersal' ? movement : null)) },
    results: { ...base.results, abundance },
    path: { ...base.path!, abundance: path },
  };
}

describe('movement from mean abundance', () => {
  it('is leavers of the moving class times the chance to arrive', () => {
    const flows = estimateMovement(input([natal]))!;
    // a: 30 animals, a quarter young, half of them leave, 0.8 arrive: 3. b: 10 × 0.25 × 0.25 × 1 = 0.625.
    expect(flows.map((flow) => [flow.from, flow.to, ...flow.animals])).toEqual([
      [0, 1, 0, 3],
      [1, 0, 0, 0.625],
    ]);
  });

  it('counts the young that the year has brought before they leave', () => {
    const flows = estimateMovement(input([breeding, survival, natal]))!;
    // a: young 7.5 + 22.5 × 2 = 52.5, half survive 26.25, half leave, 0.8 arrive.
    expect(flows[0]?.animals[1]).toBeCloseTo(52.5 * 0.5 * 0.5 * 0.8, 12);
  });

  it('is lowered by crowding as the model says', () => {
    const coefficients = [
      {
        form: ['beverton-holt', 'none'],
        coefficient: Float64Array.of(0.02, 0),
        alleeHalf: new Float64Array(2),
      } as const,
    ];
    const flows = estimateMovement({ ...input([breeding, survival, natal], [crowding]), coefficients })!;
    expect(flows[0]?.animals[1]).toBeCloseTo((52.5 * 0.5 * 0.5 * 0.8) / (1 + 0.02 * 22.5), 12);
    expect(flows[1]?.animals[1]).toBeCloseTo((2.5 + 15) * 0.5 * 0.25, 12);
  });

  it('is not guessed without the path, or without the coefficients of a model with crowding', () => {
    const { path, ...without } = input([natal]);
    expect(path).toBeDefined();
    expect(estimateMovement(without)).toBeNull();
    expect(estimateMovement(input([breeding, survival, natal], [crowding]))).toBeNull();
  });
});
