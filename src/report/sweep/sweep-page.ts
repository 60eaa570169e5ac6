// What a sweep says as one page: what matters most, how each measure answers each number, and where growth goes through 1 or the
// preferred plan changes. It has no script, and its tables hold what the figures show.
import { heatMaps, preferredMaps, type HeatAxis, type HeatMap, type PreferredMap } from '../../sweep/summary/heat.ts';
import type { Ranking } from '../../sweep/summary/ranking.ts';
import type { FactorSummary, QuantitySummary, SweepSummary } from '../../sweep/summary/summarise.ts';
import type { Swept } from '../../sweep/summary/swept.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { percent } from '../../view/number.ts';
import { drawBars, type SensitivityBars } from '../../view/sweep/bars.ts';
import { drawCells, type Cell } from '../../view/sweep/cell-map.ts';
import { drawResponse } from '../../view/sweep/response-curve.ts';
import { scrolling } from '../../view/table.ts';
import { writeDocument } from '../document.ts';
import { styleSheet } from '../style.ts';
import { andRuns, noneSeen, numberText, preferredWords, three, withUnit } from './words.ts';

export function sweepPage(swept: Swept, summary: SweepSummary): string {
  const maps = heatMaps(swept, summary);
  const preferred = preferredMaps(swept, summary);
  const { model, points, design, assumptions, tool, hash } = summary;
  const body = mark`<h1>${model}</h1>
<p id="answer">${points.toLocaleString('en')} points (${design})${andRuns(summary)}, over ${summary.factors.map(({ name }) => withUnit(name, summary)).join(', ')}.</p>
${summary.rankings.map((ranking) => rankingSection(ranking, preferred, summary))}
${summary.quantities.map((quantity) => quantitySection(quantity, summary, maps))}
<h2>What these numbers take for granted</h2>
<ul>${assumptions.map((text) => mark`<li>${text}</li>`)}</ul>
<p>Rank plans rather than trust absolute risks. Moving or taking animals needs permits, the law of the place and qualified people.</p>`;
  const foot = `skein ${tool.version}, kernel ${tool.kernel}, hash ${hash.slice(0, 12)}`;
  return writeDocument({
    title: `Sweep: ${model}`,
    style: styleSheet(foot),
    program: null,
    body: () => mark`${body}<p>${foot}</p>`,
  });
}

function rankingSection(ranking: Ranking, maps: readonly PreferredMap[], summary: SweepSummary): Markup {
  const { quantity, better, points, told, scenarios, factors } = ranking;
  const map = maps.find((one) => one.quantity === quantity);
  const shares = scenarios.map(
    ({ name, best, toldBest }) =>
      mark`<tr><th scope="row"><bdi>${name}</bdi></th><td>${percent(best)}</td><td>${percent(toldBest)}</td></tr>`,
  );
  const rows = factors.flatMap(({ name, groups }) =>
    groups.map(
      ({ from, to, points: own, preferred, told: share }) =>
        mark`<tr><th scope="row">${withUnit(name, summary)}</th><td>${rangeText([from, to])}</td><td>${String(own)}</td><td><bdi>${preferred === 'equal' ? 'several alike' : preferred}</bdi></td><td>${percent(share)}</td></tr>`,
    ),
  );
  const lines = factors.map(
    (factor) => mark`<li>over ${withUnit(factor.name, summary)}: ${preferredWords(factor)}</li>`,
  );
  return mark`<section><h2>Which plan is best by ${quantity}</h2>${map === undefined ? null : preferredFigure(labelled(map, summary))}
<p>${better === 'less' ? 'Less' : 'More'} is better. At ${told.toLocaleString('en')} of ${points.toLocaleString('en')} points the best plan is told apart from all others.</p>
${scrolling(`Plans by ${quantity}`, mark`<table><thead><tr><th>plan</th><th>best at</th><th>told apart from all others at</th></tr></thead><tbody>${shares}</tbody></table>`)}
<ul>${lines}</ul>
<details><summary>The best plan by number and value</summary>${scrolling(`Best plan by ${quantity}, by number and value`, mark`<table><thead><tr><th>number</th><th>value</th><th>points</th><th>best in the mean</th><th>told apart at</th></tr></thead><tbody>${rows}</tbody></table>`)}</details></section>`;
}

