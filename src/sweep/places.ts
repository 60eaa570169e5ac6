// Places: every number that stands in a spec, by a name such as `natal.leaving` or `patches.North fen.capacity`.
import type { SpecPath } from '../spec/document.ts';
import { readQuantity, type Dimension } from '../spec/quantity.ts';
import type { Spec } from '../spec/schema/spec.ts';
import { takesExpression, unitAt } from '../spec/shape/unit-at.ts';
import type { Value } from './design/factor.ts';

/** Stands for the scenario that is run. */
export const scenarioName = 'scenario';

/** Sections whose numbers are no part of the model, or have names of their own. */
const left: ReadonlySet<string> = new Set([
  'skein',
  'study',
  'sweep',
  'run',
  'year',
  'observed',
  'uncertainty',
  'scenarios',
]);
const leftToo: ReadonlySet<string> = new Set(['parameters', 'classes', 'counts', 'position', 'unit', 'step']);

export interface PlacedNumber {
  readonly name: string;
  readonly path: SpecPath;
  readonly value: number | string;
}

/** In the order of the spec; words that stand for no number are left out. */
export function placesIn(spec: Spec): readonly PlacedNumber[] {
  const { named, ...core } = spec;
  const known = new Set(Object.keys(spec.parameters ?? {}));
  const kept = Object.entries(core).filter(([key]) => !left.has(key) && !leftToo.has(key));
  const places = [
    ...kept.flatMap(([key, value]) => below(value, { name: key, path: [key], known })),
    ...Object.entries(named).flatMap(([key, value]) => below(value, { name: key, path: ['named', key], known })),
  ];
  return places.filter(({ path, value }) => typeof value === 'number' || takesExpression(spec, path));
}

/** Of a place, as the language has it; empty for named parameters and for what has none. */
export function unitOfPlace(spec: Spec, name: string): string {
  const place = placesIn(spec).find((one) => one.name === name);
  if (place === undefined || Object.hasOwn(spec.parameters ?? {}, name)) return '';
  const inWords: Readonly<Record<string, string>> = {
    'the currency': spec.money?.currency ?? '',
    'that of the number': '',
    'the `unit` of the plane, or degrees': spec.unit ?? 'degrees',
    times: '',
  };
  const unit = unitAt(spec, place.path);
  return inWords[unit] ?? unit;
}

interface At {
  readonly name: string;
  readonly path: SpecPath;
  /** Names of parameters, which stand for numbers. */
  readonly known: ReadonlySet<string>;
}

function below(value: unknown, { name, path, known }: At): readonly PlacedNumber[] {
  if (typeof value === 'number') return [{ name, path, value }];
  if (typeof value === 'string') return known.has(value) || looksLikeNumber(value) ? [{ name, path, value }] : [];
  if (Array.isArray(value)) {
    return value.flatMap((item: unknown, i) =>
      below(item, { name: `${name}.${nameOf(item) ?? String(i + 1)}`, path: [...path, i], known }),
    );
  }
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) =>
    below(inner, { name: `${name}.${key}`, path: [...path, key], known }),
  );
}

function nameOf(item: unknown): string | null {
  if (typeof item !== 'object' || item === null || !('name' in item)) return null;
  return typeof item.name === 'string' ? item.name : null;
}

function looksLikeNumber(text: string): boolean {
  return numberIn(text) !== null || /[-+*/^(]/u.test(text);
}

const dimensions: readonly Dimension[] = ['share', 'length', 'area', 'per-length', 'time'];

/** A plain number, with or without a unit, in its base unit; null for anything else. */
export function numberIn(value: Value): number | null {
  if (typeof value === 'number') return value;
  for (const dimension of dimensions) {
    const read = readQuantity(value, dimension);
    if (read.ok) return read.value;
  }
  return null;
}

/** The spec with another value at a path; nothing of the given one is changed. */
export function withValueAt(spec: Spec, path: SpecPath, value: Value): Spec {
  return { ...spec, ...replaced(spec, path, value) };
}

function replaced(node: unknown, path: SpecPath, value: Value): object {
  const [key, ...rest] = path;
  if (key === undefined || typeof node !== 'object' || node === null) return {};
  const inner = (before: unknown): unknown => (rest.length === 0 ? value : replaced(before, rest, value));
  if (Array.isArray(node)) return node.map((item: unknown, i) => (i === key ? inner(item) : item));
  return Object.fromEntries(Object.entries(node).map(([k, before]) => [k, k === key ? inner(before) : before]));
}
