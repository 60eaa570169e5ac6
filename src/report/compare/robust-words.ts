// Whether the order of the plans holds in other sound models, in words.
import type { Robustness } from '../../compare/results.ts';

export function robustWords(all: readonly Robustness[]): string {
  const ran = all.filter(({ notRun }) => notRun === null);
  const held = ran.filter(({ holds }) => holds === true).length;
  const left = all.length - ran.length;
  const apart = left === 0 ? '' : ` ${left} more ${left === 1 ? 'does' : 'do'} not apply.`;
  return `Plans that the model tells apart keep their order in ${held} of ${ran.length} other models.${apart}`;
}

export function variantWords({ notRun, holds, reversed, order, supports }: Robustness): string {
  if (notRun !== null) return notRun;
  const pairs = reversed.map(({ better, worse, toldApart, equal }) =>
    equal ? `“${better}” like “${worse}”` : `“${better}” before “${worse}”${toldApart ? '' : ' (not told apart)'}`,
  );
  const chosen =
    supports.length === 0
      ? 'supports no plan over the first'
      : `supports ${supports.map((name) => `“${name}”`).join(', ')}`;
  return `${holds === true ? 'plans told apart keep their order' : `plans told apart do not keep their order: ${pairs.join(', ')}`}; ${chosen}; order: ${order.join(', ')}`;
}
