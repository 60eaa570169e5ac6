// The scenarios of a spec, and what is wrong with its plans whichever of them is run.
import { nearestName } from '../../diagnostic/nearest.ts';
import type { Finding } from '../finding.ts';
import type { ActionSpec, Spec } from '../schema/spec.ts';
import { asNow } from './lay.ts';
import { tellMistake, tellUnknown } from './tell.ts';
import { sayNumbers, wordsOf } from './words.ts';

export interface ScenarioAction {
  readonly name: string;
  readonly kind: ActionSpec['kind'];
  /** What is done, in one phrase. */
  readonly words: string;
}

/** A named list of actions over the base model. */
export interface Scenario {
  readonly name: string;
  /** In the order of the text of the actions. */
  readonly actions: readonly ScenarioAction[];
  /** The same spec with this scenario as the one that is run: compile and run it as any other. */
  readonly spec: Spec;
}

/** `as now` first, then those of the spec in the order of its text. */
export function scenariosOf(spec: Spec): readonly Scenario[] {
  const names = [asNow, ...Object.keys(spec.scenarios ?? {}).filter((name) => name !== asNow)];
  return names.map((name) => ({ name, actions: actionsOf(spec, name), spec: withScenario(spec, name) }));
}

/** The scenario that a spec runs. */
export function scenarioOf(spec: Spec): string {
  return spec.run?.scenario ?? asNow;
}

export function withScenario(spec: Spec, name: string): Spec {
  const { named, ...core } = spec;
  const { scenario, ...run } = spec.run ?? {};
  return { ...core, run: name === asNow ? run : { ...run, scenario: name }, named };
}

/** The same spec with no plans but these. */
export function onlyPlans(spec: Spec, names: ReadonlySet<string>): Spec {
  const { named, ...core } = spec;
  const kept = Object.entries(spec.scenarios ?? {}).filter(([name]) => names.has(name));
  return { ...core, scenarios: Object.fromEntries(kept), named };
}

export function actionsOf(spec: Spec, scenario: string): readonly ScenarioAction[] {
  const chosen = new Set(spec.scenarios?.[scenario] ?? []);
  const say = sayNumbers(spec);
  return Object.entries(spec.actions ?? {}).flatMap(([name, action]) =>
    chosen.has(name) ? [{ name, kind: action.kind, words: wordsOf(action, say) }] : [],
  );
}

/** Names that do not exist or stand for two things, costs without a currency, scenarios and actions that do nothing. */
export function checkPlans(spec: Spec): readonly Finding[] {
  const findings: Finding[] = [];
  const { actions = {}, scenarios = {} } = spec;
  for (const [name, action] of Object.entries(actions)) {
    checkName(spec, name, findings);
    if (action.cost !== undefined && spec.money === undefined) tellNoMoney(name, findings);
    if (action.cost !== undefined) checkCost(name, action, findings);
  }
  for (const [name, list] of Object.entries(scenarios)) checkScenario(spec, { name, list, findings });
  const used = new Set(Object.values(scenarios).flat());
  for (const name of Object.keys(actions)) if (!used.has(name)) tellIdle(name, findings);
  const chosen = scenarioOf(spec);
  if (chosen !== asNow && !Object.hasOwn(scenarios, chosen)) {
    const known = [asNow, ...Object.keys(scenarios)];
    tellUnknown({ findings }, ['run', 'scenario'], {
      code: 'unknown-scenario',
      what: 'scenario',
      name: chosen,
      known,
      part: 'value',
    });
  }
  return findings;
}

const phases = ['count', 'breeding', 'survival', 'ageing', 'demography', 'patches lost'];

/** An action is the name of its phase, too. */
function checkName(spec: Spec, name: string, findings: Finding[]): void {
  const taken = phases.includes(name) || Object.hasOwn(spec.named, name);
  if (!taken) return;
  tellMistake({ findings }, 'reserved-name', ['actions', name], {
    message: `\`${name}\` is a phase already`,
    part: 'key',
    details: { fix: 'Give this action another name.' },
  });
}

interface ScenarioList {
  readonly name: string;
  readonly list: readonly string[];
  readonly findings: Finding[];
}

function checkScenario({ actions = {} }: Spec, { name, list, findings }: ScenarioList): void {
  const path = ['scenarios', name];
  if (name === asNow) {
    tellMistake({ findings }, 'reserved-name', path, {
      message: `\`${asNow}\` is always there, without any action`,
      part: 'key',
      details: { fix: "Give this scenario another name; today's practice is written in the model itself." },
    });
  }
  if (list.length === 0) {
    const message = `\`${name}\` has no action`;
    const details = {
      reason: `It is the same as \`${asNow}\`, which is always there.`,
      fix: 'Name its actions, or remove it.',
    };
    findings.push({ severity: 'warning', code: 'empty-scenario', path, part: 'key', message, details });
  }
  list.forEach((action, i) => {
    if (Object.hasOwn(actions, action)) return;
    const known = Object.keys(actions);
    tellUnknown({ findings }, [...path, i], {
      code: 'unknown-action',
      what: 'action',
      name: action,
      known,
      part: 'value',
    });
  });
}

function tellNoMoney(name: string, findings: Finding[]): void {
  if (findings.some(({ code }) => code === 'missing-currency')) return;
  tellMistake({ findings }, 'missing-currency', ['actions', name, 'cost'], {
    message: 'It is not said in which currency costs are',
    part: 'key',
    details: { expected: 'such as `money: { currency: crowns, price-year: 2026, discount: 3 % }`' },
  });
}

function checkCost(name: string, { kind, cost = {} }: ActionSpec, findings: Finding[]): void {
  const path = ['actions', name, 'cost'];
  const tell = (key: string, message: string, expected: string): void =>
    tellMistake({ findings }, 'plan-shape', [...path, key], { message, part: 'key', details: { expected } });
  const handles = kind === 'take' || kind === 'move' || kind === 'add';
  if (cost['per-animal'] !== undefined && !handles) tell('per-animal', 'Nobody is handled here', '`once` or `yearly`');
  if (cost['per-km'] !== undefined && kind !== 'link') tell('per-km', 'Only a link has a length', '`once` or `yearly`');
}

function tellIdle(name: string, findings: Finding[]): void {
  findings.push({
    severity: 'warning',
    code: 'unused-action',
    message: `No scenario names \`${name}\``,
    path: ['actions', name],
    part: 'key',
    details: { fix: 'Name it in a scenario, or remove it.' },
  });
}

/** The nearest name of a scenario, for a slip on the command line. */
export function nearestScenario(spec: Spec, name: string): string | undefined {
  return nearestName(name, [asNow, ...Object.keys(spec.scenarios ?? {})]);
}
