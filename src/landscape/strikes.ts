// Catastrophes in the landscape: which patches each reaches, and how often it is on in each of them in the long run.
import type { Catastrophe } from '../model/chance.ts';
import type { Model } from '../model/model.ts';
import { distanceKm } from './distance.ts';

/** In the order of the catastrophes of the model. */
export interface Strike {
  /** Patches reached from origin i: patches[start[i]] to patches[start[i + 1]]; null where all are. */
  readonly reach: { readonly start: Int32Array; readonly patches: Int32Array } | null;
  /** By patch, the share of years in which one begins that reaches it, in which one is on, and in which capacity is lowered. */
  readonly begins: Float64Array;
  readonly on: Float64Array;
  readonly lowered: Float64Array;
}

export function strikesOf(model: Model): readonly Strike[] {
  return model.catastrophes.map((one) => {
    const reach = reachOf(model, one);
    const counts = originsReaching(model, one, reach);
    const share = (perOrigin: number): Float64Array => counts.map((origins) => struck(one, perOrigin, origins));
    return {
      reach,
      begins: share(beginsEachYear(one)),
      on: share(yearsOn(one)),
      lowered: counts.map((origins) => loweredShare(one, origins)),
    };
  });
}

/** A wait w and a chance q: one beginning in w − 1 + 1/q years. */
function beginsEachYear({ chance, wait }: Catastrophe): number {
  return chance === 0 ? 0 : 1 / (wait - 1 + 1 / chance);
}

/** Share of the years in which it is on: it lasts no longer than the wait. */
function yearsOn(one: Catastrophe): number {
  return beginsEachYear(one) * one.lasts;
}

/** Share of the years in which one has reached a patch that so many origins reach, within the years that capacity stays low. */
function loweredShare(one: Catastrophe, reaching: number): number {
  const { over, origins, capacity } = one;
  if (capacity === null || origins.length === 0) return 0;
  if (over === 'landscape') return 1 - spared(one, reaching / origins.length, capacity.steps);
  let apart = 1;
  for (let i = 0; i < reaching; i++) apart *= spared(one, 1, capacity.steps);
  return 1 - apart;
}

/**
 * Chance that in so many years none begins that reaches a patch, each doing so with the chance `reaches`. The state is how many
 * years ago the last began, up to the wait: 1/(w − 1 + 1/q) for each below the wait, in the long run.
 */
function spared(one: Catastrophe, reaches: number, years: number): number {
  const { chance, wait } = one;
  const begins = beginsEachYear(one);
  let states = new Float64Array(wait).fill(begins);
  states[wait - 1] = 1 - (wait - 1) * begins;
  for (let year = 0; year < years; year++) {
    const next = new Float64Array(wait);
    states.forEach((share, age) => {
      const ready = age === wait - 1;
      next[Math.min(age + 1, wait - 1)] = (next[Math.min(age + 1, wait - 1)] ?? 0) + share * (ready ? 1 - chance : 1);
      if (ready) next[0] = (next[0] ?? 0) + share * chance * (1 - reaches);
    });
    states = next;
  }
  return states.reduce((sum, share) => sum + share, 0);
}

function struck({ over, origins }: Catastrophe, perOrigin: number, reaching: number): number {
  if (over === 'landscape') return origins.length === 0 ? 0 : (perOrigin * reaching) / origins.length;
  let spared = 1;
  for (let i = 0; i < reaching; i++) spared *= 1 - perOrigin;
  return 1 - spared;
}

function reachOf({ patches }: Model, { origins, reach }: Catastrophe): Strike['reach'] {
  if (reach === 'everywhere') return null;
  const lists = origins.map((origin) =>
    patches.flatMap((patch, p) => {
      const from = patches[origin];
      if (p === origin) return [p];
      return reach !== 'one patch' && from !== undefined && distanceKm(from, patch) <= reach.radiusKm ? [p] : [];
    }),
  );
  const start = [0];
  for (const list of lists) start.push((start.at(-1) ?? 0) + list.length);
  return { start: Int32Array.from(start), patches: Int32Array.from(lists.flat()) };
}

function originsReaching({ patches }: Model, { origins }: Catastrophe, reach: Strike['reach']): Float64Array {
  const counts = new Float64Array(patches.length);
  if (reach === null) return counts.fill(origins.length);
  for (const p of reach.patches) counts[p] = (counts[p] ?? 0) + 1;
  return counts;
}
