// What stands at the end: limits, the model, its numbers with where they are from, and how to run it again.
import type { Model } from '../../model/model.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { plain } from '../../view/number.ts';
import { drawTable, type Row } from '../../view/table.ts';
import { basisWords } from '../../results/basis.ts';
import type { InputData, ReportInput } from '../input.ts';
import { placesCaution } from '../hiding/hiding-words.ts';
import { oddSection } from '../odd/odd.ts';
import { digits } from '../odd/rates.ts';
import { list, prose, section } from './section.ts';

/** Stands before the annex: nobody should read the answer without it. */
export function limitsSection(input: ReportInput): Markup {
  const places = placesCaution(input);
  const cautions = [...(places === null ? [] : [places]), ...input.results.cautions];
  const items = cautions.map((text) => mark`<li>${prose(text)}</li>`);
  return section('limits', 'Limits and cautions', mark`<ul class="limits">${items}</ul>`);
}

export function annexSection(input: ReportInput): Markup {
  const { model } = input;
  const content = mark`${oddSection(input)}${parameters(model)}${defaults(model)}${rerun(input)}`;
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
  const items = model.defaults.map((text) => mark`<li>${prose(text)}</li>`);
  const none = mark`<p>No default was used: everything is said in the text of the model.</p>`;
  return mark`<h3 id="defaults">Defaults that were used</h3>${items.length === 0 ? none : mark`<ul>${items}</ul>`}`;
}

function rerun(input: ReportInput): Markup {
  const { results, specText, data, hiding } = input;
  const { tool, seed, replicates, hash, draws } = results;
  const facts = list('numbers', [
    ['seed', mark`<code>${String(seed)}</code>`],
    ['futures', plain(replicates)],
    ...(draws === undefined ? [] : [['draws of what is not known', plain(draws.number)] as const]),
    [
      `hash of all that decides the result${hiding === undefined ? '' : ' but the places'} (SHA-256)`,
      mark`<code>${hash}</code>`,
    ],
    ['version', `${tool.name} ${tool.version}, kernel ${tool.kernel}`],
  ]);
  return mark`<h3 id="again">How to run it again</h3>
<p>The same text, seed and version give the same numbers, bit for bit, on any machine.</p>
${steps(input)}
${facts}
${text('The text of the model', specText)}${data === undefined ? null : wholeText(data)}`;
}

function steps({ commandLine, runLine, hiding }: ReportInput): Markup {
  const page = mark`<li><code>${commandLine}</code> writes this page again.</li>`;
  if (runLine === undefined) return mark`<ol>${page}</ol>`;
  const whole = hiding === undefined;
  const holds = whole ? 'the model with all its inputs' : 'the model with all its inputs but the places';
  const again = mark`<li><code>skein run --again results/run.json</code> gives the same bytes from that file alone, for whoever it is
handed to.</li>`;
  const hidden = mark`<li>Only whoever has the model with its places can run it.</li>`;
  return mark`<ol>${page}
<li><code>${runLine}</code> writes the tables behind it, and <code>results/run.json</code>, which holds ${holds}. Its
<code>hash</code> is the one below: where they are equal, everything that decides the result is${whole ? '' : ', but for the places'}.</li>
${whole ? again : hidden}</ol>`;
}

/** Longer texts would make the page heavy. */
const longestText = 300_000;

function wholeText({ files, wholeText: whole }: InputData): Markup | null {
  if (files.length === 0 || whole === null) return null;
  if (whole.length <= longestText) return text('The same with what its files hold, which runs by itself', whole);
  return mark`<p>With what its files hold the text is too long to be printed here; <code>skein show MODEL spec</code> prints it.</p>`;
}

function text(summary: string, content: string): Markup {
  return mark`<details class="tables"><summary>${summary}</summary><pre tabindex="0">${content}</pre></details>`;
}
