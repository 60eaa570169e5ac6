// Every phase and condition with its numbers.
import { weatherFacts } from '../../analysis/weather.ts';
import { advanceAt } from '../../compile/advance.ts';
import type { Landscape } from '../../landscape/landscape.ts';
import type { AgeingPhase, Crowding, Model, Phase } from '../../model/model.ts';
import { inFileOrder } from '../../results/summarise.ts';
import { mark, type Content, type Markup } from '../../view/markup.ts';
import { plain } from '../../view/number.ts';
import { handlingWords } from '../handling-words.ts';
import type { ReportInput } from '../input.ts';
import { destinations } from './dispersal.ts';
import { classNames } from './phases.ts';
import { catastropheWords } from '../catastrophe-words.ts';
import { uncertaintyWords } from '../uncertainty-words.ts';
import { weatherWords } from '../weather-words.ts';
import { digits, matrixTables, rateTable } from './rates.ts';

export function submodels({ model, landscape, hiding }: ReportInput): Markup {
  const phases = model.phases
    .filter((phase) => phase.kind !== 'count')
    .map((phase) => submodel(phase.name, numbers(phase, model)));
  const conditions = model.crowding.map((one) => submodel(one.name, crowding(one, model)));
  return mark`${phases}${conditions}${weather(model, landscape, hiding !== undefined)}${catastrophes(model, landscape)}${unknown(model)}`;
}

function catastrophes(model: Model, landscape: Landscape): Markup | null {
  if (model.catastrophes.length === 0) return null;
  const items = catastropheWords(model, landscape).map((words) => mark`<li><bdi>${words}</bdi></li>`);
  return submodel('catastrophes and good years', mark`<ul>${items}</ul>`);
}

/** Correlations that follow from distances would tell the least and the greatest of them. */
function weather({ variation }: Model, landscape: Landscape, hidden: boolean): Markup | null {
  if (variation === null) return null;
  const facts = weatherFacts(variation, landscape);
  const telling = hidden && 'rangeKm' in variation.betweenPatches;
  const items = weatherWords(telling ? { ...facts, betweenPatches: null } : facts).map(
    (words) => mark`<li><bdi>${words}</bdi></li>`,
  );
  return submodel('variation from year to year', mark`<ul>${items}</ul>`);
}

function unknown({ uncertainty, draws }: Model): Markup | null {
  if (uncertainty === null) return null;
  const items = uncertaintyWords(uncertainty).map((words) => mark`<li><bdi>${words}</bdi></li>`);
  const drawn =
    draws === 0
      ? 'Nothing of it was drawn in these runs.'
      : `It was drawn ${plain(draws)} times, each once for a set of runs.`;
  return submodel('what is not known', mark`<ul>${items}</ul><p>${drawn}</p>`);
}

function submodel(name: string, content: Content): Markup {
  return mark`<h5><bdi>${name}</bdi></h5>${content}`;
}

function numbers(phase: Phase, model: Model): Content {
  switch (phase.kind) {
    case 'count':
      return null;
    case 'breeding':
      return rateTable(
        model,
        phase.births,
        `Young (${model.counts}) for each animal${phase.mating === undefined ? '' : ', before mating'}`,
      );
    case 'survival':
      return rateTable(model, phase.survival, 'Share that survives');
    case 'ageing':
      return mark`<p>${model.classes.map((_, c) => ageing(model, phase, c))}</p>`;
    case 'demography':
      return matrixTables(model, phase);
    case 'dispersal':
      return mark`${rateTable(model, phase.leaving, 'Share that sets out')}${destinations(phase, model)}`;
    case 'take':
    case 'move':
    case 'add':
      return mark`<p><bdi>${handlingWords(phase, model)}</bdi>.</p>`;
    case 'ceiling':
      return mark`<p>Classes counted: ${classNames(model, phase.counted)}. ${byPatch(model, phase.capacity, 'Most animals')}</p>`;
  }
}

function ageing({ classes, patches }: Model, phase: AgeingPhase, c: number): Markup {
  const [name, next] = [classes[c] ?? '', phase.next[c] ?? -1];
  const shares = patches.map((_, patch) => advanceAt(phase, { patch, class: c }));
  const [least, most] = [Math.min(...shares), Math.max(...shares)];
  if (most === 0 || next === c) return mark`<bdi>${name}</bdi> stays. `;
  const between = least === most ? digits(most) : `${digits(least)} to ${digits(most)} by patch`;
  const share = least === 1 ? '' : ` (share ${between}, the others stay${stageWords(phase, c)})`;
  if (next < 0) return mark`<bdi>${name}</bdi> leaves the model${share}. `;
  return mark`<bdi>${name}</bdi> becomes <bdi>${classes[next] ?? ''}</bdi>${share}. `;
}

function stageWords({ stages = [] }: AgeingPhase, c: number): string {
  const stage = stages.find((one) => one.class === c);
  if (stage === undefined) return '';
  const years = `the stage lasts ${digits(stage.years)} years`;
  return stage.as === 'fixed' ? `; ${years} for all alike` : `; ${years} in the mean`;
}

function crowding(one: Crowding, model: Model): Markup {
  const weights = model.classes
    .map((name, c) => ({ name, weight: one.counted[c] ?? 0 }))
    .filter(({ weight }) => weight > 0)
    .map(({ name, weight }, i) => mark`${i > 0 ? ', ' : ''}<bdi>${name}</bdi> × ${digits(weight)}`);
  const changes = one.changes.map(({ phase, part, classes }, i) => {
    const name = model.phases[phase]?.name ?? '';
    return mark`${i > 0 ? '; ' : ''}${part} of ${classNames(model, classes)} in <bdi>${name}</bdi>`;
  });
  const rare = one.alleeHalf.some((half) => half > 0);
  const allee = rare ? ' An Allee factor N/(N + h) lowers the rates where few are left.' : '';
  const start = mark`${formWords(one)}. N counts ${weights}. It changes ${changes}.${allee}`;
  if (one.form === 'allee') return mark`<p>${start}</p>`;
  return mark`<p>${start} Capacity is the count at which a patch by itself stands still; the coefficient is solved from it
once. ${byPatch(model, one.capacity, 'Capacity')}</p>`;
}

function formWords({ form, shapeNumber = 1 }: Crowding): string {
  const forms = {
    'beverton-holt': 'Beverton-Holt, 1/(1 + aN)',
    ricker: 'Ricker, exp(−bN)',
    theta: `Theta form, exp(−bN^s) with s = ${digits(shapeNumber)}`,
    hassell: `Hassell, (1 + aN)^−s with s = ${digits(shapeNumber)}`,
    allee: 'Only an Allee factor acts',
  } as const;
  return forms[form];
}

function byPatch(model: Model, values: Float64Array, what: string): Markup {
  const list = inFileOrder(model).map((p, i) => {
    const name = model.patches[p]?.name ?? '';
    return mark`${i > 0 ? ', ' : ''}<bdi>${name}</bdi> ${plain(values[p] ?? 0)}`;
  });
  return mark`${what}: ${list}.`;
}
