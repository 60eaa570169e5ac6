// From a spec to a model: names resolved, defaults filled, one unit system. Every mistake is found, not only the first.
import { expandStages } from '../spec/expand-stages.ts';
import type { Finding } from '../spec/finding.ts';
import type { Spec } from '../spec/schema/spec.ts';
import type { Context } from './context.ts';
import { resolveClasses } from './classes.ts';
import { resolveCrowding } from './crowding.ts';
import type { Model } from './model.ts';
import type { ModelMemory } from './memory.ts';
import { Numbers } from './numbers.ts';
import { resolveDrivers } from './drivers.ts';
import { resolveObserved } from './observed.ts';
import { resolveOutcomes } from './outcomes.ts';
import { checkNames, namedExpressions, resolveParameters } from './parameters.ts';
import { resolvePatches, withFirstNumbers } from './patches.ts';
import { resolvePhases } from './phases.ts';
import { runSettings } from './run-settings.ts';
import { resolveStart } from './start.ts';
import { resolveUncertainty } from './uncertainty/resolve.ts';
import { resolveCatastrophes } from './variation/catastrophe.ts';
import { resolveVariation } from './variation/resolve.ts';

export interface Resolved {
  /** Null where a mistake stands in the way. */
  readonly model: Model | null;
  readonly findings: readonly Finding[];
}

export function resolveModel(spec: Spec, memory?: ModelMemory): Resolved {
  return resolveWithContext(spec, memory);
}

/** With what it was resolved from, for those who ask further. */
export function resolveWithContext(spec: Spec, memory?: ModelMemory): Resolved & { readonly context: Context } {
  const expanded = expandStages(spec);
  const findings: Finding[] = [...expanded.findings];
  const alone = contextOf(expanded.spec, findings);
  const context = memory === undefined ? alone : { ...alone, memory };
  checkNames(context);
  const phases = resolvePhases(context);
  const parts = {
    parameters: resolveParameters(context),
    phases,
    crowding: resolveCrowding(context, phases),
    variation: resolveVariation(context, phases),
    catastrophes: resolveCatastrophes(context, phases),
    uncertainty: resolveUncertainty(context),
    start: resolveStart(context),
    outcomes: resolveOutcomes(context),
    ...observedIn(context),
    ...runSettings(context),
  };
  if (findings.some((finding) => finding.severity === 'error')) return { model: null, findings, context };
  return { model: { ...head(context), ...parts, defaults: context.defaults }, findings, context };
}

function observedIn(context: Context): Pick<Model, 'observed'> {
  const observed = resolveObserved(context);
  return observed === undefined ? {} : { observed };
}

function contextOf(spec: Spec, findings: Finding[]): Context {
  const resolved = resolvePatches(spec, findings);
  const { attributes } = resolved;
  const time = { firstYear: spec['first-year'] ?? 1, steps: spec.years };
  const drivers = resolveDrivers(spec, time, findings);
  const numbers = new Numbers(namedExpressions(spec), { attributes, drivers, findings });
  const patches = withFirstNumbers(resolved, numbers, { firstYear: time.firstYear, findings });
  const defaults: string[] = [];
  const classes = resolveClasses(spec, findings);
  if (spec['first-year'] === undefined)
    defaults.push('The first step is year 1, and the start year 0, since no `first-year` is given.');
  return {
    spec,
    patches,
    ...classes,
    names: {
      patches: new Map(patches.map((patch, p) => [patch.name, p])),
      classes: new Map(classes.classes.map((name, c) => [name, c])),
    },
    numbers,
    drivers,
    attributes,
    time,
    toldBounds: new Set(),
    findings,
    defaults,
  };
}

function head({ spec, patches, classes, sexes, time }: Context) {
  const { study } = spec;
  return {
    title: study.title,
    question: study.question ?? null,
    by: study.by ?? null,
    madeFor: study.for ?? null,
    date: study.date ?? null,
    status: study.status ?? null,
    invented: study.invented ?? false,
    firstYear: time.firstYear,
    steps: time.steps,
    counts: spec.counts,
    oldest: typeof spec.oldest === 'object' ? null : (spec.oldest ?? null),
    patches,
    classes,
    ...(sexes === null ? {} : { sexes }),
    year: spec.year,
  } as const;
}
