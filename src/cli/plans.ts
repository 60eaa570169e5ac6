// Which plans of a model are compared.
import { asNow } from '../spec/plans/lay.ts';
import { nearestScenario, onlyPlans } from '../spec/plans/scenarios.ts';
import type { Spec } from '../spec/schema/spec.ts';
import { Ending, exitCodes } from './exit.ts';

/** The spec with the plans that `--only` names, or with all where it names none. */
export function chosenPlans(spec: Spec, names: readonly string[] | undefined): Spec {
  if (names === undefined) return spec;
  const known = Object.keys(spec.scenarios ?? {});
  for (const name of names) {
    if (known.includes(name) || name === asNow) continue;
    const nearest = nearestScenario(spec, name);
    const hint = nearest === undefined || !known.includes(nearest) ? '' : ` Did you mean \`${nearest}\`?`;
    throw new Ending(exitCodes.usage, `--only ${name}: the model has no plan \`${name}\`.${hint}`);
  }
  return onlyPlans(spec, new Set(names));
}
