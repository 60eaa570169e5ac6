// The head of the report: what it is, the question, who asks, and the answer.
import type { Model } from '../../model/model.ts';
import type { RunResults } from '../../results/results.ts';
import { drawFutures } from '../../view/futures.ts';
import { mark, type Markup } from '../../view/markup.ts';
import type { Answer } from '../answer.ts';

export function headSection(model: Model, results: RunResults): Markup {
  const facts = [
    model.by === null ? null : mark`<span>by <bdi>${model.by}</bdi></span>`,
    model.madeFor === null ? null : mark`<span>for <bdi>${model.madeFor}</bdi></span>`,
    model.date === null ? null : mark`<span><bdi>${model.date}</bdi></span>`,
    model.status === null ? null : mark`<span>${statusWords(model.status)}</span>`,
  ];
  const invented = model.invented
    ? mark`<p class="flag">An invented case: its places, animals and numbers are made up.</p>`
    : null;
  const question = model.question === null ? null : mark`<p class="question"><bdi>${model.question}</bdi></p>`;
  return mark`<header><p class="kind">Decision report<span class="stamp">skein ${results.tool.version} · ${results.hash.slice(0, 8)}</span></p><h1><bdi>${model.title}</bdi></h1>${question}<p class="facts">${facts}</p>${invented}</header>`;
}

export function answerSection(said: Answer, results: RunResults): Markup {
  const [before, stress, after] = said.lead;
  const outcome = results.outcomes[0];
  const picture =
    outcome === undefined
      ? null
      : mark`<figure class="futures" aria-hidden="true">${drawFutures(outcome.ever.probability, `come to ${outcome.name}`)}<figcaption>a hundred futures, those that come to “<bdi>${outcome.name}</bdi>” filled</figcaption></figure>`;
  return mark`<section id="answer" aria-labelledby="answer-title"><h2 id="answer-title">The answer</h2><div class="answer"><div><p class="lead">${before}<strong>${stress}</strong>${after}</p>${paragraph(said.meaning)}${paragraph(said.abundance)}</div>${picture}</div><div class="sure">${paragraph(said.fromRuns)}${paragraph(said.fromUnknown)}${paragraph(said.call)}</div></section>`;
}

function paragraph(text: string | null): Markup | null {
  return text === null ? null : mark`<p>${text}</p>`;
}

function statusWords(status: string): string {
  if (status === 'accepted-assumptions') return 'assumptions accepted';
  return status;
}
