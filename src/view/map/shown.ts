// What each patch shows at a choice of the switch: a step on the ramp, and a number or word that says the same.
import type { MapState, PatchView, ReportView } from '../contract.ts';
import { decimal, of100 } from '../number.ts';
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
  }
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

function fullness({ fan, capacity }: PatchView, count: number): number {
  return Math.min(1, pick(fan.median, count) / Math.max(capacity ?? largest(fan.p95), 1e-9));
}

/** The ends of the ramp, in steps of 0.05 around all contributions. */
export function contributionRange({ patches }: ReportView): { readonly low: number; readonly high: number } {
  const all = patches.flatMap(({ worth }) => (worth === null ? [] : [worth.contribution]));
  const low = Math.floor(Math.min(...all) * 20 + 1e-9) / 20;
  const high = Math.ceil(Math.max(...all) * 20 - 1e-9) / 20;
  return all.length === 0 ? { low: 0, high: 1 } : { low, high: Math.max(high, low + 0.05) };
}
