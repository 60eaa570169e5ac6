// Features of a GeoJSON file (RFC 7946) as the list of patches that a spec would hold instead.
import { put, type Report } from '../shape/report.ts';
import type { SourceEntry, SourceList, SourceMap, SourceNode, SourceScalar } from '../text/source.ts';
import { checkCrs } from './crs.ts';
import { placesOf } from './geometry.ts';

export interface GeoJsonRequest {
  readonly root: SourceNode;
  /** The property that is the name of a patch. */
  readonly nameKey: string;
  /** As the spec says it. */
  readonly position: string | undefined;
  readonly report: Report;
}

/** Undefined where nothing of the file can be used. */
export function patchesOf(request: GeoJsonRequest): SourceList | undefined {
  const { root, report } = request;
  const features = featuresOf(root);
  if (root.kind !== 'map' || features === undefined) {
    tellShape(
      report,
      root,
      'The file is no GeoJSON FeatureCollection',
      '{ "type": "FeatureCollection", "features": [ … ] }',
    );
    return undefined;
  }
  checkCrs(root, request.position, report);
  const leftOut = new Map<string, SourceEntry>();
  const items = features.flatMap((feature, i) => patchOf(feature, i + 1, { ...request, leftOut }) ?? []);
  tellLeftOut(leftOut, report);
  if (features.length === 0) tellShape(report, root, 'The file has no features', 'one feature a patch');
  return { kind: 'list', items, span: root.span, file: report.source };
}

export function entryOf(node: SourceNode | undefined, key: string): SourceEntry | undefined {
  return node?.kind === 'map' ? node.entries.find((entry) => entry.key === key) : undefined;
}

function textAt(node: SourceNode | undefined, key: string): string | undefined {
  const value = entryOf(node, key)?.value;
  return value?.kind === 'scalar' ? value.source : undefined;
}

/** Of a collection, or a feature alone. */
function featuresOf(root: SourceNode): readonly SourceNode[] | undefined {
  const type = textAt(root, 'type');
  if (type === 'Feature') return [root];
  const features = entryOf(root, 'features')?.value;
  return type === 'FeatureCollection' && features?.kind === 'list' ? features.items : undefined;
}

function tellShape(report: Report, node: SourceNode, message: string, expected: string): void {
  put(report, { code: 'geojson-shape', message, span: { ...node.span, length: 1 } }, { expected });
}

interface Reading extends GeoJsonRequest {
  readonly leftOut: Map<string, SourceEntry>;
}

function patchOf(feature: SourceNode, number: number, reading: Reading): SourceMap | undefined {
  const { report, nameKey } = reading;
  if (feature.kind !== 'map' || textAt(feature, 'type') !== 'Feature') {
    tellShape(report, feature, `Feature ${String(number)} is no feature`, '{ "type": "Feature", … }');
    return undefined;
  }
  const properties = entryOf(feature, 'properties')?.value;
  const name = nameOf(properties, nameKey);
  if (name === undefined) {
    put(
      report,
      {
        code: 'nameless-feature',
        message: `Feature ${String(number)} has no name`,
        span: { ...feature.span, length: 1 },
      },
      {
        expected: `a text under "${nameKey}" among its properties`,
        fix: 'Another property: `patches: { file: …, name: PROPERTY }`.',
      },
    );
    return undefined;
  }
  const called = `Feature ${String(number)} (${name.value.source})`;
  const place = placesOf(entryOf(feature, 'geometry'), called, { feature, report });
  if (place === undefined) return undefined;
  const attributes = properties?.kind === 'map' ? attributesOf(properties, reading) : [];
  return { kind: 'map', entries: [name, place, ...attributes], span: feature.span };
}

/** A number may be a name, too. */
function nameOf(
  properties: SourceNode | undefined,
  nameKey: string,
): (SourceEntry & { value: SourceScalar }) | undefined {
  const entry = entryOf(properties, nameKey);
  const value = entry?.value;
  if (entry === undefined || value?.kind !== 'scalar' || value.value === null || value.source.trim() === '')
    return undefined;
  const text = { ...value, value: value.source.trim(), source: value.source.trim(), plain: false };
  return { ...entry, key: 'name', value: text };
}

const ofThePatch = new Set(['name', 'at', 'outline']);

/** Numbers, and an area with its unit; what is no number is left out, and told once. */
function attributesOf(properties: SourceMap, { nameKey, leftOut }: Reading): readonly SourceEntry[] {
  return properties.entries.filter((entry) => {
    const { key, value } = entry;
    if (key === nameKey || (value.kind === 'scalar' && value.value === null)) return false;
    const number = value.kind === 'scalar' && (typeof value.value === 'number' || key === 'area' || key === 'capacity');
    const usable = number && !ofThePatch.has(key) && /^[\p{L}_][\p{L}\p{M}\p{N}_]{0,99}$/u.test(key);
    if (!usable && !leftOut.has(key)) leftOut.set(key, entry);
    return usable;
  });
}

function tellLeftOut(leftOut: ReadonlyMap<string, SourceEntry>, report: Report): void {
  const [first] = leftOut.values();
  if (first === undefined) return;
  const names = [...leftOut.keys()].slice(0, 8).map((key) => `"${key}"`);
  const more = leftOut.size > 8 ? ` and ${String(leftOut.size - 8)} more` : '';
  put(
    report,
    {
      severity: 'note',
      code: 'left-out-property',
      message: 'Some properties of the features are not used',
      span: first.keySpan,
    },
    {
      found: names.join(', ') + more,
      reason: 'Attributes are numbers whose names can stand in expressions: letters, digits and _.',
    },
  );
}
