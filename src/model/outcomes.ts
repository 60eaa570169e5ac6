// Outcomes: of whom, where, below what; with the definition in words that is printed beside every result.
import type { SpecPath } from '../spec/document.ts';
import type { OutcomeSpec } from '../spec/schema/spec.ts';
import { classMask, patchIndex, type Context } from './context.ts';
import type { OutcomeRule } from './model.ts';

export function resolveOutcomes(context: Context): readonly OutcomeRule[] {
  return Object.entries(context.spec.outcomes ?? {}).map(([name, spec]) => resolveOutcome(context, name, spec));
}

function resolveOutcome(context: Context, name: string, spec: OutcomeSpec): OutcomeRule {
  const path = ['outcomes', name];
  const mask = classMask(context, spec.of, [...path, 'of']);
  return {
    name,
    weights: Float64Array.from(mask),
    patches: patchMask(context, spec, path),
    below: spec.below,
    definition: definitionOf(context, spec),
  };
}

function patchMask(context: Context, spec: OutcomeSpec, path: SpecPath): Uint8Array {
  const mask = new Uint8Array(context.patches.length);
  if (spec.in === undefined) return mask.fill(1);
  const one = typeof spec.in === 'string';
  [spec.in].flat().forEach((patch, i) => {
    const p = patchIndex(context, patch, one ? [...path, 'in'] : [...path, 'in', i], 'value');
    if (p >= 0) mask[p] = 1;
  });
  return mask;
}

function definitionOf(context: Context, spec: OutcomeSpec): string {
  const who = spec.of === 'all' ? 'animals of all classes' : `animals of the class ${joined(spec.of)}`;
  const where = spec.in === undefined ? 'in all patches together' : placeWords([spec.in].flat());
  const sex = context.spec.counts === 'females' ? ' (females)' : '';
  return `fewer than ${spec.below} ${spec.of === 'all' || spec.of.length === 1 ? who : who.replace('class', 'classes')}${sex} ${where}`;
}

function placeWords(patches: readonly string[]): string {
  return patches.length === 1 ? `in ${joined(patches)}` : `in ${joined(patches)} together`;
}

function joined(names: readonly string[]): string {
  return names.length < 2 ? (names[0] ?? '') : `${names.slice(0, -1).join(', ')} and ${names.at(-1) ?? ''}`;
}
