// The share of a stage that goes on to the next each step, from how long the stage lasts.
import { pow } from '../machine/pinned.ts';

export interface Stage {
  /** Survival of a step within the stage, above 0. */
  readonly survival: number;
  /** Steps that the stage lasts, at least 1. */
  readonly duration: number;
  /** Growth rate λ of the whole population; 1 for one that stands still. */
  readonly growthRate: number;
}

/**
 * Share γ of the survivors that go on, for a stage of fixed duration T with a stable make-up of ages within it:
 * γ = (x^T − x^(T−1)) / (x^T − 1) with x = survival/λ (Crouse, Crowder & Caswell 1987; formula from memory), 1/T at x = 1.
 * It depends on λ, which depends on it: repeat until both agree. The stay is survival · (1 − γ), the step on survival · γ.
 */
export function fixedDurationAdvance({ survival, duration, growthRate }: Stage): number {
  const x = survival / growthRate;
  const fromOne = x - 1;
  if (Math.abs(fromOne) < 1e-5) return 1 / duration + (fromOne * (duration - 1)) / (2 * duration);
  const beforeLast = pow(x, duration - 1);
  return (beforeLast * fromOne) / (beforeLast * x - 1);
}
