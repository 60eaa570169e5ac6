// The record of the count: what each outcome looks at.
import * as layout from '../../../assembly/layout.ts';
import type { OutcomeRule } from '../../model/model.ts';
import type { PhasePlace } from './place.ts';
import { record } from './record.ts';
import { plain, type SectionList } from './section.ts';

export function countRecord({ list, model, index, key }: PhasePlace): Int32Array {
  const { outcomes } = model;
  const weights = Float64Array.from(outcomes.flatMap((outcome) => outcome.weights.flatMap((row) => [...row])));
  const patches = Int32Array.from(outcomes.flatMap((outcome) => [...outcome.patches]));
  return record(layout.opCount, key, index, [
    list.add(plain(layout.kindOutcomeWeights, weights, 'outcomes')),
    list.add(plain(layout.kindOutcomePatches, patches, 'outcomes')),
    outcomes.length,
    addRules(list, outcomes),
  ]);
}

const overCodes = {
  sum: layout.overSum,
  smallest: layout.overSmallest,
  largest: layout.overLargest,
} as const;

/** None where every outcome is the sum of one row of weights over its patches. */
function addRules(list: SectionList, outcomes: readonly OutcomeRule[]): number {
  if (outcomes.every(({ weights, over }) => weights.length === 1 && over === 'sum')) return layout.none;
  let first = 0;
  const rules = outcomes.flatMap(({ weights, over }) => {
    const rule = [first, weights.length, overCodes[over]];
    first += weights.length;
    return rule;
  });
  return list.add(plain(layout.kindOutcomeRules, Int32Array.from(rules), 'outcomes'));
}
