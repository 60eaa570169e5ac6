// How much an animal of each class counts.
import type { SpecPath } from '../spec/document.ts';
import { classIndex, classMask, type Context } from './context.ts';

export type CountedSpec = Readonly<Record<string, number>> | readonly string[] | 'all';

/** By class: 1 for each of a list, or the weights that are written; 0 for all others. */
export function classWeights(context: Context, counted: CountedSpec, path: SpecPath): Float64Array {
  if (counted === 'all' || isList(counted)) return Float64Array.from(classMask(context, counted, path));
  const weights = new Float64Array(context.classes.length);
  for (const [name, weight] of Object.entries(counted)) {
    const c = classIndex(context, name, [...path, name]);
    if (c >= 0) weights[c] = weight;
  }
  return weights;
}

function isList(counted: CountedSpec): counted is readonly string[] {
  return Array.isArray(counted);
}
