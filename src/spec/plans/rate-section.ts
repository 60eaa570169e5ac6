// Where the rates of a phase stand, for every patch and for one.
import type { SpecPath } from '../document.ts';
import type { Draft } from './draft.ts';
import { tellUnknown } from './tell.ts';

type Numbers = Readonly<Record<string, unknown>>;

export interface ClassOrYear {
  readonly name: string;
  /** Of which it is a year; null for a class that is written itself. */
  readonly stage: string | null;
}

export interface RateSection {
  /** The key under `in` and a patch. */
  readonly key: string;
  /** What a class has in a patch before any action, a year of a stage what the stage has; null where it has none. */
  readonly read: (patch: string, one: ClassOrYear) => number | string | null;
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
    read: (patch, { name, stage }) => {
      const keys = stage === null ? [name] : [name, stage];
      const own = keys.map((one) => written(patch)[one]);
      const shared = typeof everywhere === 'object' ? keys.map((one) => everywhere[one]) : [everywhere];
      return [...own, ...shared].map(expressionIn).find((found) => found !== null) ?? null;
    },
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
