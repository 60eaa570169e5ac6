// One section of the page under its heading.
import { mark, type Content, type Markup } from '../../view/markup.ts';

export function section(id: string, title: string, content: Content): Markup {
  return mark`
<section id="${id}" aria-labelledby="${id}-title">
<h2 id="${id}-title">${title}</h2>
${content}
</section>`;
}

/** Names and what is to be said of each. */
export function list(kind: 'numbers' | 'concepts', items: readonly (readonly [string, Content])[]): Markup {
  return mark`<dl class="${kind}">${items.map(([name, words]) => mark`<div><dt>${name}</dt><dd>${words}</dd></div>`)}</dl>`;
}

export function paragraph(text: string | null): Markup | null {
  return text === null ? null : mark`<p>${prose(text)}</p>`;
}

/** Sentences that a terminal may show as they are: what stands in backticks is typed, and no number is parted from its percent sign. */
export function prose(text: string): readonly Content[] {
  const parts = text.replace(/(?<=\d) (?=%)/g, '\u00a0').split('`');
  return parts.map((part, i) => (i % 2 === 1 ? mark`<code>${part}</code>` : part));
}

/** Names set apart, with commas between. */
export function names(all: readonly string[]): readonly Markup[] {
  return all.map((name, i) => mark`${i > 0 ? ', ' : ''}<bdi>${name}</bdi>`);
}
