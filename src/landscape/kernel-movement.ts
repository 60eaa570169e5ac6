// Movement from a dispersal kernel: by weights over the other patches, or by the chance of meeting one in the plane.
// Kernels in the plane: Nathan et al. 2012; the negative exponential has density exp(−r/a) / (2πa²) and mean distance 2a.
import type { Finding } from '../spec/finding.ts';
import { pinned } from '../machine/pinned.ts';
import type { DispersalPhase, DispersalRule, Model } from '../model/model.ts';
import { neighboursWithin, type Neighbour } from './distance.ts';
import type { Movement } from './landscape.ts';

type KernelRule = Extract<DispersalRule, { by: 'kernel' }>;

export interface KernelRequest {
  readonly model: Model;
  readonly phase: DispersalPhase;
  readonly rule: KernelRule;
  readonly findings: Finding[];
}

export function kernelMovement(request: KernelRequest): Movement {
  const { model, rule } = request;
  const start = new Int32Array(model.patches.length + 1);
  const [destinations, chance, lengthKm] = [[] as number[], [] as number[], [] as number[]];
  neighboursWithin(model.patches, rule.kernel.reachKm).forEach((others, from) => {
    const chances = rule.leavers === 'all arrive' ? arriving(rule, others) : meeting(model, rule, others);
    if (!chances.some((one) => one > 0)) {
      tellNoTarget(request, from);
      if (rule.leavers === 'all arrive') {
        // Nobody can arrive anywhere else, so those that set out come home.
        destinations.push(from);
        chance.push(1);
        lengthKm.push(0);
      }
    } else {
      others.forEach(({ patch, km }, i) => {
        const one = chances[i] ?? 0;
        if (one <= 0) return;
        destinations.push(patch);
        chance.push(one);
        lengthKm.push(km);
      });
      refuseSurplus(request, from, chances);
    }
    start[from + 1] = destinations.length;
  });
  return {
    start,
    destinations: Int32Array.from(destinations),
    chance: Float64Array.from(chance),
    lengthKm: Float64Array.from(lengthKm),
  };
}

/** Weights divided by their sum, times survival on the way. Taken relative to the nearest patch, so none underflow. */
function arriving(rule: KernelRule, others: readonly Neighbour[]): readonly number[] {
  const candidates = others.filter(({ patch }) => (rule.attraction[patch] ?? 0) > 0);
  const nearest = candidates.reduce((least, { km }) => Math.min(least, km), Infinity);
  const weights = others.map(({ patch, km }) => {
    const attraction = rule.attraction[patch] ?? 0;
    return attraction > 0 ? attraction * pinned.exp(-(km - nearest) / rule.kernel.scaleKm) : 0;
  });
  const sum = weights.reduce((total, weight) => total + weight, 0);
  return others.map(({ km }, i) => (sum > 0 ? ((weights[i] ?? 0) / sum) * survivalOnTheWay(rule, km) : 0));
}

/** The density of the kernel at the distance times the area of the patch: good while patches are small beside the kernel. */
function meeting(model: Model, rule: KernelRule, others: readonly Neighbour[]): readonly number[] {
  const { scaleKm } = rule.kernel;
  return others.map(({ patch, km }) => {
    const density = pinned.exp(-km / scaleKm) / (2 * Math.PI * scaleKm * scaleKm);
    const areaKm2 = model.patches[patch]?.areaKm2 ?? 0;
    return (rule.attraction[patch] ?? 0) * areaKm2 * density * survivalOnTheWay(rule, km);
  });
}

function survivalOnTheWay(rule: KernelRule, km: number): number {
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

function refuseSurplus({ model, phase, findings }: KernelRequest, from: number, chances: readonly number[]): void {
  const sum = chances.reduce((total, one) => total + one, 0);
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
