// Places of a model as named parameters: a number that stands at a place becomes an expression that is the name of a new one.
import type { Spec } from '../../spec/schema/spec.ts';
import type { Factor } from '../design/factor.ts';
import { placesIn, withValueAt } from '../places.ts';

export interface Named {
  readonly spec: Spec;
  /** In their order, each with the name of a parameter. */
  readonly names: readonly string[];
  /** Those that are new. */
  readonly fresh: readonly string[];
}

/** Null where a factor is neither a parameter nor a number at a place. `spec` has the base values of the factors. */
export function namedPlaces(spec: Spec, factors: readonly Factor[]): Named | null {
  const places = new Map(placesIn(spec).map((place) => [place.name, place] as const));
  let named = spec;
  const names: string[] = [];
  for (const { name } of factors) {
    if (Object.hasOwn(spec.parameters ?? {}, name)) {
      names.push(name);
      continue;
    }
    const place = places.get(name);
    if (place === undefined || typeof place.value !== 'number') return null;
    const own = freshName(named);
    named = withValueAt(named, place.path, own);
    named = { ...named, parameters: { ...named.parameters, [own]: place.value } };
    names.push(own);
  }
  return { spec: named, names, fresh: names.filter((name) => !Object.hasOwn(spec.parameters ?? {}, name)) };
}

export function freshName({ parameters = {} }: Spec): string {
  let name = 'swept';
  while (Object.hasOwn(parameters, name)) name += '_';
  return name;
}
