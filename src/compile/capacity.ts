// The strength of crowding in each patch, so that the patch alone stands still at its capacity.
// Solves ρ(A(g*)) = 1 for the multiplier g* of all rates that the crowding changes, then sets the coefficient so that
// g(K) = g*, the Allee factor included. Of several crowdings each is solved by itself: of the others only the Allee factors act,
// so that their order does not matter. Solved once, from the base model, and held under every plan: under one that raises survival
// a patch holds more animals than its capacity says, and only another capacity is another K.
import type { Finding } from '../spec/finding.ts';
import type { Crowding, Model } from '../model/model.ts';
import { asIfAlwaysThere } from '../model/patches-lost.ts';
import type { CrowdingCoefficients, CrowdingForm } from './coefficients.ts';
import { coefficientAt } from './crowding-form.ts';
import { multipliersAtRest } from './multipliers.ts';
import { patchYear } from './patch-year.ts';
import { standstill, type Standstill } from './standstill.ts';

export interface SolvedCapacities {
  readonly coefficients: readonly CrowdingCoefficients[];
  readonly findings: readonly Finding[];
}

/**
 * `base` is the model that crowding is solved from: of `model` only the capacities and the Allee factors count. Both have the
 * same patches and crowdings in the same order.
 */
export function solveCapacities(model: Model, base: Model = model): SolvedCapacities {
  const findings: Finding[] = [];
  const alone = standingAlone(base);
  const coefficients = model.crowding.map((crowding, k) => solveCrowding({ ...alone, crowding, k, findings }));
  return { coefficients, findings };
}

interface StandingAlone {
  /** As if all its patches were always there. */
  readonly model: Model;
  /** By crowding and patch; what was solved for one plan holds for all of the same base. */
  readonly solved: Map<number, readonly Standstill[]>;
}

const known = new WeakMap<Model, StandingAlone>();

function standingAlone(base: Model): StandingAlone {
  const before = known.get(base);
  if (before !== undefined) return before;
  const alone = { model: asIfAlwaysThere(base), solved: new Map<number, readonly Standstill[]>() };
  known.set(base, alone);
  return alone;
}

interface Request extends StandingAlone {
  readonly crowding: Crowding;
  readonly k: number;
  readonly findings: Finding[];
}

function solveCrowding(request: Request): CrowdingCoefficients {
  const { model, crowding, k } = request;
  const held = { shapeNumber: crowding.shapeNumber, alleeHalf: crowding.alleeHalf };
  if (crowding.form === 'allee') {
    return {
      form: model.patches.map(() => 'none'),
      coefficient: new Float64Array(model.patches.length),
      ...shapeless(held),
    };
  }
  const standstills = request.solved.get(k) ?? standstillsOf(model, k);
  request.solved.set(k, standstills);
  const byCapacity = (crowded: Crowding): readonly Chosen[] =>
    standstills.map((own, p) => choose({ ...request, crowding: crowded }, { own, p, standstills }));
  const first = byCapacity(crowding);
  const later = crowding.capacityByYear;
  return {
    form: first.map((chosen) => chosen.form),
    coefficient: coefficientsOf(first),
    ...(later === undefined
      ? {}
      : {
          coefficientByYear: {
            epochs: later.epochs.map((capacity) => coefficientsOf(byCapacity({ ...crowding, capacity }))),
            epochOf: later.epochOf,
          },
        }),
    ...shapeless(held),
  };
}

function standstillsOf(model: Model, k: number): readonly Standstill[] {
  const solved = new Map<string, Standstill>();
  return model.patches.map((_, p) => {
    const year = patchYear({ model, patch: p, multipliers: multipliersAtRest(model) }).join();
    const others = model.crowding.map(({ alleeHalf }, j) => (j === k ? 0 : (alleeHalf[p] ?? 0)));
    const own = model.crowding[k]?.capacity[p];
    const key = others.some((half) => half > 0) ? `${year} ${others.join()} ${own}` : year;
    const before = solved.get(key) ?? standstill({ model, k, patch: p });
    solved.set(key, before);
    return before;
  });
}

function coefficientsOf(chosen: readonly Chosen[]): Float64Array {
  return Float64Array.from(chosen, ({ coefficient }) => coefficient);
}

/** Leaves out a shape number that there is not. */
function shapeless({
  shapeNumber,
  alleeHalf,
}: {
  readonly shapeNumber: number | undefined;
  readonly alleeHalf: Float64Array;
}) {
  return shapeNumber === undefined ? { alleeHalf } : { shapeNumber, alleeHalf };
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

/** g(K) = form(K) · K/(K+h). */
function coefficientFor(request: Request, { multiplier, p, capacity }: Target): Chosen {
  const { crowding } = request;
  const half = crowding.alleeHalf[p] ?? 0;
  const share = half === 0 ? multiplier : multiplier / (capacity / (capacity + half));
  if (crowding.form === 'allee' || !(share > 0 && share <= 1)) {
    tellUnreachable(request, p, 'the Allee factor alone holds it below that');
    return noCrowding;
  }
  return { form: crowding.form, coefficient: coefficientAt(crowding, share, capacity) };
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
