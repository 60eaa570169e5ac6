// How the share that is taken moves with the animals that are there.
import type { MovePhase, TakePhase } from '../../model/model.ts';
import { takenShares } from '../handling.ts';

export interface MovingState {
  readonly state: Float64Array;
  readonly stateSlope: Float64Array;
  readonly classes: number;
}

/**
 * By cell, the slope of the share taken along the slope of the animals, by central differences: quotas and shares of an
 * excess have a kink where they begin. 0 where a fixed share is taken.
 */
export function takenSlope(phase: TakePhase | MovePhase, { state, stateSlope, classes }: MovingState): Float64Array {
  const steepest = stateSlope.reduce((most, slope) => Math.max(most, Math.abs(slope)), 0);
  const largest = state.reduce((most, value) => Math.max(most, value), 0);
  if (phase.rule === 'share' || steepest === 0 || largest === 0) return new Float64Array(state.length);
  const step = (1e-6 * largest) / steepest;
  const at = (sign: number): Float64Array => {
    const animals = state.map((value, i) => Math.max(0, value + sign * step * (stateSlope[i] ?? 0)));
    return takenShares(phase, { animals, classes, step: 1 });
  };
  const behind = at(-1);
  return at(1).map((share, i) => (share - (behind[i] ?? 0)) / (2 * step));
}
