// Patches in the order of their names, in kilometres and square kilometres, with their attributes for expressions.
import { readQuantity } from '../spec/quantity.ts';
import type { Finding } from '../spec/finding.ts';
import type { InlinePatchSpec, Spec } from '../spec/schema/spec.ts';
import { onEllipsoid, onPlane, type Ground } from './geography.ts';
import type { Patch } from './model.ts';
import { readOutline } from './outline.ts';
import { areDegrees, readPosition, warnOfDegrees, type Places } from './position.ts';

export interface ResolvedPatches {
  readonly patches: readonly Patch[];
  /** By patch, in the same order. */
  readonly attributes: readonly ReadonlyMap<string, number>[];
  readonly attributeNames: ReadonlySet<string>;
}

/** Order of names by code units, the same on every machine. */
export function byName(a: { readonly name: string }, b: { readonly name: string }): number {
  return a.name < b.name ? -1 : a.name > b.name ? 1 : 0;
}

export function resolvePatches(spec: Spec, findings: Finding[]): ResolvedPatches {
  refuseRepeats(spec, findings);
  const written = spec.patches.map((inline, fileOrder) => ({ inline, fileOrder, name: inline.name })).sort(byName);
  const grounds = groundsOf(spec, written, findings);
  const both = written.map((one, p) => resolvePatch(one, { ground: grounds[p] ?? nowhere, findings }));
  const attributeNames = new Set(both.flatMap(({ attributes }) => [...attributes.keys()]));
  return { patches: both.map((one) => one.patch), attributes: both.map((one) => one.attributes), attributeNames };
}

interface Written {
  readonly inline: InlinePatchSpec;
  readonly fileOrder: number;
}

const nowhere: Ground = { at: null, areaKm2: null };

/** Where each patch lies; nowhere for those that do not say. */
function groundsOf(spec: Spec, written: readonly Written[], findings: Finding[]): readonly Ground[] {
  if (!written.some(({ inline }) => inline.at !== undefined || inline.outline !== undefined)) return [];
  const position = readPosition(spec, findings);
  if (position === null) return [];
  const places = written.flatMap((one) => placesOf(one));
  if (position.on === 'plane') warnOfDegrees(places, findings);
  else if (!places.map((one) => areDegrees(one, findings)).every((fine) => fine)) return [];
  const located = written.map(({ inline, fileOrder }) => ({
    at: inline.at ?? null,
    outline:
      inline.outline === undefined
        ? null
        : readOutline(inline.outline, { name: inline.name, path: ['patches', fileOrder, 'outline'], findings }),
  }));
  return position.on === 'plane' ? located.map((one) => onPlane(one, position.unitKm)) : onEllipsoid(located);
}

function placesOf({ inline, fileOrder }: Written): readonly Places[] {
  const { name, at, outline } = inline;
  const path = ['patches', fileOrder];
  return [
    ...(at === undefined ? [] : [{ name, points: [at], path: [...path, 'at'] }]),
    ...(outline === undefined ? [] : [{ name, points: outline.flat(2), path: [...path, 'outline'] }]),
  ];
}

interface PatchContext {
  readonly ground: Ground;
  readonly findings: Finding[];
}

function resolvePatch({ inline, fileOrder }: Written, { ground, findings }: PatchContext) {
  const { name, area, capacity } = inline;
  const given = area === undefined ? null : areaOf(area, { i: fileOrder, findings });
  const { areaKm2: measured, ...places } = ground;
  if (given !== null && measured !== null) warnOfArea({ name, given, measured, fileOrder }, findings);
  const areaKm2 = measured ?? given;
  const patch: Patch = { name, ...places, areaKm2, capacity: capacity ?? null, fileOrder };
  const attributes = new Map<string, number>();
  if (areaKm2 !== null) attributes.set('area', areaKm2);
  // All other keys that hold a number are attributes; `at` and `outline` are lists.
  for (const [key, value] of Object.entries(inline)) {
    if (typeof value === 'number' && key !== 'area') attributes.set(key, value);
  }
  return { patch, attributes };
}

interface TwoAreas {
  readonly name: string;
  readonly given: number;
  readonly measured: number;
  readonly fileOrder: number;
}

/** An area that stands in a table is often in another unit than its author thinks. */
function warnOfArea({ name, given, measured, fileOrder }: TwoAreas, findings: Finding[]): void {
  if (Math.abs(given - measured) <= 0.02 * measured) return;
  findings.push({
    severity: 'warning',
    code: 'area-differs',
    message: `The area of ${name} is not that of its outline, which is used`,
    path: ['patches', fileOrder, 'area'],
    details: {
      found: `${String(given)} km2`,
      expected: `${String(measured)} km2, as measured from the outline`,
      fix: 'Write the unit, such as `140 ha`, or give an area that means something else a name of its own.',
      reason: 'A bare number is in km2; tables often hold m2 or ha.',
    },
  });
}

function areaOf(
  area: number | string,
  { i, findings }: { readonly i: number; readonly findings: Finding[] },
): number | null {
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
