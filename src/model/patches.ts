// Patches in the order of their names, in kilometres and square kilometres, with their attributes for expressions.
import { readQuantity } from '../spec/quantity.ts';
import type { Finding } from '../spec/finding.ts';
import type { Spec } from '../spec/schema/spec.ts';
import type { Patch } from './model.ts';

export interface ResolvedPatches {
  readonly patches: readonly Patch[];
  /** By patch, in the same order. */
  readonly attributes: readonly ReadonlyMap<string, number>[];
  readonly attributeNames: ReadonlySet<string>;
}

type InlinePatch = Spec['patches'][number];

/** Order of names by code units, the same on every machine. */
export function byName(a: { readonly name: string }, b: { readonly name: string }): number {
  return a.name < b.name ? -1 : a.name > b.name ? 1 : 0;
}

export function resolvePatches(spec: Spec, findings: Finding[]): ResolvedPatches {
  refuseRepeats(spec, findings);
  const unitKm = spec.unit === 'm' ? 0.001 : 1;
  if (spec.patches.some((patch) => patch.at !== undefined)) requirePlane(spec, findings);
  const both = spec.patches.map((inline, i) => resolvePatch(inline, { i, unitKm, findings }));
  both.sort((a, b) => byName(a.patch, b.patch));
  const attributeNames = new Set(both.flatMap(({ attributes }) => [...attributes.keys()]));
  return { patches: both.map((one) => one.patch), attributes: both.map((one) => one.attributes), attributeNames };
}

interface PatchContext {
  readonly i: number;
  readonly unitKm: number;
  readonly findings: Finding[];
}

function resolvePatch(inline: InlinePatch, { i, unitKm, findings }: PatchContext) {
  const { name, at, area, capacity, ...others } = inline;
  const areaKm2 = area === undefined ? null : areaOf(area, { i, unitKm, findings });
  const patch: Patch = {
    name,
    at: at === undefined ? null : [at[0] * unitKm, at[1] * unitKm],
    areaKm2,
    capacity: capacity ?? null,
    fileOrder: i,
  };
  const attributes = new Map<string, number>();
  if (areaKm2 !== null) attributes.set('area', areaKm2);
  if (capacity !== undefined) attributes.set('capacity', capacity);
  for (const [key, value] of Object.entries(others)) if (typeof value === 'number') attributes.set(key, value);
  return { patch, attributes };
}

function areaOf(area: number | string, { i, findings }: PatchContext): number | null {
  const read = readQuantity(area, 'area');
  if (read.ok && read.value > 0) return read.value;
  const path = ['patches', i, 'area'];
  if (read.ok) {
    findings.push({
      severity: 'error',
      code: 'out-of-range',
      message: 'A patch has an area above zero',
      path,
      details: { found: String(area), expected: 'such as `140 ha`' },
    });
  } else {
    const { code, message, span, ...details } = read.error;
    findings.push({ severity: 'error', path, code, message, span, details });
  }
  return null;
}

function refuseRepeats(spec: Spec, findings: Finding[]): void {
  const seen = new Map<string, number>();
  spec.patches.forEach(({ name }, i) => {
    const first = seen.get(name);
    if (first === undefined) seen.set(name, i);
    else {
      findings.push({
        severity: 'error',
        code: 'repeated-patch',
        message: `Two patches are called \`${name}\``,
        path: ['patches', i, 'name'],
        details: { found: name, expected: 'a name of its own for every patch' },
      });
    }
  });
}

function requirePlane(spec: Spec, findings: Finding[]): void {
  if (spec.position === undefined) {
    findings.push({
      severity: 'error',
      code: 'missing-position',
      message: 'The patches have places, but `position` does not say what the numbers are',
      path: ['patches'],
      part: 'key',
      details: { expected: '`position: plane` with `unit: km` or `unit: m`' },
    });
  } else if (spec.unit === undefined) {
    findings.push({
      severity: 'error',
      code: 'missing-position',
      message: 'On a plane the `unit` of the places must be said',
      path: ['position'],
      part: 'key',
      details: { expected: '`unit: km` or `unit: m`' },
    });
  }
}
