// Habitat that is made better or worse, lost, or made anew.
import type { SpecPath } from '../document.ts';
import { readMeasure } from '../quantity.ts';
import type { InlinePatchSpec } from '../schema/spec.ts';
import type { Draft, NamedAction } from './draft.ts';
import { addEffect, type EffectPlace } from './targets.ts';
import { tellMistake, tellUnknown } from './tell.ts';
import { whenOf } from './when.ts';

/** New patches come before all effects, so that others can change them. */
export function layNewPatch(draft: Draft, { name, spec }: NamedAction<'habitat'>): void {
  const { new: made, like } = spec;
  const path = ['actions', name];
  if (made === undefined) return;
  const { spec: own } = draft;
  draft.origins.set(JSON.stringify(['patches', own.patches.length]), [...path, 'new']);
  own.patches = [...own.patches, { ...made, exists: { from: spec.from ?? draft.firstYear, ...untilOf(spec.until) } }];
  if (like === undefined) return;
  if (!own.patches.some((patch) => patch.name === like && patch.name !== made.name)) {
    const known = own.patches.map((patch) => patch.name).filter((patch) => patch !== made.name);
    tellUnknown(draft, [...path, 'like'], { code: 'unknown-patch', what: 'patch', name: like, known, part: 'value' });
    return;
  }
  const rates = own.in?.[like];
  if (rates !== undefined) own.in = { ...own.in, [made.name]: structuredClone(rates) };
}

function untilOf(until: number | undefined) {
  return until === undefined ? {} : { until };
}

export function layHabitat(draft: Draft, action: NamedAction<'habitat'>): void {
  const { name, spec } = action;
  const path = ['actions', name];
  const when = whenOf(draft, spec, path);
  refuseShape(draft, action);
  const asked = [spec.in ?? []].flat();
  asked.forEach((patch, k) => {
    const index = draft.spec.patches.findIndex((one) => one.name === patch);
    const at = typeof spec.in === 'string' ? [...path, 'in'] : [...path, 'in', k];
    const own = draft.spec.patches[index];
    if (own === undefined) {
      const known = draft.spec.patches.map((one) => one.name);
      tellUnknown(draft, at, { code: 'unknown-patch', what: 'patch', name: patch, known, part: 'value' });
      return;
    }
    if (spec.lost === true) lose(draft, own, { index, spec, path });
    for (const [key, effect, where] of effectsOf(spec)) {
      const place: EffectPlace = { when, path: [...path, ...where] };
      addEffect(draft, ['patches', index, key], { target: () => attribute(own, key), effect, place });
    }
  });
}

function effectsOf({ capacity, area, quality }: NamedAction<'habitat'>['spec']) {
  return [
    ...(capacity === undefined ? [] : [['capacity', capacity, ['capacity']] as const]),
    ...(area === undefined ? [] : [['area', area, ['area']] as const]),
    ...Object.entries(quality ?? {}).map(([key, effect]) => [key, effect, ['quality', key]] as const),
  ];
}

function attribute(patch: InlinePatchSpec, key: string) {
  const written: unknown = Object.entries(patch).find(([name]) => name === key)?.[1];
  const number = typeof written === 'number' || typeof written === 'string' ? written : null;
  // The area of an outline is measured later; until then it goes by a name.
  const base = key === 'area' && patch.outline !== undefined ? 'measured_area' : number;
  return {
    base: key === 'name' ? null : base,
    dimension: key === 'area' ? ('area' as const) : ('share' as const),
    words: `\`${key}\` of ${patch.name}`,
    write: (expression: number | string) => void Object.assign(patch, { [key]: expression }),
  };
}

interface Loss {
  readonly index: number;
  readonly spec: NamedAction<'habitat'>['spec'];
  readonly path: SpecPath;
}

function lose(draft: Draft, patch: InlinePatchSpec, { index, spec, path }: Loss): void {
  const until = (spec.from ?? draft.firstYear) - 1;
  patch.exists = { ...patch.exists, until: Math.min(until, patch.exists?.until ?? until) };
  draft.origins.set(JSON.stringify(['patches', index, 'exists']), [...path, 'lost']);
}

function refuseShape(draft: Draft, { name, spec }: NamedAction<'habitat'>): void {
  const path = ['actions', name];
  const changes = effectsOf(spec).length > 0 || spec.lost === true;
  const tell = (message: string, expected: string, key?: string): void =>
    tellMistake(draft, 'plan-shape', key === undefined ? path : [...path, key], {
      message,
      part: 'key',
      details: { expected },
    });
  if (spec.new === undefined && !changes) {
    tell(`\`${name}\` changes nothing`, 'one or more of `capacity`, `area`, `quality`, `lost` and `new`');
  }
  if (changes && spec.in === undefined) tell(`\`${name}\` does not say where`, '`in` with one patch or several');
  if (spec.new !== undefined && spec.in !== undefined && !changes)
    tell('Nothing changes in these patches', '`capacity`, `area`, `quality` or `lost`', 'in');
  if (spec.like !== undefined && spec.new === undefined)
    tell('Only a new patch is like another', '`new` with a patch', 'like');
  if (spec.lost === true && effectsOf(spec).length > 0)
    tell('A patch that is lost has nothing else that changes', '`lost` alone', 'lost');
  if (spec.lost === true && spec.until !== undefined)
    tell('A patch that is lost does not come back', '`from` alone', 'until');
  if (spec.new !== undefined && spec.over !== undefined && !changes) {
    tell('A new patch is there all at once', 'its capacity as years with a number each, if it grows', 'over');
  }
  const area = spec.area?.set;
  if (area !== undefined && !readMeasure(area, 'area').ok) tell('This is no area', 'such as `140 ha`', 'area');
}
