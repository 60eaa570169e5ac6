// Would another sound model reverse the order of the plans? Each variant is run and compared like the model itself.
import type { Spec } from '../spec/schema/spec.ts';
import type { PlanDifference, Comparison, Robustness } from './results.ts';
import { planOrder } from './statement.ts';
import { variantsOf, type Variant } from './variants.ts';

/** A whole comparison of a changed spec, or why no plan of it can be run; null where the work was stopped. */
export type CompareSpec = (spec: Spec) => Promise<Comparison | { readonly failure: string } | null>;

/** Those that were finished before the work was stopped. */
export async function robustnessOf(spec: Spec, own: Comparison, compare: CompareSpec): Promise<readonly Robustness[]> {
  const done: Robustness[] = [];
  for (const variant of variantsOf(spec)) {
    const found = variant.spec === null ? { failure: variant.notRun ?? '' } : await compare(variant.spec);
    if (found === null) break;
    done.push('failure' in found ? notRun(variant, found.failure) : besideOwn(variant, own, found));
  }
  return done;
}

function notRun({ variant, what }: Variant, why: string): Robustness {
  return { variant, what, notRun: why, order: [], supports: [], holds: null, reversed: [] };
}

/** Pairs that the model itself tells apart in the first objective, and that the other one puts the other way or together. */
function besideOwn({ variant, what }: Variant, own: Comparison, other: Comparison): Robustness {
  const [objective] = own.objectives;
  const reversed = own.differences
    .filter((one) => one.outcome === objective?.name && one.toldApart)
    .flatMap((one): Robustness['reversed'] => {
      const there = sameIn(other, one);
      if (there === undefined || there.estimate * one.estimate > 0) return [];
      const toBetter = (difference: number): boolean => difference < 0 === (objective?.better === 'less');
      const [better, worse] = toBetter(one.estimate) ? [one.from, one.to] : [one.to, one.from];
      return [{ better, worse, toldApart: there.toldApart, equal: there.estimate === 0 }];
    });
  const order = objective === undefined ? [] : planOrder({ plans: other.scenarios }, objective).map(({ name }) => name);
  const supports = other.statement.plans;
  return { variant, what, notRun: null, order, supports, holds: reversed.length === 0, reversed };
}

function sameIn({ differences }: Comparison, { outcome, from, to }: PlanDifference): PlanDifference | undefined {
  return differences.find((one) => one.outcome === outcome && one.from === from && one.to === to);
}