function quantitySection(quantity: QuantitySummary, summary: SweepSummary, maps: readonly HeatMap[]): Markup | null {
  const { name, unit, meaning, least, greatest, mean, factors, orderedBy } = quantity;
  if (!Number.isFinite(least)) return null;
  const write = (value: number): string => numberText(value, unit);
  const bars = barsOf(quantity, summary);
  const map = maps.find((one) => one.quantity === name);
  return mark`<section><h2>${name}</h2>
<p>${meaning} From ${write(least)} to ${write(greatest)}, ${write(mean)} in the mean${noneSeen(quantity, summary)}.</p>
${bars === null ? null : mark`<h3>What matters most</h3>${wide(bars.title, drawBars(bars))}`}
${map === undefined ? null : mark`<h3>Over two numbers</h3>${wide(`${name} over two numbers`, heatFigure(labelled(map, summary), write))}`}
<h3>Over one number</h3><div>${factors.map((factor) => responseFigure({ ...factor, name: withUnit(factor.name, summary) }, name, write))}</div>
<details><summary>The same as a table, by ${orderedBy}</summary>${scrolling(`${name}, by number and value`, responseTable(factors, write))}</details></section>`;
}

/** On a phone it keeps its size, and is scrolled. */
function wide(label: string, drawn: Markup): Markup {
  return mark`<figure class="steady">${scrolling(label, drawn)}</figure>`;
}

function barsOf({ name, factors, orderedBy }: QuantitySummary, { design }: SweepSummary): SensitivityBars | null {
  const bars = factors.flatMap((factor): SensitivityBars['bars'] => {
    const { shares, screen, response } = factor;
    if (shares !== null) return [bar(factor, shares.total, shares.totalBand, percentOf(shares.total))];
    if (screen !== null) {
      const band = {
        lower: screen.meanSize - 2 * screen.standardError,
        upper: screen.meanSize + 2 * screen.standardError,
      };
      return [bar(factor, screen.meanSize, band, three(screen.meanSize))];
    }
    if (design === 'one at a time' || response.explained === null) return [];
    return [bar(factor, response.explained, null, percentOf(response.explained))];
  });
  return bars.length === 0 ? null : { title: `What matters most for ${name}`, by: orderedBy, bars };
}

type Bar = SensitivityBars['bars'][number];

function bar({ name }: FactorSummary, value: number, band: Bar['band'], words: string): Bar {
  return { name, value, band, words };
}

function percentOf(share: number): string {
  return percent(Math.min(1, Math.max(0, share)));
}

function responseFigure(
  { name, response }: FactorSummary,
  measure: string,
  write: (value: number) => string,
): Markup | null {
  const points = response.groups.flatMap(({ from, to, mean, lower, upper, told = 1 }) =>
    typeof from === 'number' && typeof to === 'number'
      ? [{ at: (from + to) / 2, mean, lower, upper, open: told <= 0.5 }]
      : [],
  );
  if (points.length < 2) return null;
  const sliced = response.groups.some(({ from, to }) => from !== to);
  const at = sliced ? 'the middle of each slice of equally many points' : 'each value that was run';
  const level = measure.startsWith('growth') && !measure.includes(' less ') ? 1 : null;
  return drawResponse({ measure, number: name, points, at, level, write });
}

