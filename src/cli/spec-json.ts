// A spec as its author could have written it in JSON, so that what is printed can be read again.
import type { Spec } from '../spec/schema/spec.ts';

export function specJson({ named, ...core }: Spec): unknown {
  return { ...core, ...named };
}
