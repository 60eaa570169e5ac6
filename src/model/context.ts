// What every part of the resolver needs: the spec, the order of names, and a place to leave findings.
import { nearestName } from '../diagnostic/nearest.ts';
import type { DiagnosticCode } from '../diagnostic/codes.ts';
import type { SpecPath } from '../spec/document.ts';
import type { Finding } from '../spec/finding.ts';
import type { Spec } from '../spec/schema/spec.ts';
import type { Patch, Sex } from './model.ts';
import type { Attributes } from './definitions.ts';
import type { ModelMemory } from './memory.ts';
import type { Drivers, Numbers } from './numbers.ts';

export interface Names {
  readonly patches: ReadonlyMap<string, number>;
  readonly classes: ReadonlyMap<string, number>;
}

export interface Context {
  readonly spec: Spec;
  readonly patches: readonly Patch[];
  readonly classes: readonly string[];
  /** By class; null where the sexes are not told apart. */
  readonly sexes: readonly Sex[] | null;
  readonly names: Names;
  readonly numbers: Numbers;
  readonly drivers: Drivers;
  /** By patch, for expressions. */
  readonly attributes: readonly Attributes[];
  readonly time: { readonly firstYear: number; readonly steps: number };
  /** Places whose numbers were already told to be out of bounds. */
  readonly toldBounds: Set<string>;
  readonly findings: Finding[];
  readonly defaults: string[];
  /** Of the same spec at other values of some parameters. */
  readonly memory?: ModelMemory;
}

export function fail(
  context: Pick<Context, 'findings'>,
  code: DiagnosticCode,
  path: SpecPath,
  told: Omit<Finding, 'severity' | 'code' | 'path'>,
): void {
  context.findings.push({ severity: 'error', code, path, ...told });
}

/** Index of a class by its name, or -1 after telling that there is none. */
export function classIndex(context: Context, name: string, path: SpecPath, part: 'key' | 'value' = 'key'): number {
  const index = context.names.classes.get(name);
  if (index !== undefined) return index;
  tellUnknown(context, { code: 'unknown-class', what: 'class', name, known: context.classes, path, part });
  return -1;
}

/** Index of a patch by its name, or -1 after telling that there is none. */
export function patchIndex(context: Context, name: string, path: SpecPath, part: 'key' | 'value' = 'key'): number {
  const index = context.names.patches.get(name);
  if (index !== undefined) return index;
  const known = context.patches.map((patch) => patch.name);
  tellUnknown(context, { code: 'unknown-patch', what: 'patch', name, known, path, part });
  return -1;
}

export interface UnknownName {
  readonly code: DiagnosticCode;
  readonly what: string;
  readonly name: string;
  readonly known: readonly string[];
  readonly path: SpecPath;
  readonly part: 'key' | 'value';
}

export function tellUnknown(context: Pick<Context, 'findings'>, unknown: UnknownName): void {
  const { code, what, name, known, path, part } = unknown;
  const listed = known.slice(0, 12).map((one) => `\`${one}\``);
  const more = known.length > 12 ? ` and ${known.length - 12} more` : '';
  const nearest = nearestName(name, known);
  fail(context, code, path, {
    message: `There is no ${what} \`${name}\``,
    part,
    details: { found: name, expected: known.length > 0 ? `one of ${listed.join(', ')}${more}` : 'none', nearest },
  });
}

/** 1 for each class of a list, or of all. */
export function classMask(context: Context, list: readonly string[] | 'all', path: SpecPath): Uint8Array {
  const mask = new Uint8Array(context.classes.length);
  if (list === 'all') return mask.fill(1);
  list.forEach((name, i) => {
    const index = classIndex(context, name, [...path, i], 'value');
    if (index >= 0) mask[index] = 1;
  });
  return mask;
}
