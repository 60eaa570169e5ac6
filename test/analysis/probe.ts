// A spec with one more parameter, 1, that every plain number of its rates is multiplied by.
import type { Spec } from '../../src/spec/schema/spec.ts';

/** Keys whose values are not numbers that expressions may stand for. */
const skipped = new Set([
  'kind',
  'classes',
  'counted',
  'changes',
  'between',
  'takes',
  'form',
  'shape',
  'into',
  'leavers',
  'chances',
]);
/** Of the whole spec, those with rates. */
const withoutRates = new Set([
  'skein',
  'study',
  'first-year',
  'years',
  'step',
  'position',
  'unit',
  'patches',
  'counts',
]);
const alsoWithout = [
  'classes',
  'oldest',
  'parameters',
  'year',
  'start',
  'outcomes',
  'run',
  'variation',
  'drivers',
  'observed',
  'uncertainty',
];
for (const key of alsoWithout) withoutRates.add(key);

export function probed(spec: Spec): Spec {
  const parameters = { ...spec.parameters, probe: 1 };
  const entries = Object.entries(spec).map(([key, value]) => [key, withoutRates.has(key) ? value : scaled(value)]);
  const whole: Spec = JSON.parse(JSON.stringify({ ...Object.fromEntries(entries), parameters }));
  return whole;
}

function scaled(value: unknown): unknown {
  if (typeof value === 'number') return `${value} * probe`;
  if (typeof value === 'string') return value.replace(/^(\d+(?:\.\d+)?) (km|per km)$/, '($1 * probe) $2');
  if (Array.isArray(value)) return value.map(scaled);
  if (typeof value !== 'object' || value === null) return value;
  // The numbers of catastrophes are left to differences, and not all may be expressions.
  if ('kind' in value && value.kind === 'catastrophe') return value;
  return Object.fromEntries(
    Object.entries(value).map(([key, inner]) => [key, skipped.has(key) ? inner : scaled(inner)]),
  );
}
