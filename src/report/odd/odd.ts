// The model under the seven headings of the ODD protocol (Grimm et al. 2020, JASSS 23(2):7), written from the model itself.
import type { Model } from '../../model/model.ts';
import type { RunResults } from '../../results/results.ts';
import { inFileOrder } from '../../results/summarise.ts';
import { mark, type Content, type Markup } from '../../view/markup.ts';
import { plain } from '../../view/number.ts';
import { designConcepts } from './concepts.ts';
import { initialWords } from './initial.ts';
import { phaseWords } from './phases.ts';
import { submodels } from './submodels.ts';

export function oddSection(model: Model, results: RunResults): Markup {
  const headings: readonly (readonly [string, Content])[] = [
    ['Purpose and patterns', purpose(model)],
    ['Entities, state variables, and scales', entities(model)],
    ['Process overview and scheduling', overview(model)],
    ['Design concepts', designConcepts(model, results)],
    ['Initialization', initialWords(model)],
    [
      'Input data',
      mark`<p>No series of outside data drives the model; all its numbers stand in the model's text, which is printed below.</p>`,
    ],
    ['Submodels', submodels(model)],
  ];
  const parts = headings.map(([title, content], i) => mark`<h4>${String(i + 1)}. ${title}</h4>${content}`);
  return mark`<h3 id="model">The model in the seven ODD headings</h3><p class="note">After Grimm et al. (2020), JASSS 23(2):7.</p><div class="odd">${parts}</div>`;
}

function purpose(model: Model): Markup {
  const question = model.question === null ? null : mark`The question is: <bdi>${model.question}</bdi> `;
  const outcomes =
    model.outcomes.length === 0
      ? 'No outcome is named.'
      : mark`It is answered by ${model.outcomes.map((one, i) => mark`${i > 0 ? '; ' : ''}“<bdi>${one.name}</bdi>”, which means <bdi>${one.definition}</bdi>`)}.`;
  return mark`<p>The model projects animals that live in several habitat patches linked by movement. ${question}${outcomes} Patterns that it was compared with were not stated.</p>`;
}

function entities(model: Model): Markup {
  const located = model.patches.every((patch) => patch.at !== null);
  const places = located ? 'with places on a plane in kilometres' : 'without places';
  const what = model.counts === 'females' ? 'Only females are counted.' : 'Both sexes are counted together.';
  const oldest =
    model.oldest === null
      ? ''
      : model.oldest === 'open-ended'
        ? ' The oldest class is open-ended: its animals stay in it.'
        : ' The oldest class is terminal: its animals leave the model at ageing.';
  const names = inFileOrder(model).map((p, i) => mark`${i > 0 ? ', ' : ''}<bdi>${model.patches[p]?.name ?? ''}</bdi>`);
  const classes = model.classes.map((name, i) => mark`${i > 0 ? ', ' : ''}<bdi>${name}</bdi>`);
  return mark`<p>The state is the number of animals of each class in each patch: ${plain(model.classes.length)} classes (${classes}) in ${plain(model.patches.length)} patches ${places} (${names}). ${what}${oldest} One step is a year; a run has ${plain(model.steps)} of them, from ${String(model.firstYear)} on. Animals are whole.</p>`;
}

function overview(model: Model): Markup {
  const phases = model.phases.map((phase) => mark`<li>${phaseWords(phase, model)}</li>`);
  const year = model.year.map((name, i) => mark`${i > 0 ? ', ' : ''}<bdi>${name}</bdi>`);
  const once =
    model.crowding.length > 0 ? ' Crowding is read once, at the start of the first phase that it changes.' : '';
  return mark`<p>The year is written as: ${year}. From one count to the next, in this order, and in all patches at once:</p><ol>${phases}</ol><p>${once}</p>`;
}
