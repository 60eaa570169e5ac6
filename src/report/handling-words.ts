// Takes, moves and releases in words.
import type { AddPhase, Model, MovePhase, TakePhase } from '../model/model.ts';

export function handlingWords(phase: TakePhase | MovePhase | AddPhase, model: Model): string {
  return `${actWords(phase, model)}${yearWords(phase.active, model)}`;
}

function actWords(phase: TakePhase | MovePhase | AddPhase, model: Model): string {
  const where = placeWords(phase.patches, model);
  switch (phase.kind) {
    case 'take':
      return `${quotaWords(phase, model)} are taken${where === '' ? '' : ` in ${where}`}`;
    case 'move': {
      const to = model.patches[phase.to]?.name ?? '';
      return `${quotaWords(phase, model)} are moved from ${where} to ${to}${survivalWords(phase.survival, model)}${homingWords(phase.homing)}`;
    }
    case 'add':
      return `${numbersOf(phase, model)} are released in ${where === '' ? 'every patch' : where}${survivalWords(phase.survival, model)}`;
  }
}

function quotaWords(phase: TakePhase | MovePhase, model: Model): string {
  const group = phase.together ? 'of all patches together' : 'of each patch';
  const several = phase.patches.filter((one) => one === 1).length > 1 ? ` ${group}` : '';
  const classes = model.classes.filter((_, c) => phase.classes[c] === 1).join(', ');
  if (phase.byClass) return `${numbersOf(phase, model)}${phase.rule === 'share' ? ' (shares)' : ''}${several}`;
  const amount = rangeWords(phase, (at) => at % model.classes.length === 0);
  switch (phase.rule) {
    case 'number':
      return `${amount} ${classes}${several}`;
    case 'share':
      return `a share of ${amount} of ${classes}${several}`;
    case 'excess':
      return `a share of ${amount} of the ${classes} above a level${several}`;
  }
}

function numbersOf(phase: TakePhase | MovePhase | AddPhase, model: Model): string {
  const n = model.classes.length;
  return model.classes
    .flatMap((name, c) => (phase.classes[c] === 1 ? [`${rangeWords(phase, (at) => at % n === c)} ${name}`] : []))
    .join(', ');
}

/** The amounts of some cells, over patches and years: one number, or from the least to the most. */
function rangeWords({ amounts }: TakePhase | MovePhase | AddPhase, chosen: (at: number) => boolean): string {
  const own = amounts.epochs.flatMap((epoch) => Array.from(epoch).filter((value, at) => chosen(at) && value > 0));
  if (own.length === 0) return '0';
  const [least, most] = [Math.min(...own), Math.max(...own)].map((value) => Number(value.toPrecision(4)));
  return least === most ? String(least) : `${least} to ${most}`;
}

/** Empty for all patches. */
function placeWords(patches: Uint8Array, model: Model): string {
  if (patches.every((one) => one === 1)) return '';
  return model.patches.flatMap(({ name }, p) => (patches[p] === 1 ? [name] : [])).join(', ');
}

function survivalWords(survival: Float64Array, { classes }: Model): string {
  const [first = 1] = survival;
  const digits = (share: number): string => String(Number(share.toPrecision(4)));
  if (survival.every((share) => share === first)) {
    return first === 1 ? '' : `, of whom a share of ${digits(first)} lives through it`;
  }
  const each = classes.map((name, c) => `${digits(survival[c] ?? 1)} of ${name}`);
  return `, of whom these shares live through it: ${each.join(', ')}`;
}

function homingWords(homing: number): string {
  return homing === 0 ? '' : `; of these a share of ${Number(homing.toPrecision(4))} goes back`;
}

function yearWords(active: Int32Array | null, { firstYear }: Model): string {
  if (active === null) return '';
  const years = [...active.keys()].filter((t) => active[t] === 1).map((t) => firstYear + t);
  const [first = 0, last = 0] = [years[0], years.at(-1)];
  if (years.length > 2 && last - first + 1 === years.length) return `, from ${first} to ${last}`;
  return years.length <= 6 ? `, in ${years.join(', ')}` : `, in ${years.length} years from ${first} to ${last}`;
}
