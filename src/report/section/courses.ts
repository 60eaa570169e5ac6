// Chances and abundance by year: the curves, the fan, the patches beside each other, and the table.
import type { RunResults } from '../../results/results.ts';
import type { ReportView } from '../../view/contract.ts';
import { drawChance } from '../../view/chance.ts';
import { drawAbundance } from '../../view/abundance.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { decimal, plain, whole } from '../../view/number.ts';
import { pick } from '../../view/series.ts';
import { drawSmallFan } from '../../view/small-fan.ts';

export const chartSizes = {
  chance: { wide: { width: 720, height: 280 }, narrow: { width: 340, height: 290 } },
  fan: { wide: { width: 720, height: 320 }, narrow: { width: 340, height: 320 } },
  small: { width: 220, height: 146 },
} as const;

export function chancesSection(view: ReportView): Markup | null {
  if (view.outcomes.length === 0) return null;
  const figures = view.outcomes.map((_, k) => chanceFigure(view, k));
  const many = view.outcomes.length > 1 ? ' beside' : '';
  return mark`<section id="chances" aria-labelledby="chances-title"><h2 id="chances-title">Chances by year</h2>
<p>The band holds for the whole curve at once: with 95 % confidence the curve that endless runs would give lies inside it in
every year. It accounts for the number of runs, not for what is not known about the model.</p>
<div class="chances${many}">${figures}</div></section>`;
}

/** Several outcomes stand side by side, each as narrow as on a phone. */
function chanceFigure(view: ReportView, k: number): Markup {
  const outcome = pick(view.outcomes, k);
  const draw = (size: 'wide' | 'narrow') =>
    drawChance({ outcome, years: view.years, marked: null }, chartSizes.chance[size]);
  const one = mark`<div data-figure="chance" data-index="${String(k)}">${draw('narrow')}</div>`;
  const pictures = view.outcomes.length > 1 ? one : both('chance', draw, k);
  return mark`<figure class="chart"><h3><bdi>${outcome.name}</bdi></h3>
<p class="definition"><bdi>${outcome.definition}</bdi></p>${pictures}</figure>`;
}

export function abundanceSection(view: ReportView, results: RunResults): Markup {
  const fan = (size: 'wide' | 'narrow') => drawAbundance(view, null, chartSizes.fan[size]);
  const smalls = view.patches.map(
    (patch, p) =>
      mark`<div class="chart" data-figure="small" data-index="${String(p)}">${drawSmallFan(patch, view.years, null, chartSizes.small)}</div>`,
  );
  return mark`<section id="abundance" aria-labelledby="abundance-title"><h2 id="abundance-title">Abundance by year</h2><figure class="chart">${both('fan', fan, 0)}<figcaption>${fanCaption(view)}</figcaption></figure><h3>Patch by patch</h3><p>Each patch has its own scale; the number at its top right is the upper end.</p><div class="smalls">${smalls}</div>${yearTable(view, results)}${patchTable(view)}</section>`;
}

function both(name: string, draw: (size: 'wide' | 'narrow') => Markup, index: number): Markup {
  return mark`<div class="wide" data-figure="${name}" data-index="${String(index)}">${draw('wide')}</div><div class="narrow" data-figure="${name}" data-index="${String(index)}">${draw('narrow')}</div>`;
}

function fanCaption(view: ReportView): string {
  return `The line is the middle of ${plain(view.futures)} futures in each year; no single future follows it. Single futures swing more than the bands.`;
}

function yearTable(view: ReportView, results: RunResults): Markup {
  const inUse = new Map(results.patchesInUse.map((one) => [one.year, one.mean]));
  const rows = results.abundance.whole.map(({ year, mean, sd, quantiles: q }) => {
    const cells = [q['0.05'], q['0.25'], q['0.5'], q['0.75'], q['0.95'], mean, sd].map(
      (n) => mark`<td>${whole(n)}</td>`,
    );
    const used = inUse.get(year);
    return mark`<tr><th scope="row">${String(year)}</th>${cells}<td>${used === undefined ? '' : decimal(used)}</td></tr>`;
  });
  const head = [
    'year',
    '5 of 100 at or under',
    '25 of 100',
    'middle',
    '75 of 100',
    '95 of 100',
    'mean',
    'standard deviation',
    'patches in use, mean',
  ];
  return details(`Abundance by year as a table`, `All patches (${view.animals})`, head, rows);
}

function patchTable(view: ReportView): Markup {
  const rows = view.years.map((year, i) => {
    const cells = view.patches.map((patch) => mark`<td>${whole(patch.fan.median[i] ?? 0)}</td>`);
    return mark`<tr><th scope="row">${String(year)}</th>${cells}</tr>`;
  });
  const head = ['year', ...view.patches.map((patch) => patch.name)];
  return details(
    'The middle of each patch by year as a table',
    `Middle future in each patch (${view.animals})`,
    head,
    rows,
  );
}

function details(summary: string, caption: string, head: readonly string[], rows: readonly Markup[]): Markup {
  const cells = head.map((name) => mark`<th scope="col"><bdi>${name}</bdi></th>`);
  return mark`<details class="tables"><summary>${summary}</summary><div class="scroll" tabindex="0" role="region" aria-label="${caption}"><table><caption>${caption}</caption><thead><tr>${cells}</tr></thead><tbody>${rows}</tbody></table></div></details>`;
}
