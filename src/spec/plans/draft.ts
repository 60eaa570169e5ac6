// A spec in the making: the base with what the actions of a scenario change, and the way back from each changed place.
import type { Finding } from '../finding.ts';
import type { SpecPath } from '../document.ts';
import type { ActionSpec, Spec } from '../schema/spec.ts';
import type { TimedEffect } from './compose.ts';
import type { Dimension } from '../quantity.ts';

type Mutable<Value> = { -readonly [Key in keyof Value]: Value[Key] };

/** One place whose number effects change. */
export interface Target {
  /** The number before any effect; null where there is none. */
  readonly base: number | string | null;
  readonly dimension: Dimension;
  /** What to call it, such as `the capacity of Saltmarsh`. */
  readonly words: string;
  readonly write: (expression: number | string) => void;
  readonly effects: { readonly effect: TimedEffect; readonly path: SpecPath }[];
}

export interface Draft {
  readonly spec: Mutable<Spec>;
  readonly firstYear: number;
  readonly lastYear: number;
  /** Where a place of the draft stands in the text, by the path in the draft as JSON. */
  readonly origins: Map<string, SpecPath>;
  /** By the path in the draft as JSON. */
  readonly targets: Map<string, Target>;
  readonly findings: Finding[];
}

export interface NamedAction<Kind extends ActionSpec['kind'] = ActionSpec['kind']> {
  readonly name: string;
  readonly spec: Extract<ActionSpec, { readonly kind: Kind }>;
}

export function originOf(draft: Pick<Draft, 'origins'>, path: SpecPath): SpecPath {
  for (let length = path.length; length > 0; length--) {
    const origin = draft.origins.get(JSON.stringify(path.slice(0, length)));
    if (origin !== undefined) return [...origin, ...path.slice(length)];
  }
  return path;
}
