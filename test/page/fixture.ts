// A plausible report input of eight patches, invented, without the pipeline: counts come from a small seeded toy.
import { seeded } from './random.ts';
import type { PatchRole } from '../../src/analysis/patches.ts';
import type { ReportInput } from '../../src/report/input.ts';
import type { Landscape } from '../../src/landscape/landscape.ts';
import type { Model, RateTable } from '../../src/model/model.ts';
import { standingCautions } from '../../src/results/cautions.ts';
import type { Chance, PathResults, RunResults, YearSummary } from '../../src/results/results.ts';

const firstYear = 2027;
const steps = 50;
const futures = 2000;
const classes = ['newborn', 'yearling', 'adult'];
const sites = [
  { name: 'Causeway end', at: [14.2, 3.1], capacity: 60, fileOrder: 6 },
  { name: 'Eel pond', at: [9.4, 10.8], capacity: 24, fileOrder: 4 },
  { name: 'Far bank', at: [19.6, 8.8], capacity: 34, fileOrder: 7 },
  { name: 'Harrow common', at: [6.9, 5.2], capacity: 150, fileOrder: 3 },
  { name: 'Long holm', at: [12.3, 7.1], capacity: 90, fileOrder: 1 },
  { name: 'North fen', at: [3.2, 9.1], capacity: 200, fileOrder: 0 },
  { name: 'Saltmarsh', at: [16.8, 12.2], capacity: 110, fileOrder: 2 },
  { name: 'Withy beds', at: [4.4, 2.2], capacity: 45, fileOrder: 5 },
] as const;

export interface FixtureChoice {
  /** Patch names in place of the usual ones, in the order of names. */
  readonly names?: readonly string[];
  readonly text?: string;
  readonly places?: boolean;
  readonly movement?: boolean;
  readonly pageScript?: string;
  /** Multiplies the growth of every patch. */
  readonly growth?: number;
}

export function fixture(choice: FixtureChoice = {}): ReportInput {
  const model = fixtureModel(choice);
  const input = {
    model,
    landscape: fixtureLandscape(),
    results: fixtureResults(model, choice.growth ?? 1),
    specText: choice.text ?? 'skein: 1\nstudy:\n  title: Reed hare on the Harrow Levels\n',
    commandLine: 'skein report reed-hare.yaml -o report.html',
    pageScript: choice.pageScript ?? '',
    coefficients: [],
    patchValues: { value: { growthRate: 1.01, patches: worths } },
  };
  return choice.movement === false ? input : { ...input, path: fixturePath(model) };
}

/** In the order of the sites; made up like all else. */
const worths: readonly PatchRole[] = [0.97, 1, 0.94, 1.04, 1.03, 1.06, 1.01, 0.99].map((contribution) => ({
  growthAlone: contribution - 0.08,
  contribution,
  selfRecruitment: contribution - 0.1,
  role: contribution === 1 ? 'undecided' : contribution > 1 ? 'source' : 'sink',
}));

function same(row: readonly number[]): RateTable {
  return { epochs: [Float64Array.from(sites.flatMap(() => row))], epochOf: new Int32Array(0) };
}

