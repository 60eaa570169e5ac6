// How movement changes with a number of the model, from the slopes of its own numbers: through weights, their normalisation, the
// way and its links. Distances between places and the reach of a kernel stay.
import { densityPerKm2, logDensitySlopes, weightRatio } from '../model/kernel-shape.ts';
import type { DispersalPhase, Link, Model } from '../model/model.ts';
import { neighboursWithin, type Neighbour } from './distance.ts';
import { survivalOnTheWay, type KernelRule } from './kernel-movement.ts';
import { otherEnd, withLinkDistances } from './links.ts';

/** Of those that leave, how the share that ends in `to` alive changes. */
export interface WaySlope {
  readonly to: number;
  readonly slope: number;
}

/** A number and its slope. */
interface Moving {
  readonly value: number;
  readonly slope: number;
}

/** A way before its link is looked at. */
interface OpenWay {
  readonly to: number;
  readonly chance: Moving;
  readonly arriving: Moving;
}

const zero: Moving = { value: 0, slope: 0 };

/** By origin; `slopes` is the phase with slopes as its numbers. */
export function movementSlopes(
  model: Model,
  phase: DispersalPhase,
  slopes: DispersalPhase,
): readonly (readonly WaySlope[])[] {
  const { rule } = phase;
  const { rule: of } = slopes;
  if (rule.by === 'shares') {
    return model.patches.map((_, from) => {
      const column = (shares: Float64Array): number[] =>
        model.patches.map((_p, to) => shares[to * model.patches.length + from] ?? 0);
      const own = column(rule.shares);
      const moved = of.by === 'shares' ? column(of.shares) : own.map(() => 0);
      const parts = sharedOut(own.map((value, to) => ({ value, slope: moved[to] ?? 0 })));
      return cross(
        { phase, slopes, from },
        parts.map((chance, to) => ({ to, chance, arriving: chance })),
      );
    });
  }
  if (of.by !== 'kernel') return model.patches.map(() => []);
  const { reachKm } = rule.kernel;
  const near = neighboursWithin({ patches: model.patches, reachKm, between: rule.between });
  return near.map((straight, from) => {
    const others = withLinkDistances({ patches: model.patches, phase, reachKm }, from, straight);
    const ends = others.map((end) => ({ ...end, kmSlope: distanceSlope({ phase, slopes, from }, end) }));
    const aimed = rule.leavers === 'all arrive' ? weights(rule, of, ends) : meetings(model, { rule, of }, ends);
    if (!aimed.some(({ value, slope }) => value > 0 || slope !== 0)) return [];
    const chances = rule.leavers === 'all arrive' ? sharedOut(aimed) : aimed;
    return cross(
      { phase, slopes, from },
      ends.map((end, i) => {
        const chance = chances[i] ?? zero;
        return { to: end.patch, chance, arriving: times(chance, surviving(rule, of, end)) };
      }),
    );
  });
}

interface End extends Neighbour {
  readonly kmSlope: number;
}

/** km = measured · times + add. */
function distanceSlope({ phase, slopes, from }: Origin, { patch, km }: Neighbour): number {
  const [link, of] = [linkOf(phase, from, patch), linkOf(slopes, from, patch)];
  if (link === undefined || of === undefined) return 0;
  const { distanceTimes = 1, distanceAddKm = 0 } = link;
  const measured = distanceTimes === 0 ? 0 : (km - distanceAddKm) / distanceTimes;
  return (of.distanceKm ?? 0) * distanceTimes + measured * (of.distanceTimes ?? 0) + (of.distanceAddKm ?? 0);
}

