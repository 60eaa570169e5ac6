// The record of the count: what each outcome looks at, and what is watched to be compared with counts of the past.
import * as layout from '../../../assembly/layout.ts';
import type { Model, OutcomeRule } from '../../model/model.ts';
import { watchedCounts } from '../../model/watched.ts';
import type { PhasePlace } from './place.ts';
import { record } from './record.ts';
import { plain, type SectionList } from './section.ts';

export function countRecord({ list, model, index, key }: PhasePlace): Int32Array {
  const outcomes = countRules(model);
  const weights = Float64Array.from(outcomes.flatMap((outcome) => outcome.weights.flatMap((row) => [...row])));
  const patches = Int32Array.from(outcomes.flatMap((outcome) => [...outcome.patches]));
  return record(layout.opCount, key, index, [
    list.add(plain(layout.kindOutcomeWeights, weights, 'outcomes')),
    list.add(plain(layout.kindOutcomePatches, patches, 'outcomes')),
    outcomes.length,
    addRules(list, outcomes),
  ]);
}

type CountRule = Pick<OutcomeRule, 'weights' | 'patches' | 'over'>;

/** One column each, behind those of the whole and the patches. */
function countRules(model: Pick<Model, 'outcomes' | 'observed' | 'patches'>): readonly CountRule[] {
  const watched = watchedCounts(model).map(({ patches, weights }): CountRule => ({
    patches,
    weights: [weights],
    over: 'sum',
  }));
  return [...model.outcomes, ...watched];
}

/** Where the columns begin that tell what people do with animals. */
export function firstHandledColumn(model: Pick<Model, 'outcomes' | 'observed' | 'patches'>): number {
  return 1 + model.patches.length + countRules(model).length;
}

const overCodes = {
  sum: layout.overSum,
  smallest: layout.overSmallest,
  largest: layout.overLargest,
} as const;

/** None where every outcome is the sum of one row of weights over its patches. */
function addRules(list: SectionList, outcomes: readonly CountRule[]): number {
  if (outcomes.every(({ weights, over }) => weights.length === 1 && over === 'sum')) return layout.none;
  let first = 0;
  const rules = outcomes.flatMap(({ weights, over }) => {
    const rule = [first, weights.length, overCodes[over]];
    first += weights.length;
    return rule;
  });
  return list.add(plain(layout.kindOutcomeRules, Int32Array.from(rules), 'outcomes'));
}
