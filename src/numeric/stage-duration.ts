// The share of a stage that goes on to the next each step, from how long the stage lasts, and how it moves with what it rests on.
import { log, pow } from '../machine/pinned.ts';

export interface Stage {
  /** Survival of a step within the stage. */
  readonly survival: number;
  /** Steps that the stage lasts, at least 1. */
  readonly duration: number;
  /** Growth rate λ of the whole population, above 0; 1 for one that stands still. */
  readonly growthRate: number;
}

/**
 * Share γ of the survivors that go on, for a stage of fixed duration T with a stable make-up of ages within it:
 * γ = (x^T − x^(T−1)) / (x^T − 1) with x = survival/λ (Crouse, Crowder & Caswell 1987; formula from memory), 1/T at x = 1.
 * It depends on λ, which depends on it: repeat until both agree. The stay is survival · (1 − γ), the step on survival · γ.
 */
export function fixedDurationAdvance({ survival, duration, growthRate }: Stage): number {
  const x = survival / growthRate;
  if (x === 0) return duration === 1 ? 1 : 0;
  const fromOne = x - 1;
  if (Math.abs(fromOne) < 1e-5) return 1 / duration + (fromOne * (duration - 1)) / (2 * duration);
  const beforeLast = pow(x, duration - 1);
  return (beforeLast * fromOne) / (beforeLast * x - 1);
}

/** How γ moves with each of the three. */
export interface StageSlopes {
  readonly bySurvival: number;
  readonly byDuration: number;
  readonly byGrowthRate: number;
}

/**
 * With y = ln x: γ = (1 − e^−y) / (1 − e^−Ty), so dγ/dy = γ (1/(x − 1) − T/(x^T − 1)) and dγ/dT = −γ y / (x^T − 1) (derived).
 * For stages of which nobody survives all slopes are taken as 0.
 */
export function fixedDurationSlopes(stage: Stage): StageSlopes {
  const { survival, duration, growthRate } = stage;
  const x = survival / growthRate;
  if (x === 0) return { bySurvival: 0, byDuration: 0, byGrowthRate: 0 };
  const y = log(x);
  const share = fixedDurationAdvance(stage);
  const byLog = share * logSlope(y, x, duration);
  const whole = pow(x, duration) - 1;
  const byDuration = Math.abs(y * duration) < 1e-6 ? -share / duration : (-share * y) / whole;
  return { bySurvival: byLog / survival, byDuration, byGrowthRate: -byLog / growthRate };
}

/** 1/(e^y − 1) − T/(e^Ty − 1); near 0 by the series of y/(e^y − 1), since both parts grow without bound there. */
function logSlope(y: number, x: number, duration: number): number {
  if (Math.abs(y * duration) >= 0.02) return 1 / (x - 1) - duration / (pow(x, duration) - 1);
  const squared = duration * duration;
  return (duration - 1) / 2 + ((1 - squared) * y) / 12 - ((1 - squared * squared) * y * y * y) / 720;
}
