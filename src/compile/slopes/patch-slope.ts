// How the year of a patch alone, and the multiplier at which it stands still, move with a number of the model.
import type { Model, Phase } from '../../model/model.ts';
import type { ModelSlopes } from '../../model/slopes/slopes.ts';
import { leading } from '../../numeric/leading.ts';
import { sparseFromDense } from '../../numeric/sparse.ts';
import { identity, plus, times } from '../../numeric/square.ts';
import { lifeMap, type LifePhase } from '../life-map.ts';
import { dependsOnMakeUp } from '../make-up.ts';
import { unitMultipliers, type Multipliers } from '../multipliers.ts';
import { patchYear } from '../patch-year.ts';
import { lifeSlope } from './life-slope.ts';

export interface PatchAt {
  readonly model: Model;
  readonly slopes: ModelSlopes | null;
  readonly patch: number;
  readonly multipliers: Multipliers;
  /** Of the multiplier of each crowding. */
  readonly multiplierSlopes: readonly number[];
}

/**
 * g*' of crowding k in a patch that stands still at g*, from ρ(A(g*)) = 1: −(vᵀ A_θ w) / (vᵀ A_g w). Null where the patch has no
 * single stable distribution, and where the make-up that births depend on moves too.
 */
export function standstillSlope(
  model: Model,
  slopes: ModelSlopes,
  { k, patch, multiplier }: { readonly k: number; readonly patch: number; readonly multiplier: number },
): number | null {
  if (dependsOnMakeUp(model)) return null;
  const n = model.classes.length;
  const multipliers = unitMultipliers(model);
  multipliers[k]?.fill(multiplier);
  const values = patchYear({ model, patch, multipliers });
  const { left, right } = leading(sparseFromDense({ rows: n, columns: n, values }));
  if (left === null || right === null) return null;
  const still = model.crowding.map(() => 0);
  const byNumber = patchYearSlope({ model, slopes, patch, multipliers, multiplierSlopes: still });
  const alone = { model, slopes: null, patch, multipliers, multiplierSlopes: still.map((_, j) => (j === k ? 1 : 0)) };
  return -between(left, byNumber, right) / between(left, patchYearSlope(alone), right);
}

/** C×C: the product rule over the phases that stay within the patch. */
function patchYearSlope({ model, slopes, patch, multipliers, multiplierSlopes }: PatchAt): Float64Array {
  const n = model.classes.length;
  let [year, slope] = [identity(n), new Float64Array(n * n)];
  model.phases.forEach((phase, index) => {
    const own = lifePhase(phase);
    if (own === null) return;
    const request = { model, phase: index, patch, step: 1, multipliers };
    const map = lifeMap(own, request);
    const moved = lifeSlope({ phase: own, slopes: slopes?.phases[index] ?? null, request, multiplierSlopes });
    slope = plus(times(moved, year, n), times(map, slope, n));
    year = times(map, year, n);
  });
  return slope;
}

/** Null for phases that a patch alone does not have. */
function lifePhase(phase: Phase): LifePhase | null {
  switch (phase.kind) {
    case 'survival':
    case 'breeding':
    case 'ageing':
    case 'demography':
      return phase;
    case 'count':
    case 'dispersal':
    case 'ceiling':
    case 'take':
    case 'move':
    case 'add':
      return null;
  }
}

function between(left: Float64Array, matrix: Float64Array, right: Float64Array): number {
  const n = left.length;
  return matrix.reduce((sum, value, i) => sum + (left[Math.floor(i / n)] ?? 0) * value * (right[i % n] ?? 0), 0);
}
