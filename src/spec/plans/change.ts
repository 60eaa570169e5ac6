// Rates or named numbers that change.
import type { EffectSpec } from '../schema/spec.ts';
import type { SpecPath } from '../document.ts';
import { singleYears } from '../expand-stages.ts';
import type { Draft, NamedAction } from './draft.ts';
import { addEffect } from './targets.ts';
import { rateSection, type ClassOrYear, type RateSection } from './rate-section.ts';
import { tellMistake, tellUnknown } from './tell.ts';
import { whenOf } from './when.ts';

export function layChange(draft: Draft, { name, spec }: NamedAction<'change'>): void {
  const path = ['actions', name];
  if (spec.parameters === undefined && spec.rates === undefined) {
    tellMistake(draft, 'plan-shape', path, {
      message: `\`${name}\` changes nothing`,
      part: 'key',
      details: { expected: '`parameters` or `rates`' },
    });
  }
  if (spec.in !== undefined && spec.rates === undefined) {
    tellMistake(draft, 'plan-shape', [...path, 'in'], {
      message: 'A parameter changes wherever it stands',
      part: 'key',
      details: { expected: '`rates` with `in`, or `parameters` without it' },
    });
  }
  const when = whenOf(draft, spec, path);
  for (const [key, effect] of Object.entries(spec.parameters ?? {})) {
    layParameter(draft, key, { effect, place: { when, path: [...path, 'parameters', key] } });
  }
  const patches = patchesOf(draft, spec.in, [...path, 'in']);
  for (const [phase, classes] of Object.entries(spec.rates ?? {})) {
    const section = rateSection(draft, phase, [...path, 'rates', phase]);
    if (section === null) continue;
    for (const [one, effect] of Object.entries(classes)) {
      const change = { section, patches, effect, when, path: [...path, 'rates', phase, one] };
      for (const own of classesIn(draft, one)) layRate(draft, { ...change, one: own });
    }
  }
}

interface Placed {
  readonly effect: EffectSpec;
  readonly place: { readonly when: ReturnType<typeof whenOf>; readonly path: SpecPath };
}

function layParameter(draft: Draft, key: string, { effect, place }: Placed): void {
  const { parameters = {} } = draft.spec;
  const parameter = parameters[key];
  if (parameter === undefined) {
    const known = Object.keys(parameters);
    tellUnknown(draft, place.path, { code: 'unknown-name', what: 'parameter', name: key, known, part: 'key' });
    return;
  }
  const inside = typeof parameter === 'object';
  const at = inside ? ['parameters', key, 'value'] : ['parameters', key];
  const target = () => ({
    base: inside ? parameter.value : parameter,
    dimension: 'share' as const,
    words: `\`${key}\``,
    write: (expression: number | string) => {
      parameters[key] = inside ? { ...parameter, value: expression } : expression;
    },
  });
  addEffect(draft, at, { target, effect, place });
}

/** Names of patches; null for all. */
function patchesOf(
  draft: Draft,
  asked: string | readonly string[] | undefined,
  path: SpecPath,
): readonly string[] | null {
  if (asked === undefined) return null;
  const known = draft.spec.patches.map(({ name }) => name);
  return [asked].flat().filter((patch, k) => {
    if (known.includes(patch)) return true;
    const at = typeof asked === 'string' ? path : [...path, k];
    tellUnknown(draft, at, { code: 'unknown-patch', what: 'patch', name: patch, known, part: 'value' });
    return false;
  });
}

/** A stage that is followed year by year is its years, so that changes of it and of one year of it meet in the same numbers. */
function classesIn({ spec }: Draft, one: string): readonly ClassOrYear[] {
  const years = singleYears(spec);
  const own = years.get(one);
  if (own !== undefined) return own.map((name) => ({ name, stage: one }));
  const stage = [...years].find(([, names]) => names.includes(one))?.[0] ?? null;
  return [{ name: one, stage }];
}

interface RateChange {
  readonly section: RateSection;
  readonly one: ClassOrYear;
  readonly patches: readonly string[] | null;
  readonly effect: EffectSpec;
  readonly when: ReturnType<typeof whenOf>;
  readonly path: SpecPath;
}

/** Written for every patch by itself, so that actions in some and in all patches meet in the same numbers. */
function layRate(draft: Draft, { section, one, patches, effect, when, path }: RateChange): void {
  for (const patch of patches ?? draft.spec.patches.map(({ name }) => name)) {
    const target = () => ({
      base: section.read(patch, one),
      dimension: 'share' as const,
      words: `the rate of ${one.name} in ${patch}`,
      write: (expression: number | string) => {
        section.write(patch, one.name, expression);
      },
    });
    addEffect(draft, ['in', patch, section.key, one.name], { target, effect, place: { when, path } });
  }
}
