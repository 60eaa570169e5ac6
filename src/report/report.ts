// The decision report: one page that answers, shows, warns and can be run again.
import type { RunResults } from '../results/results.ts';
import { mark, type Markup } from '../view/markup.ts';
import { answer } from './answer.ts';
import { writeDocument } from './document.ts';
import type { ReportInput } from './input.ts';
import { annexSection, limitsSection } from './section/annex.ts';
import { abundanceSection, chancesSection } from './section/courses.ts';
import { criterionId, criterionSection } from './section/criterion.ts';
import { answerSection, headSection } from './section/head.ts';
import { mapSection } from './section/map.ts';
import { laterOutcomes, outcomesSection } from './section/outcomes.ts';
import { styleSheet } from './style.ts';
import { hidingWords } from './hiding/hiding-words.ts';
import { summariseForView } from './view.ts';
import { worthNote } from './worth.ts';

export type { ReportInput } from './input.ts';

/** The decision report of a model without plans, as one HTML page that needs no other file. */
export function buildReport(input: ReportInput): string {
  const { model, results } = input;
  const view = summariseForView(input);
  const summary = (program: Markup) => [
    answerSection(answer(results, view.animals), results),
    outcomesSection(model, results),
    mapSection(view, { worth: worthNote(input), hidden: hidingWords(input), program }),
    chancesSection(view),
  ];
  const rest = [abundanceSection(view, results), criterionSection(results), limitsSection(input), annexSection(input)];
  const foot = `skein ${results.tool.version} · ${results.hash.slice(0, 16)} · ${model.date ?? 'no date given'}`;
  return writeDocument({
    title: `${model.title}: decision report`,
    style: styleSheet(foot),
    program: { script: input.pageScript, data: view },
    body: (program) =>
      mark`${headSection(model, results)}${contents(results)}${summary(program)}<div class="pages${view.outcomes.length > 3 ? ' more' : ''}">${laterOutcomes(results)}${rest}</div><footer>${foot}</footer>`,
  });
}

function contents({ outcomes, criterionE }: RunResults): Markup {
  const places = [
    ['answer', 'Answer'],
    ['outcomes', 'Outcomes'],
    ['map', 'Map'],
    ...(outcomes.length > 0 ? [['chances', 'Chances by year']] : []),
    ['abundance', 'Abundance'],
    ...(criterionE === undefined ? [] : [[criterionId, 'Criterion E']]),
    ['limits', 'Limits'],
    ['annex', 'Annex'],
  ];
  const links = places.map(([id = '', name = '']) => mark`<li><a href="#${id}">${name}</a></li>`);
  return mark`<nav aria-label="Contents"><ul>${links}</ul></nav>`;
}
