// Outcomes that say nothing about the years to come, since they are so from the start, or cannot be looked at.
import type { CompiledModel } from '../../pipeline.ts';
import type { OutcomeRule } from '../../model/model.ts';
import type { Finding } from '../../spec/finding.ts';

export function settledOutcomes({ model, startAnimals }: CompiledModel): readonly Finding[] {
  return model.outcomes.flatMap((rule) => {
    const told = toldOf(rule, countAt(startAnimals, rule));
    if (told === null) return [];
    const path = ['outcomes', rule.name];
    return [{ severity: 'warning', code: 'already-so', path, part: 'key', ...told }];
  });
}

function toldOf({ name, event }: OutcomeRule, count: number): Pick<Finding, 'message' | 'details'> | null {
  if (event.is === 'fallen') {
    if (count > 0) return null;
    return {
      message: `\`${name}\` cannot be: nobody is counted at the start, so no count can fall`,
      details: { fix: 'Count other classes or patches.' },
    };
  }
  if (event.is === 'below' ? count >= event.than : count <= event.than) return null;
  return {
    message: `\`${name}\` is so from the start: ${count} are counted there, which is ${event.is} ${event.than}`,
    details: {
      reason: `Its chance then says how likely the count stays ${event.is}, not how likely it comes to be.`,
      fix: `Choose a ${event.is === 'below' ? 'lower' : 'higher'} threshold, or count other classes or patches.`,
    },
  };
}

/** As the kernel counts. */
function countAt(animals: Float64Array, { weights, patches, over }: OutcomeRule): number {
  const own = [...patches.keys()].filter((p) => patches[p] === 1);
  const inPatch = (row: Float64Array, p: number): number =>
    row.reduce((sum, weight, c) => sum + weight * (animals[p * row.length + c] ?? 0), 0);
  if (over === 'sum') {
    return Math.min(...weights.map((row) => own.reduce((sum, p) => sum + inPatch(row, p), 0)));
  }
  const counts = own.map((p) => Math.min(...weights.map((row) => inPatch(row, p))));
  return over === 'smallest' ? Math.min(...counts) : Math.max(...counts);
}
