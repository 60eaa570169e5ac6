// What an action does, in one phrase.
import { amountAndUnit } from '../quantity.ts';
import type { ActionSpec, EffectSpec, Spec, UncertainSpec } from '../schema/spec.ts';

type Say = (number: number | string) => string;

/** Numbers that are not exactly known with what is said of them, not by a name. */
export function sayNumbers({ parameters = {} }: Spec): Say {
  return (number) => {
    if (typeof number === 'number') return String(number);
    const { amount, unit } = amountAndUnit(number);
    const named = Object.hasOwn(parameters, amount) ? parameters[amount] : undefined;
    if (typeof named !== 'object' || named.uncertainty === undefined) return number;
    return `${named.value}${unit === '' ? '' : ` ${unit}`} (${doubtWords(named.uncertainty)})`;
  };
}

function doubtWords({ 'standard-error': error, interval, uniform, triangular }: UncertainSpec): string {
  if (error !== undefined) return `standard error ${error}`;
  const [low = '', high = ''] = interval ?? uniform ?? triangular ?? [];
  return `${interval === undefined ? 'somewhere from' : '95 % interval'} ${low} to ${high}`;
}

/** `say` gives a number of the action in words. */
export function wordsOf(spec: ActionSpec, say: Say): string {
  return `${deedOf(spec, say)}${yearsOf(spec)}`;
}

function deedOf(spec: ActionSpec, say: Say): string {
  switch (spec.kind) {
    case 'link': {
      const ways = spec.dispersal === undefined ? '' : ` of ${spec.dispersal}`;
      const effects = (['crossing-death', 'turn-back', 'distance', 'share'] as const).flatMap((key) =>
        spec[key] === undefined ? [] : [`${key.replaceAll('-', ' ')} ${effectWords(spec[key], say)}`],
      );
      return `the way${ways} between ${spec.between[0]} and ${spec.between[1]}${effects.length === 0 ? ' changes' : `: ${effects.join(', ')}`}`;
    }
    case 'habitat':
      return habitatWords(spec, say);
    case 'change':
      return changeWords(spec, say);
    case 'take':
      return `${amountWords(spec, say)} taken${spec.in === undefined ? '' : ` in ${listOf(spec.in)}`}`;
    case 'move':
      return `${amountWords(spec, say)} moved from ${listOf(spec.from)} to ${spec.to}`;
    case 'add':
      return `${byClassWords(spec.number, say)} released in ${listOf(spec.in)}`;
  }
}

function habitatWords(spec: Extract<ActionSpec, { kind: 'habitat' }>, say: Say): string {
  const { in: where, new: made, lost, capacity, area, quality } = spec;
  const effects = [
    ...(made === undefined ? [] : [`${made.name} is made`]),
    ...(lost === true ? [`${listOf(where ?? [])} is lost`] : []),
    ...Object.entries({ capacity, area, ...quality }).flatMap(([key, effect]) =>
      effect === undefined ? [] : [`${key} of ${listOf(where ?? [])} ${effectWords(effect, say)}`],
    ),
  ];
  return effects.length === 0 ? `${listOf(where ?? [])} changes` : effects.join(', ');
}

function changeWords(spec: Extract<ActionSpec, { kind: 'change' }>, say: Say): string {
  const { parameters = {}, rates = {}, in: where } = spec;
  const named = Object.entries(parameters).map(([key, effect]) => `${key} ${effectWords(effect, say)}`);
  const place = where === undefined ? '' : ` in ${listOf(where)}`;
  const rated = Object.entries(rates).flatMap(([phase, classes]) =>
    Object.entries(classes).map(([one, effect]) => `${phase} of ${one}${place} ${effectWords(effect, say)}`),
  );
  return [...named, ...rated].join(', ');
}

function effectWords({ set, times, add }: EffectSpec, say: Say): string {
  const parts = [
    ...(set === undefined ? [] : [`to ${say(set)}`]),
    ...(times === undefined ? [] : [`times ${say(times)}`]),
    ...(add === undefined ? [] : [`plus ${say(add)}`]),
  ];
  return parts.join(' ');
}

type Amounts = number | string | Readonly<Record<string, number | string>>;

function amountWords(spec: Extract<ActionSpec, { kind: 'take' | 'move' }>, say: Say): string {
  const classes = spec.classes === undefined || spec.classes === 'all' ? '' : ` ${spec.classes.join(', ')}`;
  if (spec.number !== undefined) return `${byClassWords(spec.number, say)}${classes}`;
  if (spec.share !== undefined) return `a share of ${byClassWords(spec.share, say)}${classes}`;
  if (spec.kind === 'take' && spec['share-of-excess'] !== undefined) {
    return `a share of ${say(spec['share-of-excess'])} of what exceeds ${say(spec.over ?? '')}${classes}`;
  }
  return 'animals';
}

function byClassWords(amounts: Amounts, say: Say): string {
  if (typeof amounts !== 'object') return say(amounts);
  return Object.entries(amounts)
    .map(([one, amount]) => `${say(amount)} ${one}`)
    .join(', ');
}

function listOf(names: string | readonly string[]): string {
  return [names].flat().join(', ');
}

function yearsOf(spec: ActionSpec): string {
  if (spec.kind === 'take' || spec.kind === 'move' || spec.kind === 'add') {
    const { years } = spec;
    if (years === undefined) return '';
    return Array.isArray(years) ? `, in ${years.join(', ')}` : stretch(years);
  }
  return `${stretch(spec)}${spec.over === undefined ? '' : `, growing over ${String(spec.over)}`}`;
}

function stretch({ from, until }: { readonly from?: number; readonly until?: number }): string {
  const begin = from === undefined ? '' : `, from ${String(from)}`;
  return `${begin}${until === undefined ? '' : `${begin === '' ? ',' : ''} until ${String(until)}`}`;
}
