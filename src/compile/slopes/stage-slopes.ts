// How the shares that go on from stages of a stated duration move with a number of the model.
import type { AgeingPhase, Model, Phase } from '../../model/model.ts';
import type { ModelSlopes } from '../../model/slopes/slopes.ts';
import { leading } from '../../numeric/leading.ts';
import { multiply } from '../../numeric/sparse-product.ts';
import type { SparseMatrix } from '../../numeric/sparse.ts';
import { principalPart } from '../../numeric/principal-part.ts';
import { fixedDurationSlopes } from '../../numeric/stage-duration.ts';
import { buildBlock, keptStates } from '../block.ts';
import { survivalOfYear } from '../stage-advance.ts';
import { nearZero, type Compiled } from '../year-map.ts';
import { yearSlope } from './year-slope.ts';

/**
 * The slopes with those of the shares in them. A fixed stage rests on survival s, duration T and growth λ, and λ on the share in
 * turn: with γ' = γ_s s' + γ_T T' + γ_λ λ' and λ' = vᵀA'w / vᵀw, λ' = vᵀA_θ w / (vᵀw − vᵀA_λ w), where A_θ is the slope of the matrix with λ held
 * and A_λ that by λ through the shares alone (derived). Null where the matrix has no single pair of vectors.
 */
export function withStageSlopes(compiled: Compiled, slopes: ModelSlopes): ModelSlopes | null {
  const { model } = compiled;
  const stages = model.phases.flatMap((phase) => (phase.kind === 'ageing' ? (phase.stages ?? []) : []));
  if (stages.length === 0) return slopes;
  const free = { model: { ...model, crowding: [] }, landscape: compiled.landscape, coefficients: [] };
  if (!stages.some(({ as }) => as === 'fixed')) return filled(model, slopes, { growthRate: 1, growthSlope: 0 });
  const { growthRate, left, right } = leading(buildBlock(free, 'zero').matrix);
  if (left === null || right === null) return null;
  const along = (moved: ModelSlopes): number => between(left, slopeNearZero(free, moved), right);
  const still = { phases: slopes.phases.map(() => null), crowding: [], missed: [] };
  const held = along(filled(model, slopes, { growthRate, growthSlope: 0 }));
  const byGrowth = along(filled(model, still, { growthRate, growthSlope: 1 }));
  const scale = left.reduce((sum, value, i) => sum + value * (right[i] ?? 0), 0);
  return filled(model, slopes, { growthRate, growthSlope: held / (scale - byGrowth) });
}

function slopeNearZero(compiled: Compiled, slopes: ModelSlopes): SparseMatrix {
  const whole = yearSlope({ compiled, slopes: { ...slopes, crowding: [] }, coefficientSlopes: [] }, nearZero(compiled));
  return principalPart(whole, keptStates(compiled));
}

interface Growth {
  readonly growthRate: number;
  readonly growthSlope: number;
}

function filled(model: Model, slopes: ModelSlopes, growth: Growth): ModelSlopes {
  const phases = model.phases.map((phase, index) =>
    phase.kind === 'ageing' && phase.stages !== undefined
      ? agedSlopes(model, { phase, slopes: slopes.phases, index, growth })
      : (slopes.phases[index] ?? null),
  );
  return { ...slopes, phases };
}

interface Ageing {
  readonly phase: AgeingPhase;
  readonly slopes: readonly (Phase | null)[];
  readonly index: number;
  readonly growth: Growth;
}

function agedSlopes(model: Model, { phase, slopes, index, growth }: Ageing): AgeingPhase {
  const n = model.classes.length;
  const shares = new Float64Array(model.patches.length * n);
  const own = slopes[index];
  (phase.stages ?? []).forEach((stage, k) => {
    const yearsSlope = own?.kind === 'ageing' ? (own.stages?.[k]?.years ?? 0) : 0;
    model.patches.forEach((_, p) => {
      const place = p * n + stage.class;
      if (stage.as === 'geometric') {
        shares[place] = -yearsSlope / (stage.years * stage.years);
        return;
      }
      const survival = survivalOfYear(model, place);
      const by = fixedDurationSlopes({ survival, duration: stage.years, growthRate: growth.growthRate });
      const ofSurvival = by.bySurvival * survivalSlope(model, slopes, place);
      shares[place] = ofSurvival + by.byDuration * yearsSlope + by.byGrowthRate * growth.growthSlope;
    });
  });
  return { ...phase, advanceIn: shares };
}

/** The product rule over all survivals of the year. */
function survivalSlope({ phases }: Model, slopes: readonly (Phase | null)[], place: number): number {
  let [product, slope] = [1, 0];
  phases.forEach((phase, index) => {
    if (phase.kind !== 'survival') return;
    const value = phase.survival.epochs[0]?.[place] ?? 0;
    const moved = slopes[index];
    const own = moved?.kind === 'survival' ? (moved.survival.epochs[0]?.[place] ?? 0) : 0;
    slope = slope * value + product * own;
    product *= value;
  });
  return slope;
}

function between(left: Float64Array, matrix: SparseMatrix, right: Float64Array): number {
  return multiply(matrix, right).reduce((sum, value, i) => sum + (left[i] ?? 0) * value, 0);
}
