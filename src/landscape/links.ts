// What links do to movement: a distance of their own, those that turn back, and those that die at the crossing.
import type { DispersalPhase, Link } from '../model/model.ts';
import type { Neighbour } from './distance.ts';
import type { Way } from './ways.ts';

/** A way before its link is looked at. */
export interface OpenWay {
  readonly to: number;
  /** Of those that leave, the share that takes this way. */
  readonly chance: number;
  /** The share that would end there alive if nothing stood in the way. */
  readonly arriving: number;
  readonly km: number | null;
}

interface Reaching {
  readonly phase: DispersalPhase;
  readonly reachKm: number | null;
}

/** The neighbours of a patch with the distances that links have: some come into reach, some fall out of it. */
export function withLinkDistances(
  { phase, reachKm }: Reaching,
  from: number,
  straight: readonly Neighbour[],
): readonly Neighbour[] {
  const own = (phase.links ?? []).flatMap(({ between, distanceKm }) => {
    const to = otherEnd(between, from);
    return to === null || distanceKm === null ? [] : [{ patch: to, km: distanceKm }];
  });
  if (own.length === 0) return straight;
  const kept = straight.filter(({ patch }) => own.every((link) => link.patch !== patch));
  const reached = own.filter(({ km }) => reachKm === null || km <= reachKm);
  return [...kept, ...reached].sort((a, b) => a.patch - b.patch);
}

/** Those that turn back end at home; of the others that cross, a share dies. */
export function crossLinks({ links = [] }: DispersalPhase, from: number, open: readonly OpenWay[]): readonly Way[] {
  let home = 0;
  const ways = open.map(({ to, chance, arriving, km }): Way => {
    const link = links.find(({ between }) => otherEnd(between, from) === to);
    if (link === undefined) return { to, chance: arriving, km };
    home += chance * link.turnBack;
    return { to, chance: arriving * (1 - link.turnBack) * (1 - link.crossingDeath), km };
  });
  return home > 0 ? [...ways, { to: from, chance: home, km: open[0]?.km === null ? null : 0 }] : ways;
}

export function otherEnd([a, b]: Link['between'], from: number): number | null {
  return from === a ? b : from === b ? a : null;
}
