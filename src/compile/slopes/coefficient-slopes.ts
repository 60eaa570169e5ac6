// How the solved strengths of crowding move with a number of the model.
import type { Crowding, Model } from '../../model/model.ts';
import type { CrowdingSlopes, ModelSlopes } from '../../model/slopes/slopes.ts';
import { growthRateOf } from '../../numeric/leading.ts';
import { sparseFromDense } from '../../numeric/sparse.ts';
import type { CrowdingCoefficients } from '../coefficients.ts';
import { multiplierAt } from '../crowding-form.ts';
import { multipliersAtRest } from '../multipliers.ts';
import { patchYear } from '../patch-year.ts';
import { coefficientSlope } from './crowding-slope.ts';
import { standstillSlope } from './patch-slope.ts';

/**
 * `held`: what was solved stays, as under a plan; only a change of capacity moves the coefficient. `solved anew`: as if the number
 * had been otherwise from the first, so that every patch still stands still at its capacity.
 */
export type CrowdingRule = 'held' | 'solved anew';

export interface SolvedModel {
  readonly model: Model;
  readonly coefficients: readonly CrowdingCoefficients[];
}

/** By crowding and patch; null where there is no slope. */
export function coefficientSlopes(
  { model, coefficients }: SolvedModel,
  slopes: ModelSlopes,
  rule: CrowdingRule,
): readonly Float64Array[] | null {
  const all = model.crowding.map((crowding, k) => {
    const own = coefficients[k];
    const moved = slopes.crowding[k];
    if (own === undefined || moved === undefined) return null;
    const byPatch = model.patches.map((_, patch) => slopeIn({ model, crowding, own, k, patch, rule, slopes, moved }));
    return byPatch.includes(null) ? null : Float64Array.from(byPatch, (slope) => slope ?? 0);
  });
  return all.includes(null) ? null : all.map((one) => one ?? new Float64Array(0));
}

interface Place {
  readonly model: Model;
  readonly crowding: Crowding;
  readonly own: CrowdingCoefficients;
  readonly k: number;
  readonly patch: number;
  readonly rule: CrowdingRule;
  readonly slopes: ModelSlopes;
  readonly moved: CrowdingSlopes;
}

/** Form and Allee factor together give g* at the capacity K, so the form must give g* (K + h) / K. */
function slopeIn(place: Place): number | null {
  const { crowding, own, patch, rule, moved } = place;
  const form = own.form[patch] ?? 'none';
  const capacitySlope = moved.capacity[patch] ?? 0;
  if (form === 'none') return 0;
  if (form === 'ceiling') return capacitySlope;
  const [capacity, half] = [crowding.capacity[patch] ?? NaN, own.alleeHalf[patch] ?? 0];
  const multiplier = multiplierAt(own, patch, capacity);
  const alone = rule === 'held' ? 0 : multiplierSlopeAt(place, multiplier);
  if (alone === null) return null;
  const halfSlope = rule === 'held' ? 0 : (moved.alleeHalf[patch] ?? 0);
  const share = (multiplier * (capacity + half)) / capacity;
  const ofHalf = halfSlope / capacity - (half * capacitySlope) / (capacity * capacity);
  const shareSlope = (alone * (capacity + half)) / capacity + multiplier * ofHalf;
  const shapeNumberSlope = rule === 'held' ? 0 : moved.shapeNumber;
  return coefficientSlope(crowding, { share, shareSlope, capacity, capacitySlope, shapeNumberSlope });
}

/** Of g*: that of the patch itself, or of the patch that it is said to be like. */
function multiplierSlopeAt({ model, crowding, k, patch, slopes }: Place, multiplier: number): number | null {
  if (model.crowding.some(({ alleeHalf }, j) => j !== k && alleeHalf.some((half) => half > 0))) return null;
  const like = crowding.whereDeclining;
  const declines = like !== null && typeof like === 'object' && growthAlone(model, patch) <= 1;
  return standstillSlope(model, slopes, { k, patch: declines ? like.as : patch, multiplier });
}

function growthAlone(model: Model, patch: number): number {
  const n = model.classes.length;
  const values = patchYear({ model, patch, multipliers: multipliersAtRest(model) });
  return growthRateOf(sparseFromDense({ rows: n, columns: n, values }));
}
