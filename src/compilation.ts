// From a spec to everything that is made from it before the first year is run. A scenario enters here, as a changed spec: what
// crowding is solved from and who is there at count 0 come from the base, and all plans share them.
import { solveCapacities } from './compile/capacity.ts';
import { buildImage } from './compile/image/build.ts';
import { nobodyThere } from './compile/nobody-there.ts';
import { solveStages } from './compile/stage-advance.ts';
import { startAnimals } from './compile/start.ts';
import type { Compiled } from './compile/year-map.ts';
import { buildLandscape } from './landscape/build.ts';
import { lengthOfLink } from './landscape/links.ts';
import type { LandscapeMemory } from './landscape/memory.ts';
import type { Model } from './model/model.ts';
import type { Context } from './model/context.ts';
import type { ModelMemory } from './model/memory.ts';
import { resolveCosts, type PlanCost } from './model/costs.ts';
import { resolveModel, resolveWithContext } from './model/resolve.ts';
import { provenanceOf, type Provenance } from './results/provenance.ts';
import type { Finding } from './spec/finding.ts';
import { asNow, layActions, type Laid } from './spec/plans/lay.ts';
import { actionsOf, checkPlans, scenarioOf, type ScenarioAction } from './spec/plans/scenarios.ts';
import type { Spec } from './spec/schema/spec.ts';

/** Everything that is made from a spec before the first year is run. */
export interface CompiledModel extends Compiled {
  /** As it was asked for: with its actions, and the scenario that is run under `run`. */
  readonly spec: Spec;
  /** With the actions of the scenario laid over it, and no others. */
  readonly laid: Spec;
  readonly scenario: string;
  /** What the scenario does. */
  readonly actions: readonly ScenarioAction[];
  /** What that costs; `totalCost` of results/costs.ts sums it up, with the animals handled. */
  readonly cost: PlanCost;
  /** Whole animals at count 0, P·C. */
  readonly startAnimals: Float64Array;
  readonly image: ArrayBuffer;
  readonly provenance: Provenance;
}

export interface Compilation {
  /** Null where a mistake stands in the way. */
  readonly compiled: CompiledModel | null;
  /** Errors, warnings and notes. */
  readonly findings: readonly Finding[];
}

/** What all scenarios of a spec are compiled from. */
export interface CompiledBase {
  readonly alone: Alone;
}

export function compileBase(spec: Spec): CompiledBase {
  return { alone: compileAlone(spec) };
}

/** Of the scenario under `run`. Mistakes are findings, all of them in one round, never thrown. */
export function compileSpec(spec: Spec): Compilation {
  return compileScenario(compileBase(spec), spec);
}

/** The same of a spec that differs from that of the base in its scenario alone. */
export function compileScenario({ alone: base }: CompiledBase, spec: Spec): Compilation {
  const ofPlans = checkPlans(spec);
  const findings = [...ofPlans, ...base.findings];
  if (base.parts === null || hasError(findings)) return { compiled: null, findings };
  const scenario = scenarioOf(spec);
  if (scenario === asNow) {
    const { cost, findings: ofCosts } = costsOf(base, base.parts.model, []);
    findings.push(...ofCosts);
    if (hasError(ofCosts)) return { compiled: null, findings };
    return { compiled: finish(spec, { parts: base.parts, laid: spec, cost }), findings };
  }
  const laid = layActions(spec, new Set(spec.scenarios?.[scenario] ?? []));
  const plan = compilePlan(base.parts, { laid, scenario });
  const known = new Set(findings.map(keyOf));
  findings.push(...laid.findings);
  for (const found of plan.findings) {
    if (known.has(keyOf(found))) continue;
    known.add(keyOf(found));
    const path = laid.originOf(found.path);
    // A stretch inside an expression that was laid is nowhere in the text.
    const { span, ...whole } = found;
    findings.push(path === found.path ? found : { ...whole, path });
  }
  if (plan.parts === null || hasError(findings)) return { compiled: null, findings };
  const chosen = actionsOf(spec, scenario).map(({ name }) => name);
  const { cost, findings: ofCosts } = costsOf(base, plan.parts.model, chosen);
  findings.push(...ofCosts);
  if (hasError(ofCosts)) return { compiled: null, findings };
  return { compiled: finish(spec, { parts: plan.parts, laid: laid.spec, cost }), findings };
}

/** A scenario as a spec of its own. */
export interface LaidScenario {
  readonly laid: Pick<Laid, 'spec' | 'base'>;
  readonly scenario: string;
}

export interface Parts extends Compiled {
  readonly startAnimals: Float64Array;
}

export interface Made {
  readonly parts: Parts | null;
  readonly findings: readonly Finding[];
}

export interface Alone extends Made {
  readonly context: Context;
  /** Findings of the context when the model was resolved. */
  readonly resolved: number;
}

/** What compiling one spec leaves for the next, which differs in the values of some parameters alone. */
export interface CompileMemory {
  readonly model: ModelMemory;
  readonly landscape: LandscapeMemory;
}

