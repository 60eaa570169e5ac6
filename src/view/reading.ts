// The numbers of a chart at one year, as a sentence.
import type { Fan, ObservedView, OutcomeView, ReportView } from './contract.ts';
import { of100, whole } from './number.ts';
import { pick } from './series.ts';

export function readAbundance(view: ReportView, count: number): string {
  return readFan(view, view.whole, view.animals, count);
}

function readFan({ years }: ReportView, { median, p25, p75, p05, p95 }: Fan, what: string, count: number): string {
  const half = `half of the futures ${whole(pick(p25, count))} to ${whole(pick(p75, count))}`;
  const most = `90 of 100 ${whole(pick(p05, count))} to ${whole(pick(p95, count))}`;
  return `${pick(years, count)}: ${whole(pick(median, count))} ${what} in the middle; ${half}; ${most}.`;
}

/** Of the counted classes in the counted patches; what was counted that year behind it. */
export function readObserved(view: ReportView, { together, classes }: ObservedView, count: number): string {
  const counted = together.counts.find(({ year }) => year === pick(view.years, count));
  const said = counted === undefined ? '' : ` Counted: ${whole(counted.animals)}.`;
  return `${readFan(view, together.fan, classes, count)}${said}`;
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

/** The chance of one outcome under every plan. */
export function readPlans(view: ReportView, outcome: number, count: number): string {
  const plans = view.plans ?? [];
  const all = plans.map(({ name, view: own }) => `${name} ${of100(pick(pick(own.outcomes, outcome).ever, count))}`);
  const what = plans[0] === undefined ? '' : pick(plans[0].view.outcomes, outcome).name;
  return `By ${pick(view.years, count)}, of 100 futures have come to ${what}: ${all.join(', ')}.`;
}
