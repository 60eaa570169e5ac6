// Screening (Morris 1991; Campolongo et al. 2007): how much a measure moves when one factor goes from one end of its range to
// the other, averaged over many places.
import { morrisSize, morrisStep, morrisTurn, morrisShare } from '../design/morris.ts';
import type { Observed } from './observed.ts';

export interface FactorScreen {
  /** Mean size of the effects, over the whole range of the factor, whatever their sign. */
  readonly meanSize: number;
  readonly mean: number;
  /** Spread of the effects between places: large where the factor acts together with others or not along a line. */
  readonly spread: number;
  /** Standard error of `meanSize` from the number of walks. */
  readonly standardError: number;
  /** Size that effects would have from the number of replicates alone. */
  readonly noise: number;
  readonly effects: number;
}

/** Points in the order of the design `morris`; null for a factor without two whole effects. */
export function screening(observed: Observed, factors: number, seed: number): readonly (FactorScreen | null)[] {
  const size = morrisSize(factors);
  const walks = Math.floor(observed.first.length / size);
  return Array.from({ length: factors }, (_, factor) => {
    const [first, second]: [number[], number[]] = [[], []];
    for (let walk = 0; walk < walks; walk++) {
      const before = walk * size + morrisTurn(seed, factors, { walk, factor });
      const move =
        morrisShare(seed, factors, { point: before + 1, factor }) -
        morrisShare(seed, factors, { point: before, factor });
      const step = move > 0 ? morrisStep : -morrisStep;
      const effect = (values: Float64Array): number => ((values[before + 1] ?? NaN) - (values[before] ?? NaN)) / step;
      const [one, other] = [effect(observed.first), effect(observed.second)];
      if (Number.isNaN(one + other)) continue;
      first.push(one);
      second.push(other);
    }
    return first.length < 2 ? null : screened(first, second);
  });
}

function screened(first: readonly number[], second: readonly number[]): FactorScreen {
  const effects = first.map((one, i) => (one + (second[i] ?? 0)) / 2);
  const sizes = effects.map(Math.abs);
  const noise = mean(first.map((one, i) => (one - (second[i] ?? 0)) * (one - (second[i] ?? 0)))) / 4;
  return {
    meanSize: mean(sizes),
    mean: mean(effects),
    spread: deviation(effects),
    standardError: deviation(sizes) / Math.sqrt(sizes.length),
    noise: Math.sqrt(noise),
    effects: effects.length,
  };
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

function deviation(values: readonly number[]): number {
  const middle = mean(values);
  return Math.sqrt(values.reduce((sum, value) => sum + (value - middle) * (value - middle), 0) / (values.length - 1));
}
