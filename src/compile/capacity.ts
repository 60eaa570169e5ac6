// The strength of crowding in each patch, so that the patch alone stands still at its capacity.
// Solves ρ(A(g*)) = 1 for the multiplier g* of all rates that the crowding changes, then sets the coefficient so that
// g(K) = g*, the Allee factor included. Solved once, from the base model, and held under every plan.
import type { Finding } from '../spec/finding.ts';
import { pinned } from '../machine/pinned.ts';
import type { Crowding, Model } from '../model/model.ts';
import { leading } from '../numeric/leading.ts';
import { findRoot } from '../numeric/root.ts';
import { sparseFromDense } from '../numeric/sparse.ts';
import type { CrowdingCoefficients, CrowdingForm } from './coefficients.ts';
import { unitMultipliers } from './multipliers.ts';
import { patchYear } from './patch-year.ts';

export interface SolvedCapacities {
  readonly coefficients: readonly CrowdingCoefficients[];
  readonly findings: readonly Finding[];
}

export function solveCapacities(model: Model): SolvedCapacities {
  const findings: Finding[] = [];
  const coefficients = model.crowding.map((crowding, k) => solveCrowding({ model, crowding, k, findings }));
  return { coefficients, findings };
}

interface Request {
  readonly model: Model;
  readonly crowding: Crowding;
  readonly k: number;
  readonly findings: Finding[];
}

/** What the multiplier must be for a patch alone to stand still. */
type Standstill =
  | { readonly kind: 'found'; readonly multiplier: number }
  | { readonly kind: 'declines'; readonly growth: number }
  | { readonly kind: 'always grows'; readonly growth: number };

function solveCrowding(request: Request): CrowdingCoefficients {
  const { model, crowding } = request;
  const solved = new Map<string, Standstill>();
  const standstills = model.patches.map((_, p) => {
    const key = patchYear({ model, patch: p, multipliers: unitMultipliers(model) }).join();
    const known = solved.get(key) ?? standstill(request, p);
    solved.set(key, known);
    return known;
  });
  const form: CrowdingForm[] = [];
  const coefficient = new Float64Array(model.patches.length);
  standstills.forEach((own, p) => {
    const chosen = choose(request, { own, p, standstills });
    form.push(chosen.form);
    coefficient[p] = chosen.coefficient;
  });
  return { form, coefficient, alleeHalf: crowding.alleeHalf };
}

function standstill({ model, k }: Request, patch: number): Standstill {
  const n = model.classes.length;
  const growthAt = (multiplier: number): number => {
    const multipliers = unitMultipliers(model);
    multipliers[k]?.fill(multiplier);
    const values = patchYear({ model, patch, multipliers });
    return leading(sparseFromDense({ rows: n, columns: n, values })).growthRate;
  };
  const highest = growthAt(1);
  if (highest <= 1) return { kind: 'declines', growth: highest };
  const lowest = growthAt(0);
  if (lowest >= 1) return { kind: 'always grows', growth: lowest };
  const multiplier = findRoot((g) => growthAt(g) - 1, { low: 0, high: 1 });
  return multiplier === null ? { kind: 'always grows', growth: lowest } : { kind: 'found', multiplier };
}

interface Choice {
  readonly own: Standstill;
  readonly p: number;
  readonly standstills: readonly Standstill[];
}

interface Chosen {
  readonly form: CrowdingForm;
  readonly coefficient: number;
}

const noCrowding: Chosen = { form: 'none', coefficient: 0 };

function choose(request: Request, { own, p, standstills }: Choice): Chosen {
  const { crowding } = request;
  const capacity = crowding.capacity[p] ?? NaN;
  if (own.kind === 'found') return coefficientFor(request, { multiplier: own.multiplier, p, capacity });
  if (own.kind === 'always grows') {
    tellUnreachable(
      request,
      p,
      `it grows by ${(own.growth * 100 - 100).toFixed(1)} % a year even when crowding takes all it can`,
    );
    return noCrowding;
  }
  const rule = crowding.whereDeclining;
  if (rule === null) tellDeclining(request, p, own.growth);
  if (rule === null || rule === 'none') return noCrowding;
  if (rule === 'ceiling') return { form: 'ceiling', coefficient: capacity };
  const model = standstills[rule.as];
  if (model?.kind === 'found') return coefficientFor(request, { multiplier: model.multiplier, p, capacity });
  tellDeclining(request, rule.as, model?.kind === 'declines' ? model.growth : NaN);
  return noCrowding;
}

interface Target {
  readonly multiplier: number;
  readonly p: number;
  readonly capacity: number;
}

/** g(K) = form(K) · K/(K+h): Beverton-Holt 1/(1+aK), Ricker exp(−bK). */
function coefficientFor(request: Request, { multiplier, p, capacity }: Target): Chosen {
  const { form, alleeHalf } = request.crowding;
  const half = alleeHalf[p] ?? 0;
  const share = half === 0 ? multiplier : multiplier / (capacity / (capacity + half));
  if (!(share > 0 && share <= 1)) {
    tellUnreachable(request, p, 'the Allee factor alone holds it below that');
    return noCrowding;
  }
  return { form, coefficient: form === 'beverton-holt' ? (1 / share - 1) / capacity : -pinned.log(share) / capacity };
}

function tellUnreachable({ model, crowding, findings }: Request, p: number, why: string): void {
  findings.push({
    severity: 'error',
    code: 'capacity-unreachable',
    message: `${model.patches[p]?.name ?? ''} cannot stand still at its capacity: ${why}`,
    path: [crowding.name, 'changes'],
    part: 'key',
    details: { fix: 'Let crowding change more rates, or correct the rates of this patch.' },
  });
}

function tellDeclining({ model, crowding, findings }: Request, p: number, growth: number): void {
  if (findings.some((finding) => finding.code === 'declining-patch')) return;
  findings.push({
    severity: 'error',
    code: 'declining-patch',
    message: `${model.patches[p]?.name ?? ''} declines alone (growth ${growth.toFixed(4)} a year), so no crowding makes it stand still`,
    path: [crowding.name],
    part: 'key',
    details: {
      expected: '`where-declining: none`, `ceiling`, or `{ as: PATCH }` with a patch that grows',
      reason: 'With none, sinks can fill without limit and corridors into them look better than they are.',
    },
  });
}
