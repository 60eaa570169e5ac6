// The head of the report: what it is, the question, who asks, and the answer.
import type { Model } from '../../model/model.ts';
import type { RunResults } from '../../results/results.ts';
import { drawFutures } from '../../view/futures.ts';
import { mark, type Markup } from '../../view/markup.ts';
import type { Answer } from '../answer.ts';
import { paragraph, section } from './section.ts';

export function headSection(model: Model, results: RunResults): Markup {
  const { title, question, by, madeFor, date, status, invented } = model;
  const facts = [
    by === null ? null : mark`<span>by <bdi>${by}</bdi></span>`,
    madeFor === null ? null : mark`<span>for <bdi>${madeFor}</bdi></span>`,
    date === null ? null : mark`<span><bdi>${date}</bdi></span>`,
    status === null ? null : mark`<span>${status === 'accepted-assumptions' ? 'assumptions accepted' : status}</span>`,
  ];
  const flag = mark`<p class="flag">An invented case: its places, animals and numbers are made up.</p>`;
  return mark`<header>
<p class="kind">Decision report<span>skein ${results.tool.version} · ${results.hash.slice(0, 8)}</span></p>
<h1><bdi>${title}</bdi></h1>
${question === null ? null : mark`<p class="question"><bdi>${question}</bdi></p>`}
<p class="facts">${facts}</p>
${invented ? flag : null}
</header>`;
}

export function answerSection(said: Answer, results: RunResults): Markup {
  const [before, stress, after] = said.lead;
  return section(
    'answer',
    'The answer',
    mark`<div class="answer"><div>
<p class="lead">${before}<strong>${stress}</strong>${after}</p>
${paragraph(said.meaning)}${paragraph(said.abundance)}
</div>${futures(results)}</div>
<div class="sure">${paragraph(said.fromRuns)}${paragraph(said.fromUnknown)}${paragraph(said.call)}</div>`,
  );
}

function futures({ outcomes: [outcome] }: RunResults): Markup | null {
  if (outcome === undefined) return null;
  const picture = drawFutures(outcome.ever.probability, `come to ${outcome.name}`);
  const caption = mark`a hundred futures, those that come to “<bdi>${outcome.name}</bdi>” filled`;
  return mark`<figure class="futures">${picture}<figcaption>${caption}</figcaption></figure>`;
}
