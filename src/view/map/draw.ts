// The map of one year: patches as circles with counted dots, movement as tapered bands, the ways beneath.
import type { MapState, ReportView } from '../contract.ts';
import { figure, fitText } from '../figure.ts';
import { key } from '../key.ts';
import { mark, type Markup } from '../markup.ts';
import { plain, whole } from '../number.ts';
import { hairline, ink, paper, softInk } from '../palette.ts';
import { pick } from '../series.ts';
import { placeLabels } from './labels.ts';
import { legendEntries } from './legend.ts';
import { drawBands, drawWays } from './movement.ts';
import { drawPatches } from './patches.ts';
import { scaleBar } from './scale-bar.ts';
import { layOut, type Sheet } from './sheet.ts';
import { flow } from './words.ts';

export function drawMap(view: ReportView, state: MapState, width: number): Markup {
  const sheet = layOut(view, state, width);
  const { height } = sheet;
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
  const middle = `the middle of ${plain(view.futures)} futures`;
  const what = state.show === 'empty' ? 'empty in so many of 100 futures' : middle;
  const start = state.count === 0 ? ', at the start' : '';
  return mark`<text x="18" y="38" font-size="26" font-family="Georgia, 'Times New Roman', serif" fill="${ink}">${year}</text>
<text x="86" y="36" fill="${softInk}">${what}${start}</text>`;
}

function names({ view, width, height, placing, discs }: Sheet): Markup {
  const frame = { left: 9, right: width - 9, top: 46, bottom: height - 34 };
  const all = view.patches.map((one) => one.name);
  const texts = placeLabels(all, placing.points, discs.radius, frame).map(
    ({ x, y, anchor, text }) => mark`<text x="${x}" y="${y}" text-anchor="${anchor}">${text}</text>`,
  );
  const halo = mark`stroke="${paper}" stroke-width="3.5" stroke-linejoin="round" paint-order="stroke"`;
  return mark`<g fill="${ink}" ${halo} pointer-events="none">${texts}</g>`;
}

function foot({ view, width, height, placing }: Sheet): Markup {
  const origin = `${fitText(view.title, 11, width * 0.4)} · ${view.hash.slice(0, 8)}`;
  const stamp = mark`<text x="${width - 14}" y="${height - 13}" font-size="11" text-anchor="end" fill="${softInk}">${origin}</text>`;
  if (placing.pixelsPerKm !== null) {
    return mark`${stamp}${scaleBar(placing.pixelsPerKm, 18, height - 30, Math.min(150, width * 0.26))}`;
  }
  return mark`${stamp}<text x="18" y="${height - 13}" font-size="12" fill="${softInk}">a scheme, not to scale</text>`;
}

function words({ view, state }: Sheet) {
  const middle = `abundance in the middle of ${plain(view.futures)} futures`;
  const what = state.show === 'empty' ? 'chance of being empty' : middle;
  const most = view.patches
    .map((one) => ({ name: one.name, median: pick(one.fan.median, state.count) }))
    .sort((a, b) => b.median - a.median)
    .slice(0, 3)
    .map((one) => `${one.name} ${whole(one.median)}`);
  const moved = view.links.reduce((sum, link) => sum + pick(link.animals, state.count), 0);
  const movement = view.links.length > 0 ? ` ${flow(moved)} ${view.animals} arrive in another patch in the year.` : '';
  const patches = `${what} in ${view.patches.length} patches; most in ${most.join(', ')}.`;
  return {
    title: `Map of ${view.title}, ${pick(view.years, state.count)}`,
    description: `${patches}${movement} All numbers stand in the table below it.`,
  };
}
