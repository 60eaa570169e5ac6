// The part of the analysis about numbers that depend on numbers.
import { because, type Answer } from './answer.ts';
import { equilibriaFrom, invasionGrowth, longestFollowed, startThreshold, type Equilibrium } from './equilibrium.ts';
import type { AnalysisInput } from './input.ts';
import { stateName } from './label.ts';
import type { Analysis } from './schema.ts';

/** Multiples of the start from which equilibria are looked for. */
const multiples = [100, 10, 1, 0.1, 0.01];

/** States times years that each start is followed: seconds. */
const mostFollowed = 2e7;

export function equilibriumAnswer(input: AnalysisInput): Answer<NonNullable<Analysis['equilibrium']>> {
  const { yearMap, start, block } = input;
  if (!yearMap) return because('No rate depends on numbers, so nothing holds the population at a level.');
  const from = start?.some((animals) => animals > 0) ? start : new Float64Array(block.states.length).fill(1);
  const total = sum(from);
  const starts = multiples.map((times) => from.map((animals) => animals * times));
  const longest = Math.min(longestFollowed, Math.ceil(mostFollowed / yearMap.states));
  const found = equilibriaFrom(yearMap, starts, longest);
  if (found.length === 0) return because(longest < longestFollowed ? movingStill(longest) : movingForEver);
  const invasion = invasionGrowth(yearMap);
  const threshold = invasion < 1 ? startThreshold(yearMap, from, [1e-4 / Math.max(1, total), 100]) : null;
  return {
    value: {
      invasionGrowth: invasion,
      states: found.map((equilibrium) => told(input, equilibrium)),
      startThreshold: threshold && {
        diesBelow: threshold.diesBelow * total,
        lastsAbove: threshold.lastsAbove * total,
      },
    },
  };
}

const movingForEver = 'Numbers never stand still: they swing or grow without end.';

function movingStill(years: number): string {
  return `Numbers still moved after ${years} years, which is how far so many states are followed; --at equilibrium follows the start for ${longestFollowed}.`;
}

function told({ block }: AnalysisInput, { animals, leadingModulus, stable }: Equilibrium) {
  return {
    animals: Array.from(animals, (count, s) => ({ ...stateName(block, s), animals: count })),
    total: sum(animals),
    leadingModulus,
    stable,
  };
}

function sum(x: Float64Array): number {
  return x.reduce((total, value) => total + value, 0);
}
