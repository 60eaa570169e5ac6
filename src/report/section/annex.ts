// What stands at the end: limits, the model, its numbers with where they are from, and how to run it again.
import type { Model } from '../../model/model.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { plain } from '../../view/number.ts';
import { drawTable, type Row } from '../../view/table.ts';
import { basisWords } from '../../results/basis.ts';
import type { ReportInput } from '../input.ts';
import { oddSection } from '../odd/odd.ts';
import { digits } from '../odd/rates.ts';
import { list, section } from './section.ts';

/** Stands before the annex: nobody should read the answer without it. */
export function limitsSection({ results }: ReportInput): Markup {
  const items = results.cautions.map((text) => mark`<li>${text}</li>`);
  return section('limits', 'Limits and cautions', mark`<ul class="limits">${items}</ul>`);
}

export function annexSection(input: ReportInput): Markup {
  const { model, results, landscape } = input;
  const content = mark`${oddSection(model, results, landscape)}${parameters(model)}${defaults(model)}${rerun(input)}`;
  return section('annex', 'Annex', content);
}

function parameters(model: Model): Markup {
  const rows = model.parameters.map(({ name, value, expression, basis, source }): Row => {
    const written = expression === digits(value) ? '' : mark`<bdi>${expression}</bdi>`;
    return [name, digits(value), written, basis ?? 'not said', mark`<bdi>${source ?? 'not said'}</bdi>`];
  });
  const head = ['name', 'value', 'written as', 'basis', 'source'];
  const table = rows.length === 0 ? null : drawTable({ caption: 'Named numbers', head, rows, words: [2, 3, 4] });
  return mark`<h3 id="numbers">The numbers and where they are from</h3><p>${basisWords(model)}</p>${table}`;
}

function defaults(model: Model): Markup {
  const items = model.defaults.map((text) => mark`<li>${text}</li>`);
  const none = mark`<p>No default was used: everything is said in the text of the model.</p>`;
  return mark`<h3 id="defaults">Defaults that were used</h3>${items.length === 0 ? none : mark`<ul>${items}</ul>`}`;
}

function rerun({ results, specText, commandLine }: ReportInput): Markup {
  const { tool, seed, replicates, hash } = results;
  const facts = list('numbers', [
    ['command', mark`<code>${commandLine}</code>`],
    ['seed', mark`<code>${String(seed)}</code>`],
    ['futures', plain(replicates)],
    ['hash of all that decides the result (SHA-256)', mark`<code>${hash}</code>`],
    ['version', `${tool.name} ${tool.version}, kernel ${tool.kernel}`],
  ]);
  return mark`<h3 id="again">How to run it again</h3>
<p>The same text, seed and version give the same numbers, bit for bit, on any machine.</p>
${facts}
<details class="tables"><summary>The text of the model</summary><pre tabindex="0">${specText}</pre></details>`;
}
