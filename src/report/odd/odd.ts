// The model under the seven headings of the ODD protocol (Grimm et al. 2020, JASSS 23(2):7), written from the model itself.
import type { Model } from '../../model/model.ts';
import { inFileOrder } from '../../results/summarise.ts';
import { mark, type Content, type Markup } from '../../view/markup.ts';
import { plain } from '../../view/number.ts';
import type { ReportInput } from '../input.ts';
import { names } from '../section/section.ts';
import { designConcepts } from './concepts.ts';
import { initialWords } from './initial.ts';
import { inputDataWords } from './input-data.ts';
import { phaseWords } from './phases.ts';
import { submodels } from './submodels.ts';

export function oddSection(input: ReportInput): Markup {
  const { model, results, data } = input;
  const headings: readonly (readonly [string, Content])[] = [
    ['Purpose and patterns', purpose(model)],
    ['Entities, state variables, and scales', entities(model)],
    ['Process overview and scheduling', overview(model)],
    ['Design concepts', designConcepts(model, results)],
    ['Initialization', initialWords(model)],
    ['Input data', inputDataWords(model, data)],
    ['Submodels', submodels(input)],
  ];
  const parts = headings.map(([title, content], i) => mark`<h4>${String(i + 1)}. ${title}</h4>${content}`);
  return mark`<h3 id="model">The model in the seven ODD headings</h3>
<p class="note">After Grimm et al. (2020), JASSS 23(2):7.</p>${parts}`;
}

function purpose({ question, outcomes, observed }: Model): Markup {
  const asked = question === null ? null : mark`The question is: <bdi>${question}</bdi> `;
  const means = outcomes.map(
    ({ name, definition }, i) => mark`${i > 0 ? '; ' : ''}“<bdi>${name}</bdi>”, which means <bdi>${definition}</bdi>`,
  );
  const answered = outcomes.length === 0 ? 'No outcome is named.' : mark`It is answered by ${means}.`;
  const patterns =
    observed === undefined
      ? 'Patterns that it was compared with were not stated.'
      : 'The pattern that it can be compared with are the counts of the past (under 6).';
  return mark`<p>The model projects animals that live in several habitat patches linked by movement. ${asked}${answered}
${patterns}</p>`;
}

const oldestWords = {
  'open-ended': ' The oldest class is open-ended: its animals stay in it.',
  terminal: ' The oldest class is terminal: its animals leave the model at ageing.',
} as const;

function entities(model: Model): Markup {
  const { patches, classes, counts, oldest, steps, firstYear } = model;
  const places = patches.every((patch) => patch.at !== null)
    ? 'with places on a plane in kilometres'
    : 'without places';
  const both =
    model.sexes === undefined ? 'Both sexes are counted together.' : 'Both sexes are followed in classes of their own.';
  const what = counts === 'females' ? 'Only females are counted.' : both;
  const patchNames = names(inFileOrder(model).map((p) => patches[p]?.name ?? ''));
  return mark`<p>The state is the number of animals of each class in each patch: ${plain(classes.length)} classes
(${names(classes)}) in ${plain(patches.length)} patches ${places} (${patchNames}).
${what}${oldest === null ? '' : oldestWords[oldest]} One step is a year; a run has ${plain(steps)} of them, ${String(firstYear)} to
${String(firstYear + steps - 1)}, from the count of the year before. Animals are whole.${beside(model)}</p>`;
}

/** What a run remembers from year to year beside its animals. */
function beside({ variation, catastrophes }: Model): string {
  const kept = [
    ...(variation !== null && variation.autocorrelation !== 0 ? ['the weather of the year before'] : []),
    ...(catastrophes.length > 0 ? ['which catastrophes are on in which patch, and since when'] : []),
  ];
  return kept.length === 0 ? '' : ` Beside the animals a run remembers ${kept.join(', and ')}.`;
}

/** What is settled before the first phase of a year. */
function settled({ variation, catastrophes }: Model): string {
  const drawn = [
    ...(variation === null ? [] : ['the rates of the year are drawn in each patch']),
    ...(catastrophes.length === 0 ? [] : ['it is drawn which catastrophes begin where']),
  ];
  return drawn.length === 0 ? '' : ` Before the first of them ${drawn.join(', and ')}.`;
}

function overview(model: Model): Markup {
  const phases = model.phases.map((phase) => mark`<li>${phaseWords(phase, model)}</li>`);
  const crowding = mark`<p>Crowding is read once, at the start of the first phase that it changes.</p>`;
  return mark`<p>The year is written as: ${names(model.year)}. From one count to the next, in this order, and in all patches
at once:${settled(model)}</p><ol>${phases}</ol>${model.crowding.length > 0 ? crowding : null}`;
}
