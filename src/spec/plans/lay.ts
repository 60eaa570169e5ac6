// A scenario laid over the base: the same spec with schedules and extra phases. No stage after this knows that there was a plan.
import type { Finding } from '../finding.ts';
import type { SpecPath } from '../document.ts';
import type { ActionSpec, Spec } from '../schema/spec.ts';
import { layChange } from './change.ts';
import { originOf, type Draft } from './draft.ts';
import { layHabitat, layNewPatch } from './habitat.ts';
import { isHandlingAction, layHandling } from './handling.ts';
import { layLink } from './link.ts';
import { writeTargets } from './targets.ts';

/** The scenario that is always there: today's practice, as the model without any action. */
export const asNow = 'as now';

export interface Laid {
  /** The model of the scenario, without actions. */
  readonly spec: Spec;
  /** The base with the patches that the scenario adds, and nothing else: what crowding is solved from. Null where it adds none. */
  readonly base: Spec | null;
  readonly findings: readonly Finding[];
  /** Where a place in `spec` stands in the text. */
  readonly originOf: (path: SpecPath) => SpecPath;
}

/**
 * `actions` by name, in any order: what is laid follows the order of the text, so that the order within a scenario, its name and
 * its place among the scenarios change nothing. Parameters are taken as known: what is not known is drawn before.
 */
export function layActions(spec: Spec, actions: ReadonlySet<string>): Laid {
  const draft = draftOf(spec);
  const chosen = Object.entries(spec.actions ?? {}).filter(([name]) => actions.has(name));
  for (const [name, action] of chosen) if (action.kind === 'habitat') layNewPatch(draft, { name, spec: action });
  const base = chosen.some(([, action]) => action.kind === 'habitat' && action.new !== undefined)
    ? structuredClone<Spec>(draft.spec)
    : null;
  for (const [name, action] of chosen) layEffects(draft, name, action);
  writeTargets(draft);
  layHandling(
    draft,
    chosen.flatMap(([name, action]) => (isHandlingAction(action) ? [[name, action] as const] : [])),
  );
  return { spec: draft.spec, base, findings: draft.findings, originOf: (path) => originOf(draft, path) };
}

function draftOf(spec: Spec): Draft {
  const { actions, scenarios, money, uncertainty, ...rest } = spec;
  const firstYear = spec['first-year'] ?? 1;
  return {
    spec: { ...structuredClone(rest), ...known(spec) },
    firstYear,
    lastYear: firstYear + spec.years - 1,
    origins: new Map(),
    targets: new Map(),
    findings: [],
  };
}

/** Parameters without their uncertainty. */
function known({ parameters }: Spec): Pick<Spec, 'parameters'> {
  if (parameters === undefined) return {};
  return {
    parameters: Object.fromEntries(
      Object.entries(parameters).map(([name, parameter]) => {
        if (typeof parameter !== 'object') return [name, parameter];
        const { uncertainty, ...rest } = parameter;
        return [name, rest];
      }),
    ),
  };
}

function layEffects(draft: Draft, name: string, spec: ActionSpec): void {
  switch (spec.kind) {
    case 'link':
      layLink(draft, { name, spec });
      return;
    case 'habitat':
      layHabitat(draft, { name, spec });
      return;
    case 'change':
      layChange(draft, { name, spec });
      return;
    case 'take':
    case 'move':
    case 'add':
  }
}