/** A spec without regard to its actions. */
export function compileAlone(spec: Spec, memory?: CompileMemory): Alone {
  const resolved = resolveWithContext(spec, memory?.model);
  const { context } = resolved;
  const found = { context, resolved: context.findings.length };
  if (resolved.model === null) return { parts: null, findings: resolved.findings, ...found };
  const { landscape, findings: ofLandscape } = buildLandscape(resolved.model, memory?.landscape);
  const { model, findings: ofStages } = solveStages(resolved.model, landscape);
  const { coefficients, findings: ofCapacities } = solveCapacities(model);
  const { animals, findings: ofStart } = startAnimals({ model, landscape, coefficients });
  const findings = [
    ...resolved.findings,
    ...ofLandscape,
    ...ofStages,
    ...ofCapacities,
    ...ofStart,
    ...nobodyThere(model),
  ];
  if (hasError(findings)) return { parts: null, findings, ...found };
  return { parts: { model, landscape, coefficients, startAnimals: animals }, findings, ...found };
}

export interface PlanMemory {
  readonly own: CompileMemory;
  /** Of the base with the patches that the plan adds. */
  readonly extended: CompileMemory;
}

/** A plan: its own model, with crowding as strong as the base has it and the same animals at count 0. */
export function compilePlan(base: Parts, { laid, scenario }: LaidScenario, memory?: PlanMemory): Made {
  const extended =
    laid.base === null ? { model: base.model, findings: [] } : resolveStaged(laid.base, memory?.extended);
  const resolved = resolveModel(laid.spec, memory?.own.model);
  const found = [...resolved.findings, ...extended.findings];
  if (resolved.model === null || extended.model === null) return { parts: null, findings: found };
  const model = withStagesOf(extended.model, {
    ...resolved.model,
    // Every output of the plan says so.
    title: `${base.model.title}, plan: ${scenario}`,
    uncertainty: base.model.uncertainty,
  });
  const { landscape, findings: ofLandscape } = buildLandscape(model, memory?.own.landscape);
  const { coefficients, findings: ofCapacities } = solveCapacities(model, extended.model);
  const findings = [...found, ...ofLandscape, ...ofCapacities, ...nobodyThere(model)];
  const startAnimals = sameStart(base, model);
  return { parts: hasError(findings) ? null : { model, landscape, coefficients, startAnimals }, findings };
}

function resolveStaged(
  spec: Spec,
  memory?: CompileMemory,
): { readonly model: Model | null; readonly findings: readonly Finding[] } {
  const { model, findings } = resolveModel(spec, memory?.model);
  if (model === null) return { model, findings };
  const staged = solveStages(model, buildLandscape(model, memory?.landscape).landscape);
  return { model: staged.model, findings: [...findings, ...staged.findings] };
}

/** How many go on to the next stage rests on growth: it is solved from the base, and held. */
function withStagesOf(base: Model, model: Model): Model {
  const solved = base.phases.find((phase) => phase.kind === 'ageing');
  if (solved?.stages === undefined) return model;
  return { ...model, phases: model.phases.map((phase) => (phase.kind === 'ageing' ? solved : phase)) };
}

/** Patches that a plan adds stand after all others, and are empty. */
function sameStart({ startAnimals }: Parts, { patches, classes }: Model): Float64Array {
  const animals = new Float64Array(patches.length * classes.length);
  animals.set(startAnimals);
  return animals;
}

interface Costed {
  readonly cost: PlanCost;
  readonly findings: readonly Finding[];
}

/**
 * Costs are expressions over the numbers of the base. A mistake in a number is told once for each base, so that what is wrong here
 * may have been told of an earlier scenario.
 */
export function costsOf({ context, resolved }: Alone, model: Model, actions: readonly string[]): Costed {
  const cost = resolveCosts(context, actions, (action) => kilometresOf(context.spec, model, action));
  const told = context.findings
    .slice(resolved)
    .filter(({ path }) => path[0] !== 'actions' || actions.includes(String(path[1])));
  return { cost, findings: [...new Map(told.map((one) => [keyOf(one), one])).values()] };
}

/** Of a link, the length of its way in the last year, when all effects are there. */
function kilometresOf(spec: Spec, { patches, phases }: Model, action: string): number {
  const own = spec.actions?.[action];
  if (own?.kind !== 'link') return NaN;
  for (const phase of phases) {
    if (phase.kind !== 'dispersal' || (own.dispersal !== undefined && own.dispersal !== phase.name)) continue;
    const { links = [] } = phase.byYear?.epochs.at(-1) ?? phase;
    const link = links.find(({ between }) => between.every((p) => own.between.includes(patches[p]?.name ?? '')));
    if (link !== undefined) return lengthOfLink(patches, phase, link);
  }
  return NaN;
}

interface Finishing {
  readonly parts: Parts;
  readonly laid: Spec;
  readonly cost: PlanCost;
}

function finish(spec: Spec, { parts, laid, cost }: Finishing): CompiledModel {
  const scenario = scenarioOf(spec);
  return {
    ...parts,
    spec,
    laid,
    scenario,
    actions: actionsOf(spec, scenario),
    cost,
    image: buildImage(parts),
    provenance: provenanceOf(parts.model.title, spec),
  };
}

export function hasError(findings: readonly Finding[]): boolean {
  return findings.some(({ severity }) => severity === 'error');
}

function keyOf({ code, message, path }: Finding): string {
  return JSON.stringify([code, message, path]);
}
