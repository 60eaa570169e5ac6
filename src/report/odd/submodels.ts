// Every phase and condition with its numbers.
import type { Crowding, DispersalPhase, Model, Phase } from '../../model/model.ts';
import { inFileOrder } from '../../results/summarise.ts';
import { mark, type Content, type Markup } from '../../view/markup.ts';
import { plain } from '../../view/number.ts';
import { classNames } from './phases.ts';
import { digits, matrixTables, rateTable } from './rates.ts';

export function submodels(model: Model): Markup {
  const phases = model.phases.flatMap((phase) => {
    const words = numbers(phase, model);
    return words === null ? [] : [mark`<div class="submodel"><h5><bdi>${phase.name}</bdi></h5>${words}</div>`];
  });
  const conditions = model.crowding.map((one) => crowding(one, model));
  return mark`${phases}${conditions}`;
}

function numbers(phase: Phase, model: Model): Content {
  switch (phase.kind) {
    case 'count':
      return null;
    case 'breeding':
      return rateTable(model, phase.births, `Young (${model.counts}) for each animal`);
    case 'survival':
      return rateTable(model, phase.survival, 'Share that survives');
    case 'ageing':
      return mark`<p>${model.classes.map((name, c) => ageing(model, name, phase.advance[c] ?? 0, phase.next[c] ?? -1))}</p>`;
    case 'demography':
      return matrixTables(model, phase);
    case 'dispersal':
      return mark`${rateTable(model, phase.leaving, 'Share that sets out')}<p>${rule(phase)}</p>`;
    case 'ceiling':
      return mark`<p>Classes counted: ${classNames(model, (c) => phase.counted[c] === 1)}. ${byPatch(model, phase.capacity, 'Most animals')}</p>`;
  }
}

function ageing(model: Model, name: string, advance: number, next: number): Markup | null {
  if (advance === 0 || model.classes[next] === name) return mark`<bdi>${name}</bdi> stays. `;
  const share = advance === 1 ? '' : ` (share ${digits(advance)}, the others stay)`;
  if (next < 0) return mark`<bdi>${name}</bdi> leaves the model${share}. `;
  return mark`<bdi>${name}</bdi> becomes <bdi>${model.classes[next] ?? ''}</bdi>${share}. `;
}

function rule({ rule }: DispersalPhase): string {
  if (rule.by === 'shares')
    return 'Where leavers end stands in a table of shares from patch to patch in the text of the model.';
  const { scaleKm, reachKm } = rule.kernel;
  const reach = reachKm === null ? '' : `, cut at ${digits(reachKm)} km`;
  const kernel = `Where leavers end follows a negative exponential kernel in the plane with scale ${digits(scaleKm)} km (mean distance ${digits(2 * scaleKm)} km)${reach}, times the attraction of the target.`;
  const arrive =
    rule.leavers === 'all arrive'
      ? ' Leavers share out over the patches within reach, and isolation costs only what dying on the way costs.'
      : ' The kernel is a density over the plane times the area of the target; leavers that meet no patch are lost.';
  const way = [
    rule.hazardPerKm > 0 ? ` The hazard on the way is ${digits(rule.hazardPerKm)} per km.` : '',
    rule.survivalOnTheWay < 1 ? ` ${digits(rule.survivalOnTheWay)} of the leavers survive the way.` : '',
  ];
  return kernel + arrive + way.join('');
}

function crowding(one: Crowding, model: Model): Markup {
  const form = one.form === 'beverton-holt' ? 'Beverton-Holt, 1/(1 + aN)' : 'Ricker, exp(−bN)';
  const weights = model.classes.flatMap((name, c) => {
    const weight = one.counted[c] ?? 0;
    return weight === 0 ? [] : [mark`<bdi>${name}</bdi> × ${digits(weight)}`];
  });
  const changes = one.changes.map(
    (change, i) =>
      mark`${i > 0 ? '; ' : ''}${change.part} of ${classNames(model, (c) => change.classes[c] === 1)} in <bdi>${model.phases[change.phase]?.name ?? ''}</bdi>`,
  );
  const allee = one.alleeHalf.some((half) => half > 0)
    ? ' An Allee factor N/(N + h) lowers the rates where few are left.'
    : '';
  const list = weights.map((weight, i) => mark`${i > 0 ? ', ' : ''}${weight}`);
  return mark`<div class="submodel"><h5><bdi>${one.name}</bdi></h5><p>${form}. N counts ${list}. It changes ${changes}. Capacity is the count at which a patch by itself stands still; the coefficient is solved from it once.${allee} ${byPatch(model, one.capacity, 'Capacity')}</p></div>`;
}

function byPatch(model: Model, values: Float64Array, what: string): Markup {
  const list = inFileOrder(model).map((p, i) => {
    const name = model.patches[p]?.name ?? '';
    return mark`${i > 0 ? ', ' : ''}<bdi>${name}</bdi> ${plain(values[p] ?? 0)}`;
  });
  return mark`${what}: ${list}.`;
}
