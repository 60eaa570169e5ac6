// Before anything is done: what handling animals asks for, and who signs.
import type { Comparison } from '../../compare/results.ts';
import { mark, type Markup } from '../../view/markup.ts';
import {
  handledByPlan,
  hasMoves,
  hasTakes,
  sourcesWords,
  takeWords,
  translocationSteps,
} from '../compare/translocation.ts';
import { section } from '../section/section.ts';

export function signsSection(comparison: Comparison, animals: string): Markup {
  const handled = handledByPlan(comparison, animals).map((text) => mark`<li>${text}</li>`);
  const came = handled.length === 0 ? null : mark`<h3>What handling animals comes to</h3><ul>${handled}</ul>`;
  const sources = sourcesWords(comparison, animals).map((text) => mark`<p>${text}</p>`);
  const steps = hasMoves(comparison)
    ? mark`<h3>Before any animal is moved or released</h3>${sources}<p>In the order of the guidelines of IUCN/SSC (2013):</p><ol>${translocationSteps.map((step) => mark`<li>${step}</li>`)}</ol>`
    : null;
  const take = hasTakes(comparison) ? mark`<h3>Before any animal is taken</h3><p>${takeWords}</p>` : null;
  const lines = [
    'plan chosen, and under which rule',
    'accepted risk, and who accepts it',
    'who decides (name, office)',
    'date and signature',
    'who checked the model (name, date)',
  ];
  const blanks = lines.map((line) => mark`<div><dt>${line}</dt><dd class="blank"> </dd></div>`);
  return section(
    'signs',
    'Who signs',
    mark`<p>The model is one input. Permits, local law, the rights of those who live there and the judgement of qualified people come before it.</p>
${came}${steps}${take}<dl class="numbers signs">${blanks}</dl>`,
  );
}
