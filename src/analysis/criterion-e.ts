// The windows of criterion E of the IUCN Red List (2012, version 3.1), and what a run says of them. Never a listing: that takes
// the guidelines, all criteria and those who assess.
import { nearZero } from '../compile/year-map.ts';
import type { Model } from '../model/model.ts';
import { leading } from '../numeric/leading.ts';
import type { CompiledModel } from '../pipeline.ts';
import type { CriterionE, CriterionWindow, RunResults } from '../results/results.ts';
import { lifeAt } from './life-at.ts';
import { generationTimes } from './life-history.ts';
import { vectorsOf } from './sensitivity.ts';

const mostYears = 100;

/**
 * From the generation length in years: a chance of extinction of at least 50 % within 10 years or 3 generations, 20 % within
 * 20 years or 5 generations (whichever is longer, up to 100 years), 10 % within 100 years. Whole years, the next above.
 */
export function criterionWindows(
  generation: number,
): readonly Pick<CriterionWindow, 'category' | 'years' | 'chance'>[] {
  const within = (years: number, generations: number): number =>
    Math.min(mostYears, Math.max(years, Math.ceil(generations * generation - 1e-9)));
  return [
    { category: 'Critically Endangered', years: within(10, 3), chance: 0.5 },
    { category: 'Endangered', years: within(20, 5), chance: 0.2 },
    { category: 'Vulnerable', years: mostYears, chance: 0.1 },
  ];
}

/** Null where no outcome is that nobody is left anywhere, or where there is no generation length. */
export function criterionE(compiled: CompiledModel, results: RunResults): CriterionE | null {
  const index = compiled.model.outcomes.findIndex((rule) => isExtinction(rule, compiled.model));
  const outcome = results.outcomes[index];
  const generation = outcome === undefined ? null : generationLength(compiled);
  if (outcome === undefined || generation === null) return null;
  const windows = criterionWindows(generation).map((window): CriterionWindow => {
    const at = outcome.byYear[window.years - 1];
    if (at === undefined) return { ...window, found: null, says: 'looks less far ahead' };
    const { ever, lower, upper } = at;
    const says =
      lower >= window.chance ? 'consistent with' : upper < window.chance ? 'not consistent with' : 'undecided';
    return { ...window, found: { probability: ever, lower, upper }, says };
  });
  return { outcome: outcome.name, generationLength: generation, windows };
}

/** The results with what they say of the windows, where there is anything to say. */
export function withCriterionE(compiled: CompiledModel, results: RunResults): RunResults {
  const found = criterionE(compiled, results);
  return found === null ? results : { ...results, criterionE: found };
}

function isExtinction(
  { weights, patches, over, event, counts }: Model['outcomes'][number],
  { classes }: Model,
): boolean {
  const everybody =
    weights.length === 1 && weights[0]?.length === classes.length && weights[0].every((one) => one === 1);
  return (
    everybody &&
    over === 'sum' &&
    patches.every((one) => one === 1) &&
    event.is === 'below' &&
    event.than <= 1 &&
    counts === 1
  );
}

/** Mean age of mothers in the stable population near zero, in years. */
function generationLength(compiled: CompiledModel): number | null {
  const { block, split } = lifeAt(compiled, 'zero', nearZero(compiled));
  const vectors = vectorsOf(leading(block.matrix));
  return vectors === null ? null : generationTimes(split, vectors, null).stable;
}
