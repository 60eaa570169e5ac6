// The annex: parameters with where they are from, limits, and how to run it again.
import type { Model } from '../../model/model.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { plain } from '../../view/number.ts';
import { basisWords } from '../basis.ts';
import { cautions } from '../cautions.ts';
import type { ReportInput } from '../input.ts';
import { oddSection } from '../odd/odd.ts';
import { digits } from '../odd/rates.ts';

export function annexSection(input: ReportInput): Markup {
  const { model, results } = input;
  return mark`<section id="annex" aria-labelledby="annex-title"><h2 id="annex-title">Annex</h2>${oddSection(model, results)}${parameters(model)}${defaults(model)}${rerun(input)}</section>`;
}

/** Stands before the annex: nobody should read the answer without it. */
export function limitsSection({ model, results }: ReportInput): Markup {
  const items = cautions(model, results).map((text) => mark`<li>${text}</li>`);
  return mark`<section id="limits" aria-labelledby="limits-title"><h2 id="limits-title">Limits and cautions</h2><ul class="limits">${items}</ul></section>`;
}

function parameters(model: Model): Markup {
  const rows = model.parameters.map((one) => {
    const written = one.expression === digits(one.value) ? '' : one.expression;
    return mark`<tr><th scope="row"><bdi>${one.name}</bdi></th><td>${digits(one.value)}</td><td class="words"><bdi>${written}</bdi></td><td class="words">${one.basis ?? 'not said'}</td><td class="words"><bdi>${one.source ?? 'not said'}</bdi></td></tr>`;
  });
  const table =
    rows.length === 0
      ? null
      : mark`<div class="scroll" tabindex="0" role="region" aria-label="Named numbers"><table><caption>Named numbers</caption><thead><tr><th scope="col">name</th><th scope="col">value</th><th scope="col">written as</th><th scope="col">basis</th><th scope="col">source</th></tr></thead><tbody>${rows}</tbody></table></div>`;
  return mark`<h3 id="numbers">The numbers and where they are from</h3><p>${basisWords(model)}</p>${table}`;
}

function defaults(model: Model): Markup {
  const items = model.defaults.map((text) => mark`<li>${text}</li>`);
  const list =
    items.length === 0
      ? mark`<p>No default was used: everything is said in the text of the model.</p>`
      : mark`<ul>${items}</ul>`;
  return mark`<h3 id="defaults">Defaults that were used</h3>${list}`;
}

function rerun({ results, specText, commandLine }: ReportInput): Markup {
  const { tool } = results;
  const facts = [
    ['command', mark`<code>${commandLine}</code>`],
    ['seed', mark`<code>${String(results.seed)}</code>`],
    ['futures', plain(results.replicates)],
    ['hash of all that decides the result (SHA-256)', mark`<code class="hash">${results.hash}</code>`],
    ['version', `${tool.name} ${tool.version}, kernel ${tool.kernel}`],
  ] as const;
  const list = facts.map(([name, value]) => mark`<div><dt>${name}</dt><dd>${value}</dd></div>`);
  return mark`<h3 id="again">How to run it again</h3><p>The same text, seed and version give the same numbers, bit for bit, on any machine.</p><dl class="numbers">${list}</dl><details class="tables"><summary>The text of the model</summary><pre tabindex="0">${specText}</pre></details>`;
}
