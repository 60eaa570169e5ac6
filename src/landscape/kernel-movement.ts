// Movement from a dispersal kernel: by weights over the other patches, or by the chance of meeting one in the plane.
import type { Finding } from '../spec/finding.ts';
import { pinned } from '../machine/pinned.ts';
import type { DispersalPhase, DispersalRule, Model } from '../model/model.ts';
import { densityPerKm2, weightRatio } from '../model/kernel-shape.ts';
import { neighboursWithin, type Neighbour } from './distance.ts';
import type { Movement } from './landscape.ts';
import { crossLinks, withLinkDistances } from './links.ts';
import { movementOf, type Way } from './ways.ts';

export type KernelRule = Extract<DispersalRule, { by: 'kernel' }>;

export interface KernelRequest {
  readonly model: Model;
  readonly phase: DispersalPhase;
  readonly rule: KernelRule;
  readonly findings: Finding[];
}

export function kernelMovement(request: KernelRequest): Movement {
  const { model, phase, rule } = request;
  const { reachKm } = rule.kernel;
  const near = neighboursWithin({ patches: model.patches, reachKm, between: rule.between });
  const ways = near.map((straight, from) => {
    const others = withLinkDistances({ patches: model.patches, phase, reachKm }, from, straight);
    const aiming = rule.leavers === 'all arrive' ? sharedOut(rule, others) : meeting(model, rule, others);
    if (!aiming.some((one) => one > 0)) {
      tellNoTarget(request, from);
      // Where all arrive and nobody can arrive anywhere else, those that set out come home.
      return rule.leavers === 'all arrive' ? [{ to: from, chance: 1, km: 0 }] : [];
    }
    const list = others.map(({ patch, km }, i) => {
      const taking = aiming[i] ?? 0;
      return { to: patch, chance: taking, arriving: taking * survivalOnTheWay(rule, km), km };
    });
    const own = crossLinks(phase, from, list);
    refuseSurplus(request, from, own);
    return own;
  });
  return movementOf(ways);
}

/** Weights divided by their sum. Taken relative to the nearest patch, so none underflow. */
function sharedOut(rule: KernelRule, others: readonly Neighbour[]): readonly number[] {
  const candidates = others.filter(({ patch }) => (rule.attraction[patch] ?? 0) > 0);
  const nearest = candidates.reduce((least, { km }) => Math.min(least, km), Infinity);
  const weights = others.map(({ patch, km }) => {
    const attraction = rule.attraction[patch] ?? 0;
    return attraction > 0 ? attraction * weightRatio(rule.kernel, km, nearest) : 0;
  });
  const sum = weights.reduce((total, weight) => total + weight, 0);
  return weights.map((weight) => (sum > 0 ? weight / sum : 0));
}

/** The density of the kernel at the distance times the area of the patch: good while patches are small beside the kernel. */
function meeting(model: Model, rule: KernelRule, others: readonly Neighbour[]): readonly number[] {
  return others.map(({ patch, km }) => {
    const areaKm2 = rule.areaKm2?.[patch] ?? model.patches[patch]?.areaKm2 ?? 0;
    return (rule.attraction[patch] ?? 0) * areaKm2 * densityPerKm2(rule.kernel, km);
  });
}

export function survivalOnTheWay(rule: KernelRule, km: number): number {
  return rule.survivalOnTheWay * (rule.hazardPerKm === 0 ? 1 : pinned.exp(-rule.hazardPerKm * km));
}

function tellNoTarget({ model, phase, rule, findings }: KernelRequest, from: number): void {
  const name = model.patches[from]?.name ?? '';
  findings.push({
    severity: 'warning',
    code: 'no-target',
    message: `From ${name} no other patch is within reach of \`${phase.name}\``,
    path: [phase.name],
    part: 'key',
    details: {
      reason:
        rule.leavers === 'all arrive'
          ? 'Those that set out come home, since all arrive.'
          : 'All that set out are lost, since leavers may miss.',
    },
  });
}

function refuseSurplus({ model, phase, findings }: KernelRequest, from: number, ways: readonly Way[]): void {
  const sum = ways.reduce((total, { chance }) => total + chance, 0);
  if (sum <= 1 + 1e-9) return;
  findings.push({
    severity: 'error',
    code: 'misses-above-one',
    message: `Of those that leave ${model.patches[from]?.name ?? ''} more would arrive than set out (${sum.toFixed(3)} for 1)`,
    path: [phase.name, 'leavers'],
    details: {
      reason: 'The kernel times the area of a patch is a chance only where patches are small beside the kernel.',
      fix: 'Use a longer kernel, or `leavers: all arrive`.',
    },
  });
}
