// Crowding: which rates it scales, whom it counts, and the capacity at which a patch alone stands still.
import type { SpecPath } from '../spec/document.ts';
import type { CrowdingSpec } from '../spec/schema/spec.ts';
import { classWeights } from './class-weights.ts';
import { classMask, fail, patchIndex, type Context } from './context.ts';
import { resolveCapacities, type Capacities } from './capacities.ts';
import type { Crowding, Phase } from './model.ts';
import { rateCalled } from './named-rates.ts';
import { whereIn, withinBounds } from './rates.ts';

export function resolveCrowding(context: Context, phases: readonly Phase[]): readonly Crowding[] {
  const { crowding, named } = context.spec;
  const own = Object.entries(named).flatMap(([name, spec]) =>
    spec.kind === 'crowding' ? [resolveOne(context, { name, spec, phases })] : [],
  );
  return crowding === undefined ? own : [resolveOne(context, { name: 'crowding', spec: crowding, phases }), ...own];
}

interface Named {
  readonly name: string;
  readonly spec: CrowdingSpec;
  readonly phases: readonly Phase[];
}

function resolveOne(context: Context, { name, spec, phases }: Named): Crowding {
  const path = [name];
  const shapeNumber = shapeNumberOf(context, spec, path);
  return {
    name,
    form: spec.form,
    ...(shapeNumber === null ? {} : { shapeNumber }),
    counted: classWeights(context, spec.counted, [...path, 'counted']),
    changes: changedRates(context, { spec, path, phases }),
    ...capacityOf(context, spec, path),
    alleeHalf: alleeHalves(context, spec, path),
    whereDeclining: whereDeclining(context, spec, path),
  };
}

/** Null where the form has none, or after telling what is wrong. */
function shapeNumberOf(context: Context, spec: CrowdingSpec, path: SpecPath): number | null {
  const wanted = spec.form === 'theta' || spec.form === 'hassell';
  const written = spec['shape-number'];
  if (wanted !== (written !== undefined)) {
    fail(context, 'crowding-shape', wanted ? [...path, 'form'] : [...path, 'shape-number'], {
      message: wanted
        ? `The form \`${spec.form}\` needs a \`shape-number\``
        : `The form \`${spec.form}\` has no shape number`,
      ...(wanted ? {} : { part: 'key' as const }),
      details: {
        expected: wanted ? 'a number above zero, such as `shape-number: 2`' : 'one with `theta` and `hassell` only',
      },
    });
  }
  if (!wanted || written === undefined) return null;
  const at = [...path, 'shape-number'];
  const value = context.numbers.value(written, at, { year: context.time.firstYear });
  if (value > 0) return value;
  if (!Number.isNaN(value)) {
    fail(context, 'out-of-range', at, {
      message: `The shape number is ${value}`,
      details: { expected: 'a number above zero' },
    });
  }
  return null;
}

function capacityOf(context: Context, spec: CrowdingSpec, path: SpecPath): Capacities {
  if (spec.form === 'allee') {
    for (const key of ['capacity', 'where-declining'] as const) {
      if (spec[key] === undefined) continue;
      fail(context, 'crowding-shape', [...path, key], {
        message: `The form \`allee\` has no \`${key}\``,
        part: 'key',
        details: { fix: 'Remove it, or take a form that falls with the number, such as `beverton-holt`.' },
      });
    }
    if (spec['allee-half'] === undefined) {
      fail(context, 'crowding-shape', [...path, 'form'], {
        message: 'The form `allee` needs an `allee-half`',
        details: { expected: 'the number at which rates fall to half, such as `allee-half: 4`' },
      });
    }
    return { capacity: new Float64Array(context.patches.length).fill(NaN) };
  }
  const { capacity } = spec;
  if (capacity !== undefined) {
    const make = (): Capacities => resolveCapacities(context, capacity, [...path, 'capacity']);
    const { memory, numbers } = context;
    return memory === undefined ? make() : memory.capacities.of(path.join('.'), numbers, make);
  }
  fail(context, 'crowding-shape', path, {
    message: `The crowding \`${path.join('.')}\` needs a \`capacity\``,
    part: 'key',
    details: { expected: 'the number at which a patch alone stands still, such as `capacity: capacity`' },
  });
  return { capacity: new Float64Array(context.patches.length).fill(NaN) };
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