function fixtureModel(choice: FixtureChoice): Model {
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

function fixtureLandscape(): Landscape {
  const km = (a: number, b: number) => Math.hypot(sites[a]!.at[0] - sites[b]!.at[0], sites[a]!.at[1] - sites[b]!.at[1]);
  const [start, destinations, chance, lengthKm] = [[0], [] as number[], [] as number[], [] as number[]];
  sites.forEach((_, from) => {
    const reached = sites.map((_, p) => p).filter((p) => p !== from && km(from, p) < 9);
    const weight = reached.map((p) => Math.sqrt(sites[p]!.capacity) * Math.exp(-km(from, p) / 2));
    const total = weight.reduce((a, b) => a + b, 0);
    reached.forEach((p, k) => {
      destinations.push(p);
      lengthKm.push(km(from, p));
      chance.push((weight[k]! / total) * Math.exp(-0.03 * km(from, p)));
    });
    start.push(destinations.length);
  });
  const movement = {
    start: Int32Array.from(start),
    destinations: Int32Array.from(destinations),
    chance: Float64Array.from(chance),
    lengthKm: Float64Array.from(lengthKm),
  };
  return { movements: [null, null, movement, null, null] };
}

function fixturePath(model: Model): PathResults {
  const abundance = Array.from({ length: steps + 1 }, (_, t) =>
    model.patches.flatMap((patch) =>
      classes.map((name, c) => ({
        year: firstYear - 1 + t,
        patch: patch.name,
        class: name,
        animals: [0, 0.4, 0.6][c]! * 10,
      })),
    ),
  ).flat();
  const tool = { name: 'skein', version: '0.1.0', kernel: '1' } as const;
  const growth = { withoutChance: 1.1, withChance: null, reason: 'Nothing varies.' };
  return {
    format: 'skein-path/1',
    tool,
    model: model.title,
    hash,
    years: steps,
    firstYear,
    abundance,
    growth,
    cautions: [],
  };
}

const hash = '5f0c2b7e9d41a8360b7c55e1f2a94d3386be07c19af2d64e8b1039c7ad5520ef';

function fixtureResults(model: Model, growth: number): RunResults {
  const counts = toy(growth);
  const patchSeries = sites.map((_, p) => summaries((r, t) => counts[r]![t]![p]!));
  const total = (r: number, t: number) => counts[r]![t]!.reduce((a, b) => a + b, 0);
  const lowest = counts.map((_, r) => Math.min(...Array.from({ length: steps + 1 }, (_, t) => total(r, t))));
  const mean = lowest.reduce((a, b) => a + b, 0) / futures;
  const sd = Math.sqrt(lowest.reduce((a, b) => a + (b - mean) ** 2, 0) / (futures - 1));
  return {
    format: 'skein-run/1',
    tool: { name: 'skein', version: '0.1.0', kernel: '1' },
    model: model.title,
    hash,
    seed: 2026,
    replicates: futures,
    years: steps,
    firstYear,
    abundance: {
      whole: summaries(total),
      patches: model.patches.map((patch, p) => ({
        patch: patch.name,
        byYear: patchSeries[p]!,
        empty: patchSeries[p]!.map((_, t) => counts.filter((one) => one[t]![p] === 0).length / futures),
      })),
    },
    outcomes: [
      outcome(model, 0, (r, t) => Math.round(0.6 * total(r, t))),
      outcome(model, 1, (r, t) => counts[r]![t]![5]!),
    ],
    handled: [],
    meanLowestCount: { mean, sd, standardError: sd / Math.sqrt(futures) },
    patchesInUse: summaries((r, t) => counts[r]![t]!.filter((n) => n > 0).length),
    sketched: [],
    stopped: { runs: 0, reasons: [] },
    cautions: standingCautions(model),
  };
}

/** Counts by run, count and patch. */
function toy(growth: number): number[][][] {
  const next = seeded(7);
  const noise = () => (next() + next() + next() + next() - 2) * 0.62;
  return Array.from({ length: futures }, () => {
    let state = sites.map((site) => Math.round(site.capacity * 0.52));
    const path = [state];
    for (let t = 0; t < steps; t++) {
      const common = noise();
      const total = state.reduce((a, b) => a + b, 0);
      state = state.map((n, p) => {
        const crowd = 1.24 / (1 + 0.3 * (n / sites[p]!.capacity));
        const kept = n * crowd * growth * Math.exp(0.6 * common + 0.4 * noise() - 0.08) * 0.94;
        return Math.floor(kept + 0.006 * total * Math.sqrt(sites[p]!.capacity / 100) + next() * 0.98);
      });
      path.push(state);
    }
    return path;
  });
}

function summaries(value: (r: number, t: number) => number): YearSummary[] {
  return Array.from({ length: steps + 1 }, (_, t) => {
    const all = Array.from({ length: futures }, (_, r) => value(r, t)).sort((a, b) => a - b);
    const mean = all.reduce((a, b) => a + b, 0) / futures;
    const sd = Math.sqrt(all.reduce((a, b) => a + (b - mean) ** 2, 0) / futures);
    const at = (level: number) => all[Math.floor(level * (futures - 1))]!;
    const quantiles = { '0.05': at(0.05), '0.25': at(0.25), '0.5': at(0.5), '0.75': at(0.75), '0.95': at(0.95) };
    return { year: firstYear - 1 + t, mean, sd, quantiles };
  });
}

function outcome(model: Model, k: number, value: (r: number, t: number) => number): RunResults['outcomes'][number] {
  const rule = model.outcomes[k]!;
  const come = new Float64Array(steps + 1);
  const now = new Float64Array(steps + 1);
  for (let r = 0; r < futures; r++) {
    let fallen = false;
    for (let t = 1; t <= steps; t++) {
      const below = rule.event.is === 'below' && value(r, t) < rule.event.than;
      fallen ||= below;
      come[t] = come[t]! + (fallen ? 1 / futures : 0);
      now[t] = now[t]! + (below ? 1 / futures : 0);
    }
  }
  const counts = Array.from(come, (ever, t) => ({
    year: firstYear - 1 + t,
    ever,
    lower: Math.max(0, ever - 0.0304),
    upper: Math.min(1, ever + 0.0304),
    now: now[t]!,
  }));
  const byYear = counts.slice(1);
  const { name, definition, event, counts: asked, words } = rule;
  const quantiles = { '0.05': firstYear + 9, '0.25': null, '0.5': null, '0.75': null, '0.95': null };
  const whenFirst = { quantiles, meanYears: 12 };
  const told = { name, definition, event, counts: asked, words };
  return { ...told, ever: chance(come[steps]!), atEnd: chance(now[steps]!), whenFirst, byYear };
}

function chance(probability: number): Chance {
  const z = 1.959964;
  const middle = (probability + (z * z) / (2 * futures)) / (1 + (z * z) / futures);
  const half =
    (z * Math.sqrt((probability * (1 - probability)) / futures + (z * z) / (4 * futures ** 2))) /
    (1 + (z * z) / futures);
  const interval = {
    lower: Math.max(0, middle - half),
    upper: middle + half,
    level: 0.95,
    method: 'Wilson',
    from: 'the number of runs',
  } as const;
  return { probability, interval, intervalFromUnknown: null };
}
