// A spec without its places and without what tells them: outlines, exact areas, the lengths of ways, and attributes of patches
// that nothing in the model reads (maps come with columns such as a longitude).
import { printSpec } from '../../spec/print.ts';
import { readQuantity } from '../../spec/quantity.ts';
import type { ActionSpec, InlinePatchSpec, NamedSpec, Spec } from '../../spec/schema/spec.ts';

export function withoutPlaces(spec: Spec): Spec {
  const { named, ...core } = without(spec, ['position', 'unit']);
  const words = wordsOf([withoutTexts(core), named]);
  return {
    ...core,
    patches: spec.patches.map((patch) => hiddenPatch(patch, words)),
    ...(core.actions === undefined ? {} : { actions: hiddenActions(core.actions, words) }),
    named: Object.fromEntries(Object.entries(named).map(([name, section]) => [name, hiddenSection(section)])),
  };
}

/** Without the places of patches that plans make, exact areas, the lengths of ways and prices by which a sum of money would tell them. */
function hiddenActions(
  actions: NonNullable<Spec['actions']>,
  words: ReadonlySet<string>,
): NonNullable<Spec['actions']> {
  const hidden = Object.entries(actions).map(([name, action]): [string, typeof action] => {
    const told = action.cost === undefined ? action : { ...action, cost: without(action.cost, ['per-km']) };
    return [name, hiddenEffects(told, words)];
  });
  return Object.fromEntries(hidden);
}

function hiddenEffects(action: ActionSpec, words: ReadonlySet<string>): ActionSpec {
  if (action.kind === 'habitat') {
    const { new: made } = action;
    const rest = isAbsolute(action.area) ? without(action, ['area']) : action;
    return made === undefined ? rest : { ...rest, new: hiddenPatch(made, words) };
  }
  if (action.kind === 'link') return isAbsolute(action.distance) ? without(action, ['distance']) : action;
  return action;
}

function isAbsolute(effect: { readonly set?: unknown; readonly add?: unknown } | undefined): boolean {
  return (effect?.set ?? effect?.add) !== undefined;
}

/** For people, who must not take it for the whole. */
export function hiddenText(spec: Spec): string {
  return `# The places of the patches are hidden here, and with them what tells them: outlines, exact areas, the lengths of ways,
# and what no rate reads. So it cannot be run as it stands; whoever has the model can.
${printSpec(withoutPlaces(spec))}`;
}

const kept = new Set(['name', 'capacity']);

function hiddenPatch(patch: InlinePatchSpec, words: ReadonlySet<string>): InlinePatchSpec {
  const { area, ...others } = without(patch, ['at', 'outline']);
  const read = Object.entries(others).filter(([key]) => kept.has(key) || words.has(key));
  const rounded = area === undefined ? {} : { area: roundedArea(area) };
  return { name: patch.name, ...Object.fromEntries(read), ...rounded };
}

function roundedArea(area: number | string): string {
  const read = readQuantity(area, 'area');
  return `${String(read.ok ? coarse(read.value) : 0)} km2`;
}

/** One digit, so that nobody finds a patch by its area in a register. */
export function coarse(value: number): number {
  return Number(value.toPrecision(1));
}

function hiddenSection(section: NamedSpec): NamedSpec {
  if (section.kind !== 'dispersal' || section.links === undefined) return section;
  return { ...section, links: section.links.map((link) => without(link, ['distance'])) };
}

/** Without the names and values of patches and without texts for people, whose words are no names of attributes. */
function withoutTexts(spec: Omit<Spec, 'named'>): unknown {
  const { parameters, ...core } = without(spec, ['study', 'patches']);
  const values = Object.values(parameters ?? {}).map((one) => (typeof one === 'object' ? one.value : one));
  return { ...core, values };
}

/** All words that stand in any expression. */
function wordsOf(value: unknown, found = new Set<string>()): Set<string> {
  if (typeof value === 'string') for (const [word] of value.matchAll(/[\p{L}_][\p{L}\p{M}\p{N}_]*/gu)) found.add(word);
  else if (typeof value === 'object' && value !== null) for (const part of Object.values(value)) wordsOf(part, found);
  return found;
}

function without<Section extends object, Key extends keyof Section>(
  section: Section,
  keys: readonly Key[],
): Omit<Section, Key> {
  const copy = { ...section };
  for (const key of keys) Reflect.deleteProperty(copy, key);
  return copy;
}
