// Patches in the order of their names, in kilometres and square kilometres, with their attributes for expressions.
import { readMeasure, readQuantity } from '../spec/quantity.ts';
import type { Finding } from '../spec/finding.ts';
import type { InlinePatchSpec, Spec } from '../spec/schema/spec.ts';
import { onEllipsoid, onPlane, type Ground } from './geography.ts';
import type { Patch } from './model.ts';
import type { Attribute, Attributes } from './definitions.ts';
import type { Numbers } from './numbers.ts';
import { readOutline } from './outline.ts';
import { areDegrees, readPosition, warnOfDegrees, type Places } from './position.ts';

export interface ResolvedPatches {
  /** Without numbers that are expressions. */
  readonly patches: readonly Patch[];
  /** By patch, in the same order. */
  readonly attributes: readonly Attributes[];
}

/** What the area of the outline is called, where the area of a patch is written as an expression. */
export const measuredArea = 'measured_area';

/** Order of names by code units, the same on every machine. */
export function byName(a: { readonly name: string }, b: { readonly name: string }): number {
  return a.name < b.name ? -1 : a.name > b.name ? 1 : 0;
}

export function resolvePatches(spec: Spec, findings: Finding[]): ResolvedPatches {
  refuseRepeats(spec, findings);
  const written = spec.patches.map((inline, fileOrder) => ({ inline, fileOrder, name: inline.name })).sort(firstToLast);
  const grounds = groundsOf(spec, written, findings);
  const both = written.map((one, p) => resolvePatch(one, { ground: grounds[p] ?? nowhere, findings }));
  return { patches: both.map((one) => one.patch), attributes: both.map((one) => one.attributes) };
}

/** Patches that come later stand after all others, so that they move nobody's luck. */
function firstToLast(a: Written & { readonly name: string }, b: Written & { readonly name: string }): number {
  const later = ({ inline }: Written): number => (inline.exists?.from === undefined ? 0 : 1);
  return later(a) - later(b) || byName(a, b);
}

/** Areas and capacities that are expressions, as they are in the first year. */
export function withFirstNumbers(
  { patches, attributes }: ResolvedPatches,
  numbers: Numbers,
  { firstYear, findings }: { readonly firstYear: number; readonly findings: Finding[] },
): readonly Patch[] {
  return patches.map((patch, p) => {
    const own = attributes[p] ?? new Map<string, Attribute>();
    const first = (name: 'area' | 'capacity', known: number | null): number | null => {
      const written = own.get(name);
      if (typeof written !== 'object') return known;
      numbers.varies(written.expression, written.path, written.dimension);
      const where = { year: firstYear, attributes: own, patch: patch.name, dimension: written.dimension };
      return numbers.value(written.expression, written.path, where);
    };
    const areaKm2 = first('area', patch.areaKm2);
    if (areaKm2 !== null && areaKm2 <= 0) findings.push(noArea(patch.fileOrder, `${areaKm2} km2`));
    return { ...patch, areaKm2, capacity: first('capacity', patch.capacity) };
  });
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
  if (typeof given === 'number' && measured !== null) warnOfArea({ name, given, measured, fileOrder }, findings);
  // Written as an expression it may rest on the measured area itself; else what is measured is right.
  const areaKm2 = given !== null && typeof given === 'object' ? given : (measured ?? given);
  const patch: Patch = {
    name,
    ...places,
    areaKm2: typeof areaKm2 === 'number' ? areaKm2 : null,
    capacity: typeof capacity === 'number' ? capacity : null,
    fileOrder,
    ...(inline.exists === undefined ? {} : { exists: inline.exists }),
  };
  const attributes = new Map<string, Attribute>();
  if (areaKm2 !== null) attributes.set('area', areaKm2);
  if (areaKm2 !== null && typeof areaKm2 === 'object' && measured !== null) attributes.set(measuredArea, measured);
  for (const [key, value] of Object.entries(inline)) {
    if (key === 'name' || key === 'area') continue;
    if (typeof value === 'number') attributes.set(key, value);
    if (typeof value === 'string') {
      attributes.set(key, { expression: value, path: ['patches', fileOrder, key], dimension: 'share' });
    }
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
): Exclude<Attribute, string> | null {
  const read = readQuantity(area, 'area');
  if (typeof area === 'string' && !read.ok && readMeasure(area, 'area').ok) {
    return { expression: area, path: ['patches', i, 'area'], dimension: 'area' };
  }
  if (read.ok && read.value > 0) return read.value;
  if (read.ok) findings.push(noArea(i, String(area)));
  else {
    const { code, message, span, ...details } = read.error;
    findings.push({ severity: 'error', path: ['patches', i, 'area'], code, message, span, details });
  }
  return null;
}

function noArea(fileOrder: number, found: string): Finding {
  return {
    severity: 'error',
    code: 'out-of-range',
    message: 'A patch has an area above zero',
    path: ['patches', fileOrder, 'area'],
    details: { found, expected: 'such as `140 ha`' },
  };
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
