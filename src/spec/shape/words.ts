// What a shape takes, in words.
import { branchesOf, type Shape } from './shape.ts';

const plain: Readonly<Record<string, string>> = {
  object: 'keys with values',
  array: 'a list',
  string: 'a text',
  number: 'a number',
  integer: 'a whole number',
  boolean: '`true` or `false`',
};

export function expectationOf(shape: Shape): string {
  if (shape.title !== undefined) return shape.title;
  if (shape.const !== undefined) return `\`${String(shape.const)}\``;
  if (shape.anyOf !== undefined) return either(branchesOf(shape).map(expectationOf));
  return (plain[shape.type ?? ''] ?? 'a value') + limitsOf(shape);
}

/** One of several, the last with `or`. */
export function either(words: readonly string[]): string {
  const different = [...new Set(words)];
  const last = different.at(-1) ?? '';
  return different.length < 2 ? last : `${different.slice(0, -1).join(', ')} or ${last}`;
}

function limitsOf(shape: Shape): string {
  const limits = [
    ...(shape.minimum === undefined ? [] : [`at least ${String(shape.minimum)}`]),
    ...(shape.exclusiveMinimum === undefined ? [] : [`above ${String(shape.exclusiveMinimum)}`]),
    ...(shape.maximum === undefined ? [] : [`at most ${String(shape.maximum)}`]),
    ...(shape.exclusiveMaximum === undefined ? [] : [`below ${String(shape.exclusiveMaximum)}`]),
  ];
  return limits.length === 0 ? '' : `, ${limits.join(' and ')}`;
}
