// Crowding with its coefficients solved: from the base model at mean rates, held under every plan.
import type { RateTable } from '../model/model.ts';

/**
 * How the multiplier g depends on the count N: 1, 1/(1+aN), exp(−bN), exp(−bN^s), (1+aN)^−s, or min(1, K/N). Times the Allee
 * factor N/(N+h).
 */
export type CrowdingForm = 'none' | 'beverton-holt' | 'ricker' | 'theta' | 'hassell' | 'ceiling';

/** For one crowding, by patch. `coefficient` is a, b or K as the form needs. */
export interface CrowdingCoefficients {
  readonly form: readonly CrowdingForm[];
  /** In the first year. */
  readonly coefficient: Float64Array;
  /** One number a patch, where capacities change with the years. */
  readonly coefficientByYear?: RateTable;
  /** s of the forms that have one; 1 where it is missing. */
  readonly shapeNumber?: number;
  /** h of the Allee factor; 0 where there is none. */
  readonly alleeHalf: Float64Array;
}