/** Relative to the nearest, which cancels when they are divided by their sum. */
function weights(rule: KernelRule, of: KernelRule, ends: readonly End[]): readonly Moving[] {
  const candidates = ends.filter(({ patch }) => (rule.attraction[patch] ?? 0) > 0);
  const nearest = candidates.reduce((least, { km }) => Math.min(least, km), Infinity);
  const nearKm = Number.isFinite(nearest) ? nearest : 0;
  return ends.map((end) => {
    const ratio = weightRatio(rule.kernel, end.km, nearKm);
    const attraction = { value: rule.attraction[end.patch] ?? 0, slope: of.attraction[end.patch] ?? 0 };
    return times(attraction, { value: ratio, slope: ratio * logDensitySlope(rule, of, end) });
  });
}

function meetings(
  model: Model,
  { rule, of }: { readonly rule: KernelRule; readonly of: KernelRule },
  ends: readonly End[],
): readonly Moving[] {
  return ends.map((end) => {
    const areaKm2 = rule.areaKm2?.[end.patch] ?? model.patches[end.patch]?.areaKm2 ?? 0;
    const value = areaKm2 * densityPerKm2(rule.kernel, end.km);
    const attraction = { value: rule.attraction[end.patch] ?? 0, slope: of.attraction[end.patch] ?? 0 };
    return times(attraction, { value, slope: value * logDensitySlope(rule, of, end) });
  });
}

/** The factors that all ways share, such as that of the scale, cancel where weights are divided by their sum. */
function logDensitySlope(rule: KernelRule, of: KernelRule, { km, kmSlope }: End): number {
  const { perKm, perScale, perShapeNumber } = logDensitySlopes(rule.kernel, km);
  return (
    perKm * kmSlope +
    perScale * of.kernel.scaleKm +
    (of.kernel.shapeNumber === 0 ? 0 : perShapeNumber * of.kernel.shapeNumber)
  );
}

/** Shares of a sum: (w/Σ)' = (w' − (w/Σ) Σ') / Σ. */
function sharedOut(parts: readonly Moving[]): readonly Moving[] {
  const sum = parts.reduce((total, { value }) => total + value, 0);
  const slope = parts.reduce((total, part) => total + part.slope, 0);
  if (!(sum > 0)) return parts.map(() => zero);
  return parts.map((part) => ({ value: part.value / sum, slope: (part.slope - (part.value / sum) * slope) / sum }));
}

function surviving(rule: KernelRule, of: KernelRule, { km, kmSlope }: End): Moving {
  const value = survivalOnTheWay(rule, km);
  const onTheWay =
    rule.survivalOnTheWay === 0
      ? survivalOnTheWay({ ...rule, survivalOnTheWay: 1 }, km)
      : value / rule.survivalOnTheWay;
  return { value, slope: of.survivalOnTheWay * onTheWay - value * (of.hazardPerKm * km + rule.hazardPerKm * kmSlope) };
}

interface Origin {
  readonly phase: DispersalPhase;
  readonly slopes: DispersalPhase;
  readonly from: number;
}

/** Those that turn back end at home; of the others that cross, a share dies. */
function cross({ phase, slopes, from }: Origin, open: readonly OpenWay[]): readonly WaySlope[] {
  let home = 0;
  const ways = open.map(({ to, chance, arriving }) => {
    const link = linkOf(phase, from, to);
    if (link === undefined) return { to, slope: arriving.slope };
    const of = linkOf(slopes, from, to);
    const turned = { value: link.turnBack, slope: of?.turnBack ?? 0 };
    const died = { value: link.crossingDeath, slope: of?.crossingDeath ?? 0 };
    home += times(chance, turned).slope;
    return { to, slope: times(times(arriving, without(turned)), without(died)).slope };
  });
  return [...ways, { to: from, slope: home }].filter(({ slope }) => slope !== 0);
}

function linkOf({ links = [] }: DispersalPhase, from: number, to: number): Link | undefined {
  return links.find(({ between }) => otherEnd(between, from) === to);
}

function without({ value, slope }: Moving): Moving {
  return { value: 1 - value, slope: -slope };
}

function times(a: Moving, b: Moving): Moving {
  return { value: a.value * b.value, slope: a.slope * b.value + a.value * b.slope };
}
