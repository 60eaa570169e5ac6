// Every number that is swept as a parameter of its own, so that it can be told what rests on it. Parts of a model that are words and
// plain numbers, without expressions, take the number itself: they are read again at every point.
import type { SpecPath } from '../../spec/document.ts';
import type { Spec } from '../../spec/schema/spec.ts';
import { takesExpression } from '../../spec/shape/unit-at.ts';
import type { Factor, Value } from '../design/factor.ts';
import { placesIn, scenarioName, withValueAt } from '../places.ts';
import { freshName } from './named-places.ts';

export interface NamedFactors {
  readonly spec: Spec;
  /** Parameters that stand for factors. */
  readonly names: readonly string[];
  /** The spec, or one of its plans laid over it, with values of the factors. */
  withValues(spec: Spec, values: readonly Value[]): Spec;
}

/** Sections of which no part is kept, and that no plan changes. */
const plainSections: readonly (string | number | undefined)[] = ['start', 'outcomes', 'money', 'variation'];

/** `spec` has the base values. Null where a factor is no number, or stands where no expression may; which scenario is run is left to others. */
export function namedFactors(spec: Spec, factors: readonly Factor[]): NamedFactors | null {
  const places = new Map(placesIn(spec).map((place) => [place.name, place] as const));
  let named = spec;
  const targets: (SpecPath | null)[] = [];
  const names: string[] = [];
  for (const { name } of factors) {
    const isParameter = Object.hasOwn(spec.parameters ?? {}, name);
    const path = isParameter ? ['parameters', name] : places.get(name)?.path;
    const value = isParameter ? spec.parameters?.[name] : places.get(name)?.value;
    if (name === scenarioName) {
      targets.push(null);
      continue;
    }
    if (path === undefined || typeof value !== 'number') return null;
    if (plainSections.includes(path[0])) {
      targets.push(path);
      continue;
    }
    if (!takesExpression(spec, path)) return null;
    const own = freshName(named);
    named = withValueAt(named, path, own);
    named = { ...named, parameters: { ...named.parameters, [own]: value } };
    names.push(own);
    targets.push(['parameters', own]);
  }
  const withValues = (other: Spec, values: readonly Value[]): Spec =>
    targets.reduce((changed, path, k) => {
      const value = values[k];
      // A plan that is laid has no money of its own.
      if (path === null || value === undefined || (path[0] === 'money' && other.money === undefined)) return changed;
      return withValueAt(changed, path, value);
    }, other);
  return { spec: named, names, withValues };
}
