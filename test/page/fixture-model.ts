// The model of the fixture: eight patches of a hare, invented.
import type { Model, RateTable } from '../../src/model/model.ts';

export const firstYear = 2027;
export const steps = 50;
export const futures = 2000;
export const classes = ['newborn', 'yearling', 'adult'];
export const sites = [
  { name: 'Causeway end', at: [14.2, 3.1], capacity: 60, fileOrder: 6 },
  { name: 'Eel pond', at: [9.4, 10.8], capacity: 24, fileOrder: 4 },
  { name: 'Far bank', at: [19.6, 8.8], capacity: 34, fileOrder: 7 },
  { name: 'Harrow common', at: [6.9, 5.2], capacity: 150, fileOrder: 3 },
  { name: 'Long holm', at: [12.3, 7.1], capacity: 90, fileOrder: 1 },
  { name: 'North fen', at: [3.2, 9.1], capacity: 200, fileOrder: 0 },
  { name: 'Saltmarsh', at: [16.8, 12.2], capacity: 110, fileOrder: 2 },
  { name: 'Withy beds', at: [4.4, 2.2], capacity: 45, fileOrder: 5 },
] as const;

export interface ModelChoice {
  /** Patch names in place of the usual ones, in the order of names. */
  readonly names?: readonly string[];
  readonly text?: string;
  readonly places?: boolean;
}

function same(row: readonly number[]): RateTable {
  return { epochs: [Float64Array.from(sites.flatMap(() => row))], epochOf: new Int32Array(0) };
}

export function fixtureModel(choice: ModelChoice): Model {
  const text = (usual: string) => choice.text ?? usual;
  return {
    title: text('Reed hare on the Harrow Levels'),
    question: text('Does the reed hare last on the Harrow Levels for fifty years if nothing is done?'),
    by: text('Fen office'),
    madeFor: text('Levels Drainage Board'),
    date: '2026-11-20',
    status: 'draft',
    invented: true,
    firstYear,
    steps,
    counts: 'females',
    oldest: 'open-ended',
    patches: sites.map((site, p) => ({
      name: choice.names?.[p] ?? site.name,
      at: choice.places === false ? null : site.at,
      areaKm2: site.capacity / 180,
      capacity: site.capacity,
      fileOrder: site.fileOrder,
    })),
    classes,
    parameters: [
      {
        name: 'adult_survival',
        value: 0.74,
        expression: '0.74',
        source: text('radio-tracking 2019-2024, 61 hares'),
        basis: 'measured here',
      },
      { name: 'litter', value: 1.9, expression: '1.9', source: text('three fens, 2021'), basis: 'measured elsewhere' },
      { name: 'natal_leaving', value: 0.22, expression: '0.22', source: null, basis: 'assumed' },
      { name: 'yearling_births', value: 0.76, expression: '0.4 * litter', source: null, basis: null },
    ],
    phases: [
      { name: 'breeding', kind: 'breeding', births: same([0, 0.76, 1.9]), into: Float64Array.of(1, 0, 0) },
      { name: 'survival', kind: 'survival', survival: same([0.38, 0.62, 0.74]) },
      {
        name: 'natal',
        kind: 'dispersal',
        moves: Uint8Array.of(1, 0, 0),
        leaving: same([0.22, 0, 0]),
        rule: {
          by: 'kernel',
          kernel: { shape: 'exponential', scaleKm: 2, shapeNumber: 1, reachKm: 15 },
          attraction: Float64Array.from(sites, (site) => Math.sqrt(site.capacity)),
          leavers: 'all arrive',
          hazardPerKm: 0.03,
          survivalOnTheWay: 1,
        },
      },
      { name: 'ageing', kind: 'ageing', advance: Float64Array.of(1, 1, 0), next: Int32Array.of(1, 2, 2) },
      { name: 'count', kind: 'count' },
    ],
    year: ['count', 'breeding', 'survival', 'natal', 'ageing'],
    variation: null,
    catastrophes: [],
    uncertainty: null,
    draws: 0,
    crowding: [],
    start: { by: 'total', total: 420, spread: 'stable within patch' },
    outcomes: [
      {
        name: text('few hares'),
        weights: [Float64Array.of(0, 0, 1)],
        patches: new Uint8Array(8).fill(1),
        over: 'sum',
        event: { is: 'below', than: 40 },
        counts: 1,
        words: { happened: 'fallen below', now: 'below' },
        definition: definitions[0],
      },
      {
        name: text('north empty'),
        weights: [Float64Array.of(0, 1, 1)],
        patches: Uint8Array.of(0, 0, 0, 0, 0, 1, 0, 0),
        over: 'sum',
        event: { is: 'below', than: 5 },
        counts: 1,
        words: { happened: 'fallen below', now: 'below' },
        definition: definitions[1],
      },
    ],
    replicates: futures,
    seed: 2026,
    defaults: ['distance is straight', 'a step is one year'],
  };
}

const definitions = [
  'fewer than 40 adult in all patches together, at any yearly count',
  'fewer than 5 yearling and adult in North fen, at any yearly count',
] as const;
