// Other models that are as sound as the one that was written: in each, one choice that nobody knows for sure is made the other
// way. Where a choice does not arise, the reason is told in the place of a model.
import { readQuantity } from '../spec/quantity.ts';
import type { Spec } from '../spec/schema/spec.ts';
import { withScaledEffects } from './scaled-effects.ts';

export interface Variant {
  readonly variant: string;
  /** What is different, in a sentence. */
  readonly what: string;
  readonly spec: Spec | null;
  /** Why there is none. */
  readonly notRun: string | null;
}

export function variantsOf(spec: Spec): readonly Variant[] {
  return [
    leavers(spec),
    correlation(spec, 0.5),
    correlation(spec, 2),
    crowdingForm(spec),
    threshold(spec),
    effects(spec, 0.5),
    effects(spec, 0),
  ];
}

function made(variant: string, what: string, spec: Spec): Variant {
  return { variant, what, spec, notRun: null };
}

function without(variant: string, notRun: string): Variant {
  return { variant, what: '', spec: null, notRun };
}

const otherAnswer = { 'all arrive': 'may miss', 'may miss': 'all arrive' } as const;

function leavers(spec: Spec): Variant {
  const variant = 'the other answer to where leavers end';
  const changed: string[] = [];
  const named = Object.entries(spec.named).map(([name, one]): [string, typeof one] => {
    if (one.kind !== 'dispersal' || one.leavers === undefined) return [name, one];
    const answer = otherAnswer[one.leavers];
    changed.push(`leavers of ${name}: ${answer}`);
    return [name, { ...one, leavers: answer }];
  });
  if (changed.length === 0) return without(variant, 'no dispersal of the model is by a kernel');
  return made(variant, changed.join('; '), { ...spec, named: Object.fromEntries(named) });
}

type Between = NonNullable<Spec['variation']>[string];

function correlation(spec: Spec, times: number): Variant {
  const variant = times < 1 ? 'half the correlation between patches' : 'double the correlation between patches';
  const between = spec.variation?.['between-patches'];
  if (between === undefined || spec.patches.length < 2) {
    return without(variant, 'no rate varies from year to year in several patches');
  }
  const scaled = scaledCorrelation(between, times);
  if (scaled === null) return without(variant, 'the correlation is 0 or 1, and stays so');
  return made(variant, scaled.words, { ...spec, variation: { ...spec.variation, 'between-patches': scaled.value } });
}

/** Of a range, the range itself is scaled: the distance over which patches have their good and bad years together. */
function scaledCorrelation(
  between: Between,
  times: number,
): { readonly value: Between; readonly words: string } | null {
  const of = (value: number): number => Math.max(-1, Math.min(1, value * times));
  if (typeof between === 'number') {
    return of(between) === between
      ? null
      : { value: of(between), words: `a correlation of ${of(between)} between patches` };
  }
  const range = Object.entries(between).find(([key]) => key === 'range')?.[1];
  if (typeof range === 'number' || typeof range === 'string') {
    const read = readQuantity(range, 'length');
    if (!read.ok) return null;
    const kilometres = `${read.value * times} km`;
    return { value: { range: kilometres }, words: `a correlation between patches over ${kilometres}` };
  }
  const table = Object.entries(between).map(([from, row]): [string, Record<string, number>] => [
    from,
    Object.fromEntries(
      Object.entries(typeof row === 'object' ? row : {}).flatMap(([to, value]): readonly [string, number][] =>
        typeof value === 'number' ? [[to, from === to ? value : of(value)]] : [],
      ),
    ),
  ]);
  return { value: Object.fromEntries(table), words: `all correlations between patches times ${times}` };
}

/** Of much the same strength near the capacity, and another far from it. */
const otherForm = {
  'beverton-holt': 'ricker',
  ricker: 'beverton-holt',
  theta: 'beverton-holt',
  hassell: 'ricker',
} as const;

function crowdingForm(spec: Spec): Variant {
  const variant = 'another form of crowding';
  const changed: string[] = [];
  const turned = structuredClone(spec);
  const own = Object.entries(turned.named).flatMap(([name, one]) =>
    one.kind === 'crowding' ? [[name, one] as const] : [],
  );
  const all = turned.crowding === undefined ? own : [['crowding', turned.crowding] as const, ...own];
  for (const [name, one] of all) {
    if (one.form === 'allee') continue;
    one.form = otherForm[one.form];
    delete one['shape-number'];
    changed.push(`${name} by the form ${one.form}`);
  }
  if (changed.length === 0) return without(variant, 'the model has no crowding of a form');
  return made(variant, changed.join('; '), turned);
}

function threshold(spec: Spec): Variant {
  const variant = 'a second threshold';
  const [first] = Object.entries(spec.outcomes ?? {});
  if (first === undefined) return without(variant, 'the model names no outcome');
  const [name, outcome] = first;
  const half = (value: number): number => Math.max(1, value / 2);
  if ((outcome.below ?? outcome.above) === 1)
    return without(variant, `“${name}” is at 1 animal, of which there is no half`);
  const changed =
    outcome.below !== undefined
      ? { ...outcome, below: half(outcome.below) }
      : outcome.above !== undefined
        ? { ...outcome, above: half(outcome.above) }
        : null;
  if (changed === null) return without(variant, `“${name}” has no threshold in animals`);
  const words = `“${name}” at ${changed.below ?? changed.above ?? 0} animals in the place of ${outcome.below ?? outcome.above ?? 0}`;
  return made(variant, words, { ...spec, outcomes: { ...spec.outcomes, [name]: changed } });
}

function effects(spec: Spec, share: number): Variant {
  const variant = share === 0 ? 'plans without any effect' : 'plans with half their effect';
  if (Object.keys(spec.actions ?? {}).length === 0) return without(variant, 'no plan has an action');
  const what =
    share === 0 ? 'every action costs what it costs and does nothing' : 'every action does half of what is hoped';
  return made(variant, what, withScaledEffects(spec, share));
}
