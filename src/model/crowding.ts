// Crowding: which rates it scales, whom it counts, and the capacity at which a patch alone stands still.
import type { SpecPath } from '../spec/document.ts';
import type { CeilingSpec, CrowdingSpec } from '../spec/schema/spec.ts';
import { classIndex, classMask, fail, patchIndex, type Context } from './context.ts';
import type { CeilingPhase, Crowding, Phase } from './model.ts';
import { rateCalled } from './named-rates.ts';
import { whereIn, withinBounds } from './rates.ts';

export function resolveCeiling(context: Context, name: string, spec: CeilingSpec): CeilingPhase {
  const counted = classMask(context, spec.counted, [name, 'counted']);
  const capacity = capacities(context, spec.capacity, [name, 'capacity']);
  return { kind: 'ceiling', name, counted, capacity };
}

export function resolveCrowding(context: Context, phases: readonly Phase[]): readonly Crowding[] {
  const spec = context.spec.crowding;
  if (spec === undefined) return [];
  const path = ['crowding'];
  return [
    {
      name: 'crowding',
      form: spec.form,
      counted: countedWeights(context, spec, path),
      changes: changedRates(context, { spec, path, phases }),
      capacity: capacities(context, spec.capacity, [...path, 'capacity']),
      alleeHalf: alleeHalves(context, spec, path),
      whereDeclining: whereDeclining(context, spec, path),
    },
  ];
}

function countedWeights(context: Context, { counted }: CrowdingSpec, path: SpecPath): Float64Array {
  if (counted === 'all' || Array.isArray(counted)) {
    return Float64Array.from(classMask(context, counted, [...path, 'counted']));
  }
  const weights = new Float64Array(context.classes.length);
  for (const [name, weight] of Object.entries(counted)) {
    const c = classIndex(context, name, [...path, 'counted', name]);
    if (c >= 0) weights[c] = weight;
  }
  return weights;
}

interface Changes {
  readonly spec: CrowdingSpec;
  readonly path: SpecPath;
  readonly phases: readonly Phase[];
}

function changedRates(context: Context, { spec, path, phases }: Changes): Crowding['changes'] {
  return Object.entries(spec.changes).flatMap(([rate, list]) => {
    const target = rateCalled(context, { rate, path: [...path, 'changes', rate], phases });
    return target === null ? [] : [{ ...target, classes: classMask(context, list, [...path, 'changes', rate]) }];
  });
}

function capacities(context: Context, expression: number | string, path: SpecPath): Float64Array {
  return Float64Array.from(context.patches, (patch, p) => {
    const value = context.numbers.value(expression, path, whereIn(context, p, context.time.firstYear));
    if (value > 0 || Number.isNaN(value)) return value;
    const key = JSON.stringify(path);
    if (!context.toldBounds.has(key)) {
      fail(context, 'missing-capacity', path, {
        message: `The capacity of ${patch.name} is ${value}`,
        details: { expected: 'a number of animals above zero' },
      });
    }
    context.toldBounds.add(key);
    return NaN;
  });
}

function alleeHalves(context: Context, spec: CrowdingSpec, path: SpecPath): Float64Array {
  const expression = spec['allee-half'] ?? 0;
  const at = [...path, 'allee-half'];
  return Float64Array.from(context.patches, (patch, p) => {
    const value = context.numbers.value(expression, at, whereIn(context, p, context.time.firstYear));
    const told = { expression, path: at, what: 'half-saturation of the Allee factor' };
    withinBounds(context, told, { value, bounds: 'from zero', patch: patch.name });
    return value;
  });
}

function whereDeclining(context: Context, spec: CrowdingSpec, path: SpecPath): Crowding['whereDeclining'] {
  const said = spec['where-declining'];
  if (said === undefined) return null;
  if (typeof said === 'string') return said;
  const as = patchIndex(context, said.as, [...path, 'where-declining', 'as'], 'value');
  return as < 0 ? null : { as };
}
