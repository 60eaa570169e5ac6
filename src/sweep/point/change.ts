// A point as a changed spec: no stage after it knows that there is a sweep.
import type { Spec } from '../../spec/schema/spec.ts';
import type { SpecPath } from '../../spec/document.ts';
import type { Factor, Value } from '../design/factor.ts';
import { withScenario } from '../../spec/plans/scenarios.ts';
import { placesIn, scenarioName, withValueAt } from '../places.ts';

/** Gives the spec with the values of the factors, in their order; what is swept is then taken as known. */
export function openChange(spec: Spec, factors: readonly Factor[]): (values: readonly Value[]) => Spec {
  const places = new Map(placesIn(spec).map(({ name, path }) => [name, path] as const));
  const parameters = spec.parameters ?? {};
  const targets = factors.map(({ name }): SpecPath | null =>
    Object.hasOwn(parameters, name) ? null : (places.get(name) ?? null),
  );
  const base = known(spec);
  return (values) => {
    const given: Record<string, Value> = {};
    let changed = base;
    let scenario: string | null = null;
    factors.forEach(({ name }, k) => {
      const [path, value] = [targets[k], values[k]];
      if (value === undefined) return;
      if (name === scenarioName) {
        scenario = String(value);
        return;
      }
      if (path === null || path === undefined) given[name] = value;
      else changed = withValueAt(changed, path, value);
    });
    const whole = { ...changed, parameters: { ...changed.parameters, ...given } };
    return scenario === null ? whole : withScenario(whole, scenario);
  };
}

/** Without what is said of how sure numbers are. */
function known(spec: Spec): Spec {
  const kept = Object.entries(spec.parameters ?? {}).map(([name, before]): [string, typeof before] => {
    if (typeof before !== 'object') return [name, before];
    const { value, source } = before;
    return [name, source === undefined ? { value } : { value, source }];
  });
  const { named, ...core } = spec;
  return { ...core, uncertainty: {}, parameters: Object.fromEntries(kept), named };
}
