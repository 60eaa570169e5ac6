// Collects the effects on each number, and writes what they make of it together.
import type { EffectSpec } from '../schema/spec.ts';
import type { SpecPath } from '../document.ts';
import type { Ast } from '../expression/ast.ts';
import { number } from '../expression/build.ts';
import { printExpression } from '../expression/print.ts';
import { readMeasure, type Dimension } from '../quantity.ts';
import { composed, meet, type TimedEffect, type When } from './compose.ts';
import { originOf, type Draft, type Target } from './draft.ts';
import { tellMistake } from './tell.ts';

export interface EffectPlace {
  readonly when: When;
  /** Where the effect stands in the text. */
  readonly path: SpecPath;
}

/** Adds an effect to a place of the draft, which is made when it is first met. */
export function addEffect(
  draft: Draft,
  at: SpecPath,
  {
    target,
    effect,
    place,
  }: { readonly target: () => Omit<Target, 'effects'>; readonly effect: EffectSpec; readonly place: EffectPlace },
): void {
  const key = JSON.stringify(at);
  const known = draft.targets.get(key) ?? { ...target(), effects: [] };
  draft.targets.set(key, known);
  known.effects.push({ effect: readEffect(effect, known.dimension, place.when), path: place.path });
}

export function readEffect({ set, times, add }: EffectSpec, dimension: Dimension, when: When): TimedEffect {
  return { when, set: measure(set, dimension), times: measure(times, 'share'), add: measure(add, dimension) };
}

/** Texts that cannot be read were told by the checks of shape. */
function measure(text: number | string | undefined, dimension: Dimension): Ast | null {
  const read = text === undefined ? null : readMeasure(text, dimension);
  return read?.ok === true ? read.ast : null;
}

/** Writes every target; a number that is still there from before is found again by the path of the action. */
export function writeTargets(draft: Draft): void {
  for (const [key, target] of draft.targets) {
    refuseContradiction(draft, target);
    const base = measure(target.base ?? undefined, target.dimension);
    const [first] = target.effects;
    if (first === undefined) continue;
    if (base === null && needsBase(target)) {
      tellMistake(draft, 'plan-shape', first.path, {
        message: `There is no number yet for ${target.words}`,
        part: 'key',
        details: {
          expected: '`set` with a number, in all years',
          fix: 'Give the number in the model, or set it here.',
        },
      });
      continue;
    }
    const value = composed(
      base ?? number(0, { offset: 0, length: 0 }),
      target.effects.map(({ effect }) => effect),
    );
    target.write(value.kind === 'number' ? value.value : printExpression(value));
    const last = target.effects.at(-1) ?? first;
    draft.origins.set(key, originOf(draft, last.path));
  }
}

/** Without a number before, all rests on one that is set for all years. */
function needsBase({ effects }: Target): boolean {
  return !effects.some(
    ({ effect: { when, set } }) => set !== null && when.from === null && when.until === null && when.over <= 1,
  );
}

function refuseContradiction(draft: Draft, { effects, words }: Target): void {
  const sets = effects.filter(({ effect }) => effect.set !== null);
  for (const [i, later] of sets.entries()) {
    const earlier = sets.slice(0, i).find((one) => meet(one.effect.when, later.effect.when));
    if (earlier === undefined) continue;
    tellMistake(draft, 'contradicting-sets', [...later.path, 'set'], {
      message: `\`${String(earlier.path[1])}\` and \`${String(later.path[1])}\` both set ${words}`,
      details: {
        expected: 'one number a year for one thing',
        fix: 'Put them into different scenarios or years, or write `times` or `add` in one of them.',
      },
    });
    return;
  }
}
