// The part of the analysis about falling below a number by chance: the diffusion curve beside the simulated one.
import { because, type Answer, type Reasons } from './answer.ts';
import { fallingCurve, logDistanceOf, type SimulatedFall } from './falling.ts';
import type { AnalysisInput } from './input.ts';
import type { Analysis } from './schema.ts';
import type { Vectors } from './sensitivity.ts';

type Falling = NonNullable<Analysis['fallingBelow']>;

/** An outcome that the curve does not hold for is left out, with its reason under `fallingBelow.NAME`. */
export function fallingAnswer(input: AnalysisInput, vectors: Vectors | null, take: Reasons['take']): Answer<Falling> {
  const { falls, start, simulatedGrowth } = input;
  if (!falls) return because('The matrix was given without a model to simulate.');
  if (falls.value === null) return falls;
  if (!simulatedGrowth || simulatedGrowth.value === null) return simulatedGrowth ?? because('There is no drift.');
  if (vectors === null || !start) return because('There is no single stable distribution.');
  const { logGrowth: drift, yearlyVariance: variance } = simulatedGrowth.value;
  const curves = falls.value.flatMap((fall) => {
    const answer = curveOf(fall, logDistanceOf(fall, vectors, start), { drift, variance });
    return take(`fallingBelow.${fall.outcome}`, answer) ?? [];
  });
  return curves.length > 0 ? { value: curves } : because('No outcome is that numbers fall below what they start at.');
}

function curveOf(
  { outcome, definition, threshold, replicates, byYear }: SimulatedFall,
  logDistance: number,
  { drift, variance }: { readonly drift: number; readonly variance: number },
): Answer<Falling[number]> {
  if (logDistance === -Infinity) return because('In the long run nobody is there who is counted.');
  if (logDistance <= 0) return because('By what its animals are worth, the start is below the number already.');
  const curve = fallingCurve(byYear.length, logDistance, { drift, variance });
  const years = byYear.map(({ year, ever, lower, upper }, t) => {
    return { year, diffusion: curve[t] ?? 0, simulated: ever, lower, upper };
  });
  return { value: { outcome, definition, threshold, logDistance, drift, variance, replicates, years } };
}