function responseTable(factors: readonly FactorSummary[], write: (value: number) => string): Markup {
  const rows = factors.flatMap(({ name, response }) =>
    response.groups.map(
      ({ from, to, points, mean, lower, upper }) =>
        mark`<tr><th scope="row">${name}</th><td>${rangeText([from, to])}</td><td>${String(points)}</td><td>${write(mean)}</td><td>${write(lower)} to ${write(upper)}</td></tr>`,
    ),
  );
  return mark`<table><thead><tr><th>number</th><th>value</th><th>points</th><th>mean</th><th>middle 90 %</th></tr></thead><tbody>${rows}</tbody></table>`;
}

function rangeText([from, to]: HeatAxis['groups'][number]): string {
  const short = (value: number | string): string => (typeof value === 'number' ? three(value) : value);
  return from === to ? short(from) : `${short(from)} to ${short(to)}`;
}

function labelled<M extends HeatMap | PreferredMap>(map: M, summary: SweepSummary): M {
  const own = (axis: HeatAxis): HeatAxis => ({ ...axis, name: withUnit(axis.name, summary) });
  return { ...map, x: own(map.x), y: own(map.y) };
}

/** A slice of values is told by its middle: there is no room for both ends. */
function axisOf({ name, groups }: HeatAxis) {
  const sliced = groups.some(([from, to]) => from !== to);
  const labels = groups.map((group) => {
    const [from, to] = group;
    const one = from === to || typeof from !== 'number' || typeof to !== 'number';
    return one ? rangeText(group) : String(Number(((from + to) / 2).toPrecision(3)));
  });
  return { name: sliced ? `${name} (middles of slices)` : name, labels };
}

function heatFigure({ quantity, x, y, cells }: HeatMap, write: (value: number) => string): Markup {
  const known = cells.filter((value) => !Number.isNaN(value));
  const [least, most] = [Math.min(...known), Math.max(...known)];
  const growth = quantity.startsWith('growth') && !quantity.includes(' less ');
  const drawn = Array.from(cells, (value): Cell | null =>
    Number.isNaN(value)
      ? null
      : {
          shade: most > least ? (value - least) / (most - least) : 0,
          words: write(value),
          side: growth && value < 1 ? 0 : 1,
        },
  );
  const line = growth ? ' The line is where growth goes through 1.' : '';
  const description = `From ${write(least)} (light) to ${write(most)} (dark), the other numbers taken together.${line}`;
  return drawCells({
    title: `${quantity} over ${x.name} and ${y.name}`,
    description,
    x: axisOf(x),
    y: axisOf(y),
    cells: drawn,
  });
}

function preferredFigure({ quantity, scenarios, x, y, cells, told }: PreferredMap): Markup {
  if (cells.every((best) => best < 0)) return mark`<p>No plan differs from another by it.</p>`;
  const drawn = Array.from(cells, (best, cell): Cell | null => {
    if (best === -1) return null;
    if (best < 0) return { shade: 0, words: 'equal', side: best };
    const shade = (0.2 + 0.6 * best) / Math.max(1, scenarios.length - 1);
    const name = scenarios[best] ?? '';
    if ((told[cell] ?? 0) > 0.5) return { shade, words: name, short: letterOf(best), side: best };
    return { shade, words: `${name}, not told apart`, short: `${letterOf(best)}?`, side: best };
  });
  const isOpen = drawn.some((cell) => cell?.short?.endsWith('?') === true);
  const legend = [
    ...scenarios.map((name, place) => `${letterOf(place)}: ${name}`),
    ...(isOpen ? ['?: at half of the points or more another plan may be as good'] : []),
  ];
  const description =
    'Each cell has the letter of the plan that is best in the mean there, with a question mark where the runs do not tell it from another, or says that several are equal; the line is where the preferred plan changes.';
  const title = `Best by ${quantity}`;
  return wide(title, drawCells({ title, description, x: axisOf(x), y: axisOf(y), cells: drawn, legend }));
}

/** A, B, …; numbers beyond Z. */
function letterOf(place: number): string {
  return place < 26 ? String.fromCharCode(65 + place) : String(place + 1);
}
