// The numbers of a chart at one year, as a sentence.
import type { OutcomeView, ReportView } from './contract.ts';
import { of100, whole } from './number.ts';
import { pick } from './series.ts';

export function readAbundance(view: ReportView, count: number): string {
  const { median, p25, p75, p05, p95 } = view.whole;
  const half = `half of the futures ${whole(pick(p25, count))} to ${whole(pick(p75, count))}`;
  const most = `90 of 100 ${whole(pick(p05, count))} to ${whole(pick(p95, count))}`;
  return `${pick(view.years, count)}: ${whole(pick(median, count))} ${view.animals} in the middle; ${half}; ${most}.`;
}

export function readChance(view: ReportView, outcome: OutcomeView, count: number): string {
  if (count < outcome.first) return `${pick(view.years, count)}: the start, which is not looked at.`;
  const ever = `${of100(pick(outcome.ever, count))} of 100 futures have ${outcome.words.happened} by then`;
  const band = `band ${of100(pick(outcome.lower, count))} to ${of100(pick(outcome.upper, count))}`;
  const now = `${of100(pick(outcome.now, count))} of 100 are ${outcome.words.now} in that year`;
  return `${pick(view.years, count)}: ${ever} (${band}); ${now}.`;
}

export function readPatches(view: ReportView, count: number): string {
  const all = view.patches.map((patch) => `${patch.name} ${whole(pick(patch.fan.median, count))}`);
  return `${pick(view.years, count)}, the middle of each patch: ${all.join(', ')}.`;
}
