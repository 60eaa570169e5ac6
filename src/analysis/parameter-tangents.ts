// How the matrix moves with each named number of a model: through expressions, rates, kernels, their normalisation, and crowding.
import type { BlockMatrix } from '../compile/block-matrix.ts';
import { coefficientSlopes, type CrowdingRule } from '../compile/slopes/coefficient-slopes.ts';
import { withStageSlopes } from '../compile/slopes/stage-slopes.ts';
import { yearSlope } from '../compile/slopes/year-slope.ts';
import { slopesOf, type ModelSlopes } from '../model/slopes/slopes.ts';
import { principalPart } from '../numeric/principal-part.ts';
import type { SparseMatrix } from '../numeric/sparse.ts';
import type { CompiledModel } from '../pipeline.ts';
import { asNow } from '../spec/plans/lay.ts';
import type { ParameterTangent } from './input.ts';
import { placesOf } from './label.ts';
import { differenceTangent } from './parameter-differences.ts';

export interface ParameterTangents {
  readonly parameterTangents: readonly ParameterTangent[];
  /** Names of numbers beside which the model allows no other. */
  readonly withoutTangent: readonly string[];
}

/**
 * ∂A/∂θ at the same state, exact where the slopes of the model tell all; by differences where a number is used in a place whose
 * slope is not known. Numbers that move nothing are left out.
 */
export function parameterTangents(base: CompiledModel, block: BlockMatrix, state: Float64Array): ParameterTangents {
  const read = slopesOf(base.laid);
  const crowded = base.model.crowding.length > 0 && state.some((animals) => animals > 0);
  const withoutTangent: string[] = [];
  const parameterTangents = base.model.parameters.flatMap(({ name, value }): ParameterTangent[] => {
    const written = read(name);
    const slopes = written === null ? null : withStageSlopes(base, written);
    const along = (rule: CrowdingRule): SparseMatrix | null => exactTangent({ base, block, state, slopes }, rule);
    const held = along('held');
    const anew = crowded ? along('solved anew') : null;
    const exact = held !== null && (anew !== null || !crowded);
    const matrixTangent = exact ? held : differenceTangent({ base, block, state }, { name, value, rule: 'held' });
    const solvedAnew = exact
      ? anew
      : crowded
        ? differenceTangent({ base, block, state }, { name, value, rule: 'solved anew' })
        : null;
    const moves = (matrixTangent?.values.length ?? 0) + (solvedAnew?.values.length ?? 0) > 0;
    if (matrixTangent === null) withoutTangent.push(name);
    if (matrixTangent === null || !moves) return [];
    return [{ name, value, matrixTangent, exact, ...(solvedAnew === null ? {} : { solvedAnew }) }];
  });
  return { parameterTangents, withoutTangent };
}

interface Along {
  readonly base: CompiledModel;
  readonly block: BlockMatrix;
  readonly state: Float64Array;
  readonly slopes: ModelSlopes | null;
}

/** Null where the slopes do not tell all, or do not exist. */
function exactTangent({ base, block, state, slopes }: Along, rule: CrowdingRule): SparseMatrix | null {
  if (slopes === null || slopes.missed.length > 0) return null;
  // Under a plan crowding is solved from another model than the one whose slopes these are.
  if (rule === 'solved anew' && base.scenario !== asNow) return null;
  const solved = coefficientSlopes(base, slopes, rule);
  if (solved === null) return null;
  const whole = yearSlope({ compiled: base, slopes, coefficientSlopes: solved }, state);
  return whole.values.every(Number.isFinite) ? principalPart(whole, placesOf(block)) : null;
}
