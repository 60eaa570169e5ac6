// What an action does, in one phrase.
import type { ActionSpec } from '../schema/spec.ts';
import type { Effect } from '../schema/effect.ts';

export function wordsOf(spec: ActionSpec): string {
  return `${deedOf(spec)}${yearsOf(spec)}`;
}

function deedOf(spec: ActionSpec): string {
  switch (spec.kind) {
    case 'link': {
      const ways = spec.dispersal === undefined ? '' : ` of ${spec.dispersal}`;
      const effects = (['crossing-death', 'turn-back', 'distance', 'share'] as const).flatMap((key) =>
        spec[key] === undefined ? [] : [`${key.replaceAll('-', ' ')} ${effectWords(spec[key])}`],
      );
      return `the way${ways} between ${spec.between[0]} and ${spec.between[1]}${effects.length === 0 ? ' changes' : `: ${effects.join(', ')}`}`;
    }
    case 'habitat':
      return habitatWords(spec);
    case 'change':
      return changeWords(spec);
    case 'take':
      return `${amountWords(spec)} taken${spec.in === undefined ? '' : ` in ${listOf(spec.in)}`}`;
    case 'move':
      return `${amountWords(spec)} moved from ${listOf(spec.from)} to ${spec.to}`;
    case 'add':
      return `${byClassWords(spec.number)} released in ${listOf(spec.in)}`;
  }
}

function habitatWords({
  in: where,
  new: made,
  lost,
  capacity,
  area,
  quality,
}: Extract<ActionSpec, { kind: 'habitat' }>): string {
  const effects = [
    ...(made === undefined ? [] : [`${made.name} is made`]),
    ...(lost === true ? [`${listOf(where ?? [])} is lost`] : []),
    ...Object.entries({ capacity, area, ...quality }).flatMap(([key, effect]) =>
      effect === undefined ? [] : [`${key} of ${listOf(where ?? [])} ${effectWords(effect)}`],
    ),
  ];
  return effects.length === 0 ? `${listOf(where ?? [])} changes` : effects.join(', ');
}

function changeWords({ parameters = {}, rates = {}, in: where }: Extract<ActionSpec, { kind: 'change' }>): string {
  const named = Object.entries(parameters).map(([key, effect]) => `${key} ${effectWords(effect)}`);
  const place = where === undefined ? '' : ` in ${listOf(where)}`;
  const rated = Object.entries(rates).flatMap(([phase, classes]) =>
    Object.entries(classes).map(([one, effect]) => `${phase} of ${one}${place} ${effectWords(effect)}`),
  );
  return [...named, ...rated].join(', ');
}

function effectWords({ set, times, add }: Effect): string {
  const parts = [
    ...(set === undefined ? [] : [`to ${String(set)}`]),
    ...(times === undefined ? [] : [`times ${String(times)}`]),
    ...(add === undefined ? [] : [`plus ${String(add)}`]),
  ];
  return parts.join(' ');
}

type Amounts = number | string | Readonly<Record<string, number | string>>;

function amountWords(spec: Extract<ActionSpec, { kind: 'take' | 'move' }>): string {
  const classes = spec.classes === undefined || spec.classes === 'all' ? '' : ` ${spec.classes.join(', ')}`;
  if (spec.number !== undefined) return `${byClassWords(spec.number)}${classes}`;
  if (spec.share !== undefined) return `a share of ${byClassWords(spec.share)}${classes}`;
  if (spec.kind === 'take' && spec['share-of-excess'] !== undefined) {
    return `a share of ${String(spec['share-of-excess'])} of what exceeds ${String(spec.over ?? '')}${classes}`;
  }
  return 'animals';
}

function byClassWords(amounts: Amounts): string {
  if (typeof amounts !== 'object') return String(amounts);
  return Object.entries(amounts)
    .map(([one, amount]) => `${String(amount)} ${one}`)
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
