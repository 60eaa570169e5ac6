// Catastrophes in words, the same in a terminal and in a report: what begins how often, whom it strikes, what it does.
import type { Landscape } from '../landscape/landscape.ts';
import type { Strike } from '../landscape/strikes.ts';
import type { Catastrophe } from '../model/chance.ts';
import type { Model } from '../model/model.ts';
import { inFileOrder } from '../results/summarise.ts';

export function catastropheWords(model: Model, { strikes = [] }: Landscape): readonly string[] {
  return model.catastrophes.flatMap((one, k) => {
    const strike = strikes[k];
    if (strike === undefined) return [];
    return [`${one.name}: ${beginning(model, one)}; ${doing(model, one)}. ${hits(model, strike)}`];
  });
}

function beginning(model: Model, { chance, over, stated, reach, origins, lasts, wait }: Catastrophe): string {
  const where = origins.length === model.patches.length ? '' : ` (in ${namesOf(model, origins)} only)`;
  const from =
    stated === undefined ? '' : `, from ${digits(stated.chance * 100)} % a generation of ${digits(stated.years)} years`;
  const begins = `begins ${over === 'patch' ? 'in a given patch' : 'somewhere'} with a chance of ${digits(chance)} a year${from}${where}`;
  const reaching =
    reach === 'everywhere'
      ? 'strikes all patches'
      : reach === 'one patch'
        ? 'strikes that patch alone'
        : `strikes patches up to ${digits(reach.radiusKm)} km away`;
  const long = lasts === 1 ? '' : `, lasts ${lasts} years`;
  const apart = wait <= lasts ? '' : `, at least ${wait} years from one beginning to the next`;
  return `${begins}, ${reaching}${long}${apart}`;
}

function doing(model: Model, { multiplies, capacity }: Catastrophe): string {
  const rates = multiplies.map(
    ({ phase, part, class: c, times }) =>
      `${part === 'births' ? 'births' : part === 'leaving' ? 'leaving' : 'survival'} of ${model.classes[c] ?? ''} in ${model.phases[phase]?.name ?? ''} × ${digits(times)}`,
  );
  const room = capacity === null ? [] : [`capacities × ${digits(capacity.times)} for ${capacity.steps} years`];
  return [...rates, ...room].join(', ');
}

/** In the order of the author's list. */
function hits(model: Model, { on, begins }: Strike): string {
  const all = on.every((share) => share === on[0]);
  const words = (p: number): string => {
    const years = `${digits((on[p] ?? 0) * 100)} of 100 years`;
    return on[p] === begins[p] ? years : `${years} (a new one in ${digits((begins[p] ?? 0) * 100)})`;
  };
  if (all) return `In the long run every patch is struck in ${words(0)}.`;
  const each = inFileOrder(model).map((p) => `${model.patches[p]?.name ?? ''} in ${words(p)}`);
  return `In the long run struck are ${each.join(', ')}.`;
}

function namesOf(model: Model, patches: readonly number[]): string {
  return patches.map((p) => model.patches[p]?.name ?? '').join(', ');
}

function digits(value: number): string {
  return String(Number(value.toPrecision(3)));
}
