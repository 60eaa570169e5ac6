// Takes, moves and releases of a plan: phases under the name of the action, at their place in the year.
import type { ActionSpec, AddSpec, MoveSpec, NamedSpec, TakeSpec } from '../schema/spec.ts';
import type { Draft } from './draft.ts';
import { tellMistake, tellUnknown } from './tell.ts';

type HandlingAction = Extract<ActionSpec, { readonly kind: 'take' | 'move' | 'add' }>;

export function isHandlingAction(spec: ActionSpec): spec is HandlingAction {
  return spec.kind === 'take' || spec.kind === 'move' || spec.kind === 'add';
}

interface Placed {
  readonly name: string;
  readonly spec: HandlingAction;
  readonly phase: string;
  readonly side: 'before' | 'after';
}

/** At one place in the year actions stand in the order of the text. */
export function layHandling(draft: Draft, actions: readonly (readonly [string, HandlingAction])[]): void {
  const { year } = draft.spec;
  const placed = actions.flatMap(([name, spec]) => placeOf(draft, name, spec) ?? []);
  const at = (phase: string, side: Placed['side']): readonly string[] =>
    placed.filter((one) => one.phase === phase && one.side === side).map(({ name }) => name);
  draft.spec.year = year.flatMap((phase) => [...at(phase, 'before'), phase, ...at(phase, 'after')]);
  draft.spec.year.forEach((phase, i) => {
    const own = placed.find(({ name }) => name === phase);
    const origin = own === undefined ? ['year', year.indexOf(phase)] : ['actions', own.name, own.side];
    draft.origins.set(JSON.stringify(['year', i]), origin);
  });
  const phases = placed.map(({ name, spec }): [string, NamedSpec] => [name, phaseOf(spec)]);
  draft.spec.named = { ...draft.spec.named, ...Object.fromEntries(phases) };
  for (const { name } of placed) draft.origins.set(JSON.stringify([name]), ['actions', name]);
}

function placeOf(draft: Draft, name: string, spec: HandlingAction): Placed | null {
  const { before, after } = spec;
  const phase = before ?? after;
  if (phase === undefined || (before !== undefined && after !== undefined)) {
    tellMistake(draft, 'plan-shape', ['actions', name], {
      message: `\`${name}\` does not say where in the year it is done`,
      part: 'key',
      details: { expected: 'one of `before: PHASE` and `after: PHASE`' },
    });
    return null;
  }
  const side = before === undefined ? 'after' : 'before';
  const { year } = draft.spec;
  if (year.includes(phase)) return { name, spec, phase, side };
  const what = 'phase in the year called';
  tellUnknown(draft, ['actions', name, side], { code: 'unknown-phase', what, name: phase, known: year, part: 'value' });
  return null;
}

/** Without what only an action has. */
function phaseOf(spec: HandlingAction): TakeSpec | MoveSpec | AddSpec {
  const { before, after, cost, ...phase } = spec;
  return phase;
}
