// A spec as canonical YAML: keys of the language in one order, short sections on one line. Reading it gives the same spec.
import { CoreSchema, type Spec } from './schema/spec.ts';
import { isAmbiguousWord, plainValue } from './text/scalar.ts';

const width = 100;

export function printSpec(spec: Spec): string {
  const { named, ...core } = spec;
  const written = new Map<string, unknown>(Object.entries(core));
  const order = Object.keys(CoreSchema.properties);
  const place = order.indexOf('year') + 1;
  const entries = [
    ...order.slice(0, place).map((key) => [key, written.get(key)] as const),
    ...Object.entries(named),
    ...order.slice(place).map((key) => [key, written.get(key)] as const),
  ];
  return entries.flatMap(([key, value]) => (value === undefined ? [] : [entry(key, value, '')])).join('\n') + '\n';
}

/** A key and its value, on one line where it fits and holds no section within a section. */
function entry(key: string, value: unknown, indent: string): string {
  const head = `${indent}${word(key)}:`;
  return fitsLine(value, head.length) ? `${head} ${flow(value)}` : `${head}\n${block(value, `${indent}  `)}`;
}

function fitsLine(value: unknown, used: number): boolean {
  if (!isSection(value) && !Array.isArray(value)) return true;
  const parts: readonly unknown[] = isSection(value) ? Object.values(value) : value;
  return parts.every((part) => !isSection(part)) && used + 1 + flow(value).length <= width;
}

function block(value: unknown, indent: string): string {
  if (isSection(value))
    return Object.entries(value)
      .map(([key, inner]) => entry(key, inner, indent))
      .join('\n');
  if (Array.isArray(value)) return value.map((item: unknown) => `${indent}- ${flow(item)}`).join('\n');
  return indent + flow(value);
}

function isSection(value: unknown): value is Readonly<Record<string, unknown>> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function flow(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(flow).join(', ')}]`;
  if (isSection(value)) {
    const parts = Object.entries(value).map(([key, inner]) => `${word(key)}: ${flow(inner)}`);
    return parts.length === 0 ? '{}' : `{ ${parts.join(', ')} }`;
  }
  if (typeof value === 'string') return word(value);
  return Object.is(value, -0) ? '-0' : String(value);
}

const letters = '[\\p{L}\\p{M}\\p{N}_ ./^*+()<>=²%-]*';
const end = '[\\p{L}\\p{M}\\p{N}_)²%]';
/** Begins with a letter; or with a digit and holds a blank, so that no reader takes it for a number or a date. */
const plainText = new RegExp(`^(?:[\\p{L}_]|\\d(?=[^ ]* ))(?:${letters}${end})?$`, 'u');

/** Plain where every YAML reader takes it for the same text, in quotes elsewhere. */
function word(text: string): string {
  const same = plainValue(text) === text && !isAmbiguousWord(text);
  return same && plainText.test(text) ? text : quoted(text);
}

function quoted(text: string): string {
  const escape = (character: string): string => `\\u${character.charCodeAt(0).toString(16).padStart(4, '0')}`;
  return JSON.stringify(text).replace(/[\u007F-\u00A0\u2028\u2029\uFEFF\uFFF0-\uFFFF]/gu, escape);
}
