// The map of one year: patches as circles with counted dots, movement as tapered bands, the ways beneath.
import type { MapShow, MapState, ReportView, WorthView } from '../contract.ts';
import { figure, fitText } from '../figure.ts';
import { key } from '../key.ts';
import { mark, type Markup } from '../markup.ts';
import { plain, whole } from '../number.ts';
import { hairline, ink, paper, softInk } from '../palette.ts';
import { pick } from '../series.ts';
import { placeLabels } from './labels.ts';
import { legendEntries } from './legend.ts';
import { drawBands, drawWays } from './movement.ts';
import { drawPatches, textFits } from './patches.ts';
import { scaleBar } from './scale-bar.ts';
import type { Layout, Sheet } from './sheet.ts';
import { shownIn } from './shown.ts';
import { flow } from './words.ts';

/** A picture that is drawn again and again keeps its layout. */
export function drawMap(state: MapState, layout: Layout): Markup {
  const sheet = { ...layout, state };
  const { width, height } = layout;
  const legend = key(legendEntries(sheet), 2, height + 8, width - 4);
  const movement = mark`${drawWays(sheet)}${drawBands(sheet)}`;
  const content = mark`${neatline(width, height)}${heading(sheet)}
${movement}${drawPatches(sheet)}${names(sheet)}${foot(sheet)}${legend.markup}`;
  const size = { width, height: height + 12 + legend.height };
  return figure(size, words(sheet), content, { live: state.focus !== null });
}

/** The double frame of a survey sheet. */
function neatline(width: number, height: number): Markup {
  return mark`<rect x="0.5" y="0.5" width="${width - 1}" height="${height - 1}" fill="${paper}" stroke="${ink}"/>
<rect x="5.5" y="5.5" width="${width - 11}" height="${height - 11}" fill="none" stroke="${hairline}"/>`;
}

function heading({ view, state }: Sheet): Markup {
  const year = String(pick(view.years, state.count));
  const start = state.count === 0 && !atRest(state.show) ? ', at the start' : '';
  return mark`<text x="18" y="38" font-size="26" font-family="Georgia, 'Times New Roman', serif" fill="${ink}">${year}</text>
<text x="86" y="36" fill="${softInk}">${headings(view)[state.show]}${start}</text>`;
}

/** Shows the same in every year. */
function atRest(show: MapShow): boolean {
  return show === 'contribution' || show === 'role';
}

function headings(view: ReportView): Readonly<Record<MapShow, string>> {
  return {
    abundance: `the middle of ${plain(view.futures)} futures`,
    empty: 'empty in so many of 100 futures',
    contribution: `${view.animals} a year later, anywhere, for each one there`,
    role: 'source or sink, the same in every year',
    difference: `mean difference from ${fitText(view.minus?.name ?? '', 13, 110)}`,
  };
}

function names(sheet: Sheet): Markup {
  const { view, state, width, height, marks } = sheet;
  const frame = { left: 9, right: width - 9, top: 46, bottom: height - 34 };
  const all = view.patches.map(({ name }, p) => {
    const { text } = shownIn(view, state, p);
    return text === '' || textFits(sheet, p, text) ? name : `${name}: ${text}`;
  });
  const texts = placeLabels(all, marks.shapes, frame).map(
    ({ x, y, anchor, text }) => mark`<text x="${x}" y="${y}" text-anchor="${anchor}">${text}</text>`,
  );
  const halo = mark`stroke="${paper}" stroke-width="3.5" stroke-linejoin="round" paint-order="stroke"`;
  return mark`<g fill="${ink}" ${halo} pointer-events="none">${texts}</g>`;
}

function foot({ view, width, height, placing }: Sheet): Markup {
  const moved = view.places === 'shifted' ? 'places moved · ' : '';
  const origin = `${fitText(`${moved}${view.title}`, 11, width * 0.4)} · ${view.hash.slice(0, 8)}`;
  const stamp = mark`<text x="${width - 14}" y="${height - 13}" font-size="11" text-anchor="end" fill="${softInk}">${origin}</text>`;
  if (placing.pixelsPerKm !== null) {
    return mark`${stamp}${scaleBar(placing.pixelsPerKm, 18, height - 30, Math.min(150, width * 0.26))}`;
  }
  return mark`${stamp}<text x="18" y="${height - 13}" font-size="12" fill="${softInk}">a scheme, not to scale</text>`;
}

function words({ view, state }: Sheet) {
  const what = {
    abundance: `abundance in the middle of ${plain(view.futures)} futures`,
    empty: 'chance of being empty',
    contribution: 'contribution of each patch',
    role: 'sources and sinks',
    difference: `mean difference from ${view.minus?.name ?? ''}`,
  }[state.show];
  const most = view.patches
    .map((one) => ({ name: one.name, median: pick(one.fan.median, state.count) }))
    .sort((a, b) => b.median - a.median)
    .slice(0, 3)
    .map((one) => `${one.name} ${whole(one.median)}`);
  const moved = view.links.reduce((sum, link) => sum + pick(link.animals, state.count), 0);
  const movement = view.links.length > 0 ? ` ${flow(moved)} ${view.animals} arrive in another patch in the year.` : '';
  const patches = `${what} in ${view.patches.length} patches; most animals in ${most.join(', ')}.`;
  return {
    title: `Map of ${view.title}, ${pick(view.years, state.count)}`,
    description: `${patches}${movement}${roleWords(view)} All numbers stand in the table below it.`,
  };
}

function roleWords({ patches, worthAt }: ReportView): string {
  if (worthAt === null) return '';
  const named = (role: WorthView['role']) =>
    patches.filter(({ worth }) => worth?.role === role).map(({ name }) => name);
  const told = (['source', 'sink', 'undecided'] as const).map((role) => {
    const all = named(role);
    const more = all.length > 6 ? ` and ${plain(all.length - 6)} more` : '';
    return `${role}: ${all.length === 0 ? 'none' : all.slice(0, 6).join(', ')}${more}`;
  });
  return ` Taken ${worthAt}, ${told.join('; ')}.`;
}
