// What the numbers of places mean, and whether they can mean it.
import type { Point } from '../numeric/plane/point.ts';
import type { SpecPath } from '../spec/document.ts';
import type { Finding } from '../spec/finding.ts';
import type { Spec } from '../spec/schema/spec.ts';

export type Position = { readonly on: 'plane'; readonly unitKm: number } | { readonly on: 'ellipsoid' };

/** Null after telling what is not said. */
export function readPosition(spec: Spec, findings: Finding[]): Position | null {
  if (spec.position === 'longitude-latitude') {
    if (spec.unit !== undefined) {
      tell(findings, ['unit'], {
        message: 'Longitude and latitude are degrees: they have no other unit',
        fix: 'Remove `unit`, or write `position: plane`.',
      });
    }
    return { on: 'ellipsoid' };
  }
  if (spec.position === undefined) {
    tell(findings, ['patches'], {
      message: 'The patches have places, but `position` does not say what the numbers are',
      expected: '`position: plane` with `unit: km` or `unit: m`, or `position: longitude-latitude`',
    });
    return null;
  }
  if (spec.unit === undefined) {
    tell(findings, ['position'], {
      message: 'On a plane the `unit` of the places must be said',
      expected: '`unit: km` or `unit: m`',
    });
    return null;
  }
  return { on: 'plane', unitKm: spec.unit === 'm' ? 0.001 : 1 };
}

interface Told {
  readonly message: string;
  readonly expected?: string;
  readonly fix?: string;
}

function tell(findings: Finding[], path: SpecPath, { message, ...details }: Told): void {
  findings.push({ severity: 'error', code: 'missing-position', message, path, part: 'key', details });
}

export interface Places {
  readonly name: string;
  readonly points: readonly Point[];
  readonly path: SpecPath;
}

/** True where all points can be degrees; else tells what they rather look like. */
export function areDegrees({ name, points, path }: Places, findings: Finding[]): boolean {
  const wrong = points.find(([x, y]) => Math.abs(x) > 180 || Math.abs(y) > 90);
  if (wrong === undefined) return true;
  const [x, y] = wrong;
  const swapped = Math.abs(x) <= 90 && Math.abs(y) <= 180;
  findings.push({
    severity: 'error',
    code: 'not-degrees',
    message: `${name} has a place that cannot be degrees`,
    path,
    details: {
      found: `[${String(x)}, ${String(y)}]`,
      expected: 'longitude from -180 to 180, then latitude from -90 to 90',
      fix: swapped
        ? 'The two look swapped: longitude (east) comes first.'
        : 'If the numbers are metres or kilometres, write `position: plane` and their `unit`.',
    },
  });
  return false;
}

/** Degrees that are taken for metres or kilometres make everything near to everything. */
export function warnOfDegrees(all: readonly Places[], findings: Finding[]): void {
  const points = all.flatMap((one) => one.points);
  const fine = ([x, y]: Point): boolean => String(x).length > 6 && String(y).length > 6;
  const degreesLike = points.every(([x, y]) => Math.abs(x) <= 180 && Math.abs(y) <= 90) && points.some(fine);
  const [first] = all;
  if (!degreesLike || all.length < 2 || first === undefined) return;
  findings.push({
    severity: 'warning',
    code: 'plane-degrees',
    message: 'The places look like degrees, and are taken for a plane',
    path: first.path,
    details: {
      found: `[${(first.points[0] ?? []).join(', ')}] for ${first.name}`,
      fix: 'If they are, write `position: longitude-latitude` without `unit`.',
      reason: 'A degree is about 111 km of latitude; taken for anything else, all distances and areas are wrong.',
    },
  });
}
