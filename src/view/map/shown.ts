// What each patch shows at a choice of the switch: a step on the ramp, and a number or word that says the same.
import type { MapState, PatchView, ReportView } from '../contract.ts';
import { decimal, of100, plain, roundUp } from '../number.ts';
import { largest, pick } from '../series.ts';

export interface Shown {
  /** 0 to 1 on the ramp; null where the ground stays white. */
  readonly share: number | null;
  /** Empty where dots or the ramp alone tell it. */
  readonly text: string;
}

export function shownIn(view: ReportView, state: MapState, p: number): Shown {
  const patch = pick(view.patches, p);
  const { empty, worth } = patch;
  switch (state.show) {
    case 'abundance':
      return { share: fullness(patch, state.count), text: '' };
    case 'empty':
      return empty === null ? unknown : { share: pick(empty, state.count), text: briefly(pick(empty, state.count)) };
    case 'contribution':
      return worth === null ? unknown : contribution(view, worth.contribution);
    case 'role':
      return worth === null ? unknown : { share: null, text: worth.role };
    case 'difference': {
      const more = differenceOf(view, state.count, p);
      return { share: Math.abs(more) / mostDifferent(view, state.count), text: signed(more) };
    }
  }
}

/** Mean animals at a count, more or fewer than under the view that is taken away; a patch that is not there has none. */
export function differenceOf({ patches, minus }: ReportView, count: number, p: number): number {
  const patch = pick(patches, p);
  const before = minus?.view.patches.find(({ name }) => name === patch.name);
  return pick(patch.fan.mean, count) - (before === undefined ? 0 : pick(before.fan.mean, count));
}

/** The end of the ramp, at least one animal. */
export function mostDifferent(view: ReportView, count: number): number {
  return roundUp(Math.max(1, ...view.patches.map((_, p) => Math.abs(differenceOf(view, count, p)))));
}

function signed(more: number): string {
  const size = Math.abs(more) < 0.05 ? '0' : Math.abs(more) < 9.95 ? Math.abs(more).toFixed(1) : plain(Math.abs(more));
  return size === '0' ? size : `${more < 0 ? '−' : '+'}${size}`;
}

const unknown: Shown = { share: null, text: 'not known' };

function contribution(view: ReportView, value: number): Shown {
  const { low, high } = contributionRange(view);
  return { share: (value - low) / (high - low), text: decimal(value, 2) };
}

/** Of 100, short enough for a circle. */
function briefly(chance: number): string {
  const futures = of100(chance);
  return { none: '0', all: '100', 'fewer than 1': '<1', 'more than 99': '>99' }[futures] ?? futures;
}

function fullness(patch: PatchView, count: number): number {
  return Math.min(1, pick(patch.fan.median, count) / fullAt(patch));
}

/** The same in every year. */
const full = new WeakMap<PatchView, number>();

function fullAt(patch: PatchView): number {
  const known = full.get(patch) ?? Math.max(patch.capacity ?? largest(patch.fan.p95), 1e-9);
  full.set(patch, known);
  return known;
}

/** The ends of the ramp, in steps of 0.05 around all contributions. */
export function contributionRange({ patches }: ReportView): { readonly low: number; readonly high: number } {
  const all = patches.flatMap(({ worth }) => (worth === null ? [] : [worth.contribution]));
  const low = Math.floor(Math.min(...all) * 20 + 1e-9) / 20;
  const high = Math.ceil(Math.max(...all) * 20 - 1e-9) / 20;
  return all.length === 0 ? { low: 0, high: 1 } : { low, high: Math.max(high, low + 0.05) };
}
