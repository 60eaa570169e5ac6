// What the map shows at one patch or link, in words: for tooltips, for screen readers and for the table beside it.
import type { LinkView, ReportView, WorthView } from '../contract.ts';
import { decimal, of100, plain, whole } from '../number.ts';
import { pick } from '../series.ts';

/** Movement below a whole animal a year still counts: it adds up over years. */
export function flow(animals: number): string {
  if (animals === 0) return '0';
  if (animals < 0.05) return 'under 0.1';
  return animals < 9.95 ? animals.toFixed(1) : plain(animals);
}

export function patchLines(view: ReportView, patch: number, count: number): readonly string[] {
  const { fan, empty, worth } = pick(view.patches, patch);
  const lines = [
    `${whole(pick(fan.median, count))} ${view.animals} in the middle of ${plain(view.futures)} futures`,
    `90 of 100 futures: ${whole(pick(fan.p05, count))} to ${whole(pick(fan.p95, count))}`,
  ];
  if (empty !== null) lines.push(`empty in ${of100(pick(empty, count))} of 100 futures`);
  if (count > 0 && view.links.length > 0) {
    lines.push(
      `arriving ${flow(arriving(view, patch, count))} a year, setting out and arriving elsewhere ${flow(leaving(view, patch, count))}`,
    );
  }
  if (worth !== null) lines.push(worthLine(view, worth));
  return lines;
}

function worthLine({ animals, worthAt }: ReportView, { role, contribution }: WorthView): string {
  const leaves = `each of the ${animals} there leaves ${decimal(contribution, 2)} a year later in all patches`;
  return `${role}: ${leaves}, taken ${worthAt ?? ''}`;
}

export function linkLine(view: ReportView, link: LinkView, count: number): string {
  const [from, to] = [pick(view.patches, link.from).name, pick(view.patches, link.to).name];
  return `${from} to ${to}: ${flow(pick(link.animals, count))} ${view.animals} a year`;
}

export function arriving(view: ReportView, patch: number, count: number): number {
  return pick(sumsAt(view, count).arriving, patch);
}

export function leaving(view: ReportView, patch: number, count: number): number {
  return pick(sumsAt(view, count).leaving, patch);
}

interface Sums {
  readonly count: number;
  /** By patch. */
  readonly arriving: readonly number[];
  readonly leaving: readonly number[];
}

/** Of the count that was asked for last: every patch asks for the same. */
const lastSums = new WeakMap<ReportView, Sums>();

function sumsAt(view: ReportView, count: number): Sums {
  const last = lastSums.get(view);
  if (last?.count === count) return last;
  const [arriving, leaving] = [view.patches.map(() => 0), view.patches.map(() => 0)];
  for (const { from, to, animals } of view.links) {
    arriving[to] = pick(arriving, to) + pick(animals, count);
    leaving[from] = pick(leaving, from) + pick(animals, count);
  }
  const sums = { count, arriving, leaving };
  lastSums.set(view, sums);
  return sums;
}
