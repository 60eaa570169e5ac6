// Chances and abundance by year: the curves, the fan, the patches beside each other, and the tables.
import type { RunResults } from '../../results/results.ts';
import { drawAbundance } from '../../view/abundance.ts';
import { drawChance } from '../../view/chance.ts';
import type { ReportView } from '../../view/contract.ts';
import { mark, type Content, type Markup } from '../../view/markup.ts';
import { decimal, plain, whole } from '../../view/number.ts';
import { largest, pick } from '../../view/series.ts';
import { drawSmallFan } from '../../view/small-fan.ts';
import { drawTable, type Row, type Table } from '../../view/table.ts';
import { countedPart } from './counted.ts';
import { section } from './section.ts';

const sizes = {
  chance: { wide: { width: 720, height: 280 }, narrow: { width: 340, height: 290 } },
  fan: { wide: { width: 720, height: 320 }, narrow: { width: 340, height: 320 } },
  small: { width: 172, height: 130 },
} as const;

export function chancesSection(view: ReportView): Markup | null {
  if (view.outcomes.length === 0) return null;
  const many = view.outcomes.length > 1 ? ' beside' : '';
  return section(
    'chances',
    'Chances by year',
    mark`<p>The band holds for the whole curve at once: with 95\u00a0% confidence the curve that endless runs would give lies
inside it in every year. It accounts for the number of runs, not for what is not known about the model.</p>
<div class="chances${many}">${view.outcomes.map((_, k) => chanceFigure(view, k))}</div>`,
  );
}

/** Several outcomes stand side by side, each as narrow as on a phone. */
function chanceFigure(view: ReportView, k: number): Markup {
  const outcome = pick(view.outcomes, k);
  const draw = (size: 'wide' | 'narrow') =>
    drawChance({ outcome, years: view.years, marked: null }, sizes.chance[size]);
  const one = mark`<div data-figure="chance" data-index="${String(k)}">${draw('narrow')}</div>`;
  return mark`<figure class="chart"><h3><bdi>${outcome.name}</bdi></h3>
<p class="definition"><bdi>${outcome.definition}</bdi></p>
${view.outcomes.length > 1 ? one : both('chance', draw)}</figure>`;
}

/** `plan` is whose numbers they are, where there are several. */
export function abundanceSection(view: ReportView, results: RunResults, plan?: string): Markup {
  const shown = mostAnimals(view);
  const fan = both('fan', (size) => drawAbundance(view, null, sizes.fan[size]));
  return section(
    'abundance',
    'Abundance by year',
    mark`${plan === undefined ? null : mark`<p>Under “<bdi>${plan}</bdi>”.</p>`}<figure class="chart">${fan}<figcaption>The line is the middle of ${plain(view.futures)} futures in each year; no
single future follows it. Single futures swing more than the bands.</figcaption></figure>
<h3>Patch by patch</h3><p>Each patch has its own scale; the number at its top right is the upper end.${leftOut(view, shown)}</p>
<div class="smalls">${shown.map((p) => smallFan(view, p))}</div>
${countedPart(view, results.observed)}
${folded('Abundance by year as a table', yearTable(view, results))}
${folded('The middle of each patch by year as a table', patchTable(view, shown))}`,
  );
}

/** More would make the page too heavy to open. */
const mostPatches = 400;

/** Indices of the patches that are shown one by one, in the order of the model: all, or those with the most animals. */
function mostAnimals({ patches }: ReportView): readonly number[] {
  const all = [...patches.keys()];
  if (all.length <= mostPatches) return all;
  const most = patches.map(({ fan: { mean } }) => largest(mean));
  const ranked = all.toSorted((a, b) => pick(most, b) - pick(most, a) || a - b);
  return ranked.slice(0, mostPatches).sort((a, b) => a - b);
}

function leftOut({ patches }: ReportView, shown: readonly number[]): string {
  if (shown.length === patches.length) return '';
  return ` These are the ${plain(shown.length)} of ${plain(patches.length)} patches with the most animals in the mean; all others stand in
the tables that --out writes.`.replaceAll('\n', ' ');
}

function smallFan(view: ReportView, p: number): Markup {
  const picture = drawSmallFan(pick(view.patches, p), view.years, null, sizes.small);
  return mark`<div data-figure="small" data-index="${String(p)}">${picture}</div>`;
}

function both(name: string, draw: (size: 'wide' | 'narrow') => Markup): Markup {
  return mark`<div class="wide" data-figure="${name}">${draw('wide')}</div>
<div class="narrow" data-figure="${name}">${draw('narrow')}</div>`;
}

function folded(summary: string, table: Table): Content {
  return mark`<details class="tables"><summary>${summary}</summary>${drawTable(table)}</details>`;
}

function yearTable(view: ReportView, results: RunResults): Table {
  const inUse = new Map(results.patchesInUse.map((one) => [one.year, one.mean]));
  const rows = results.abundance.whole.map(({ year, mean, sd, quantiles: q }): Row => {
    const used = inUse.get(year);
    const animals = [q['0.05'], q['0.25'], q['0.5'], q['0.75'], q['0.95'], mean].map(whole);
    return [String(year), ...animals, Number.isNaN(sd) ? '' : whole(sd), used === undefined ? '' : decimal(used)];
  });
  const shares = ['5 of 100 at or under', '25 of 100', 'middle', '75 of 100', '95 of 100'];
  const head = ['year', ...shares, 'mean', 'standard deviation', 'patches in use, mean'];
  return { caption: `All patches (${view.animals})`, head, rows };
}

/** With more cells a page opens too slowly. */
const mostCells = 10_000;

function patchTable(view: ReportView, shown: readonly number[]): Table {
  const { years } = view;
  const all = years.length * shown.length <= mostCells;
  const told = [...years.keys()].filter((i) => all || i === 0 || i === years.length - 1 || pick(years, i) % 10 === 0);
  const rows = told.map((i): Row => {
    return [String(pick(years, i)), ...shown.map((p) => whole(pick(pick(view.patches, p).fan.median, i)))];
  });
  const head = ['year', ...shown.map((p) => pick(view.patches, p).name)];
  const caption = `Middle future in each patch (${view.animals})`;
  const between = 'every tenth year; the pictures above tell each, and so do the tables that --out writes';
  return { caption: all ? caption : `${caption}: ${between}`, head, rows };
}
