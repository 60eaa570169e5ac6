// What links do to movement: a distance of their own, those that turn back, and those that die at the crossing.
import type { DispersalPhase, Link, Patch } from '../model/model.ts';
import { neighboursWithin, type Neighbour } from './distance.ts';
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
  readonly patches: readonly Patch[];
  readonly phase: DispersalPhase;
  readonly reachKm: number | null;
}

/** The neighbours of a patch with the distances that links have: some come into reach, some fall out of it. */
export function withLinkDistances(
  reaching: Reaching,
  from: number,
  straight: readonly Neighbour[],
): readonly Neighbour[] {
  const { phase, reachKm } = reaching;
  const own = (phase.links ?? []).flatMap((link) => {
    const to = otherEnd(link.between, from);
    if (to === null || !hasOwnDistance(link)) return [];
    const measured = link.distanceKm ?? straight.find(({ patch }) => patch === to)?.km ?? measuredKm(reaching, link);
    return [{ patch: to, km: Math.max(0, linkKm(link, measured)) }];
  });
  if (own.length === 0) return straight;
  const kept = straight.filter(({ patch }) => own.every((link) => link.patch !== patch));
  const reached = own.filter(({ km }) => reachKm === null || km <= reachKm);
  return [...kept, ...reached].sort((a, b) => a.patch - b.patch);
}

/** Whether a link has another distance than its patches. */
export function hasOwnDistance({ distanceKm, distanceTimes = 1, distanceAddKm = 0 }: Link): boolean {
  return distanceKm !== null || distanceTimes !== 1 || distanceAddKm !== 0;
}

/** Rounded to 1 mm, as all distances. */
function linkKm({ distanceTimes = 1, distanceAddKm = 0 }: Link, measured: number): number {
  const exact = measured * distanceTimes + distanceAddKm;
  return distanceTimes === 1 && distanceAddKm === 0 ? exact : Math.round(exact * 1e6) / 1e6;
}

/** How long the way of a link is: in a step, its own distance or that of its patches, times its factor, and what is added. */
export function lengthOfLink(patches: readonly Patch[], phase: DispersalPhase, link: Link): number {
  return linkKm(link, link.distanceKm ?? measuredKm({ patches, phase }, link));
}

/** The distance of the two patches, however far beyond the reach. */
function measuredKm({ patches, phase }: Pick<Reaching, 'patches' | 'phase'>, { between: [a, b] }: Link): number {
  const [one, other] = [patches[a], patches[b]];
  if (one === undefined || other === undefined) return NaN;
  const between = phase.rule.by === 'kernel' ? phase.rule.between : undefined;
  return neighboursWithin({ patches: [one, other], reachKm: null, between })[0]?.[0]?.km ?? NaN;
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
