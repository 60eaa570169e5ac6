// The part of JSON Schema that the spec's schema is written in.

export interface Shape {
  readonly type?: string;
  readonly const?: string | number | boolean;
  readonly anyOf?: readonly Shape[];
  readonly properties?: Readonly<Record<string, Shape>>;
  readonly required?: readonly string[] | undefined;
  readonly additionalProperties?: boolean | Shape;
  readonly patternProperties?: Readonly<Record<string, Shape>>;
  readonly propertyNames?: Shape;
  readonly items?: Shape | readonly Shape[];
  readonly minItems?: number;
  readonly maxItems?: number;
  readonly uniqueItems?: boolean;
  readonly minLength?: number;
  readonly minimum?: number;
  readonly maximum?: number;
  readonly exclusiveMinimum?: number;
  readonly exclusiveMaximum?: number;
  /** One of ours: see format.ts. */
  readonly format?: string;
  /** What a value of this shape is called, in a few words. */
  readonly title?: string;
  readonly description?: string;
  readonly examples?: readonly unknown[];
  readonly default?: unknown;
  readonly 'x-unit'?: string;
  /** What the keys that the author chooses are, such as CLASS. */
  readonly 'x-key'?: string;
  /** A list of names of classes, or one such name. */
  readonly 'x-classes'?: boolean;
  /** Its keys are described elsewhere. */
  readonly 'x-brief'?: boolean;
  /** Years with numbers, which becomes an expression. */
  readonly 'x-schedule'?: boolean;
  /** A number with how sure it is, which becomes the name of a parameter; by the format of the number. */
  readonly 'x-unsure'?: string;
  /** Keys with a meaning of their own among those that the author chooses, which TypeScript has no type for. */
  readonly 'x-keys'?: Readonly<Record<string, Shape>>;
  /** All other keys beside those. */
  readonly 'x-others'?: Shape;
}

export type Sort = 'map' | 'list' | 'text' | 'number' | 'truth';

const sorts: Readonly<Record<string, Sort>> = {
  object: 'map',
  array: 'list',
  string: 'text',
  number: 'number',
  integer: 'number',
  boolean: 'truth',
};

/** Undefined for a union, which may take several sorts. */
export function sortOf(shape: Shape): Sort | undefined {
  return shape.type === undefined ? undefined : sorts[shape.type];
}

/** Unions within unions laid out flat. */
export function branchesOf(shape: Shape): readonly Shape[] {
  return shape.anyOf === undefined ? [shape] : shape.anyOf.flatMap(branchesOf);
}

/** The keys that a section knows by name. */
export function knownKeys(shape: Shape): Readonly<Record<string, Shape>> {
  return { ...shape.properties, ...shape['x-keys'] };
}

/** The shape of a key, and of all keys that have none of their own. */
export function shapeOfKey(shape: Shape, key: string): Shape | undefined {
  const known = knownKeys(shape);
  return Object.hasOwn(known, key) ? known[key] : shapeOfOthers(shape);
}

/** A key may stand in several branches of a union: then all that it may be there. */
export function shapeBelow(shape: Shape | undefined, key: string): Shape | undefined {
  if (shape === undefined) return undefined;
  return together(branchesOf(shape).flatMap((one) => (sortOf(one) === 'map' ? (shapeOfKey(one, key) ?? []) : [])));
}

export function together(found: readonly Shape[]): Shape | undefined {
  return found.length > 1 ? { anyOf: found } : found[0];
}

export function shapeOfOthers(shape: Shape): Shape | undefined {
  if (shape['x-others'] !== undefined) return shape['x-others'];
  const [pattern] = Object.values(shape.patternProperties ?? {});
  if (pattern !== undefined) return pattern;
  return typeof shape.additionalProperties === 'object' ? shape.additionalProperties : undefined;
}

/** Whether the items of a list have each a shape of their own. */
export function isSeveral(items: Shape | readonly Shape[] | undefined): items is readonly Shape[] {
  return Array.isArray(items);
}
