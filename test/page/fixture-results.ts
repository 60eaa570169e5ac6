// Results of the fixture, worked out from the counts of the toy.
import type { Model } from '../../src/model/model.ts';
import { standingCautions } from '../../src/results/cautions.ts';
import type { Chance, PathResults, RunResults, YearSummary } from '../../src/results/results.ts';
import { wilson } from '../../src/results/wilson.ts';
import { classes, firstYear, futures, sites, steps } from './fixture-model.ts';
import { toy } from './fixture-toy.ts';

const hash = '5f0c2b7e9d41a8360b7c55e1f2a94d3386be07c19af2d64e8b1039c7ad5520ef';

export function fixturePath(model: Model): PathResults {
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

export function fixtureResults(model: Model, growth: number): RunResults {
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
  return { probability, interval: wilson(Math.round(probability * futures), futures), intervalFromUnknown: null };
}
