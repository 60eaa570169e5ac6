// Where the rates of a phase stand, for every patch and for one.
import type { SpecPath } from '../document.ts';
import type { Draft } from './draft.ts';
import { tellUnknown } from './tell.ts';

type Numbers = Readonly<Record<string, unknown>>;

export interface RateSection {
  /** The key under `in` and a patch. */
  readonly key: string;
  /** What a class has in a patch before any action; null where it has none. */
  readonly read: (patch: string, one: string) => number | string | null;
  /** Writes under `in`. */
  readonly write: (patch: string, one: string, expression: number | string) => void;
}

/** By the name of a phase, or `births`; null after telling that it has no rates by class. */
export function rateSection(draft: Draft, phase: string, path: SpecPath): RateSection | null {
  const { spec } = draft;
  const sections = new Map<string, { readonly key: string; readonly everywhere: Numbers | number | string }>();
  if (spec.year.includes('survival')) sections.set('survival', { key: 'survival', everywhere: spec.survival ?? {} });
  if (spec.year.includes('breeding')) {
    for (const name of ['births', 'breeding']) sections.set(name, { key: 'births', everywhere: spec.births ?? {} });
  }
  for (const [name, named] of Object.entries(spec.named)) {
    if (named.kind === 'survival') sections.set(name, { key: name, everywhere: named.survival });
    if (named.kind === 'breeding') sections.set(name, { key: name, everywhere: named.births });
    if (named.kind === 'dispersal' && named.leaving !== undefined)
      sections.set(name, { key: name, everywhere: named.leaving });
  }
  const found = sections.get(phase);
  if (found === undefined) {
    const what = 'phase with rates by class called';
    tellUnknown(draft, path, { code: 'unknown-phase', what, name: phase, known: [...sections.keys()], part: 'key' });
    return null;
  }
  const { key, everywhere } = found;
  const written = (patch: string): Numbers => numbersIn(spec.in?.[patch], key);
  return {
    key,
    read: (patch, one) =>
      expressionIn(written(patch)[one]) ?? expressionIn(typeof everywhere === 'object' ? everywhere[one] : everywhere),
    write: (patch, one, expression) => {
      spec.in = {
        ...spec.in,
        [patch]: { ...spec.in?.[patch], [key]: { ...numbersIn(spec.in?.[patch], key), [one]: expression } },
      };
    },
  };
}

function numbersIn(rates: object | undefined, key: string): Record<string, number | string> {
  const own: unknown = Object.entries(rates ?? {}).find(([name]) => name === key)?.[1];
  if (typeof own !== 'object' || own === null) return {};
  return Object.fromEntries(
    Object.entries(own).flatMap(([name, value]) => {
      const expression = expressionIn(value);
      return expression === null ? [] : [[name, expression]];
    }),
  );
}

function expressionIn(value: unknown): number | string | null {
  return typeof value === 'number' || typeof value === 'string' ? value : null;
}
