// The map of one year: patches as circles with counted dots, movement as tapered bands, the links beneath.
import type { MapState, ReportView } from '../contract.ts';
import { figure, fitText } from '../figure.ts';
import { key } from '../key.ts';
import { mark, type Markup } from '../markup.ts';
import { plain, whole } from '../number.ts';
import { deep, ink, inkOn, paper, ramp, softInk, umber } from '../palette.ts';
import { largest, pick } from '../series.ts';
import { bandPath } from './band.ts';
import { dotPath, sizeDiscs, type Discs } from './discs.ts';
import { placeLabels } from './labels.ts';
import { legendEntries, neatline, type Flows } from './legend.ts';
import { innerFrame, mapHeight, placePatches, type Placing } from './place.ts';
import { scaleBar } from './scale-bar.ts';
import { flow, linkLine, patchLines } from './words.ts';

interface Sheet {
  readonly view: ReportView;
  readonly state: MapState;
  readonly width: number;
  readonly height: number;
  readonly placing: Placing;
  readonly discs: Discs;
  readonly flows: Flows;
}

export function drawMap(view: ReportView, state: MapState, width: number): Markup {
  const height = mapHeight(view.patches, width);
  const placing = placePatches(view.patches, innerFrame({ width, height }));
  const discs = sizeDiscs(view.patches, placing.points, width);
  const flows = { most: Math.max(0, ...view.links.map((link) => largest(link.animals))), widest: width < 500 ? 9 : 14 };
  const sheet = { view, state, width, height, placing, discs, flows };
  const legend = key(legendEntries(view, state, discs, flows), 2, height + 8, width - 4);
  const picture = mark`${neatline(width, height)}${heading(sheet)}${links(sheet)}${bands(sheet)}${patches(sheet)}${names(sheet)}${foot(sheet)}${legend.markup}`;
  return figure({ width, height: height + 12 + legend.height }, words(sheet), picture, { live: state.focus !== null });
}

function heading({ view, state }: Sheet): Markup {
  const year = String(pick(view.years, state.count));
  const what = state.show === 'empty' ? 'chance of being empty' : `the middle of ${plain(view.futures)} futures`;
  const start = state.count === 0 ? ', at the start' : '';
  return mark`<text x="18" y="38" font-size="26" font-family="Georgia, 'Times New Roman', serif" fill="${ink}">${year}</text><text x="86" y="36" fill="${softInk}">${what}${start}</text>`;
}

function links({ view, placing }: Sheet): Markup {
  const seen = new Set<string>();
  const lines = view.links.flatMap((link) => {
    const pair = `${Math.min(link.from, link.to)}-${Math.max(link.from, link.to)}`;
    if (seen.has(pair)) return [];
    seen.add(pair);
    const [a, b] = [pick(placing.points, link.from), pick(placing.points, link.to)];
    return [mark`<path d="M${a[0]} ${a[1]}L${b[0]} ${b[1]}"/>`];
  });
  return mark`<g fill="none" stroke="${softInk}" stroke-opacity="0.55" stroke-dasharray="1 4" stroke-linecap="round">${lines}</g>`;
}

function bands({ view, state, placing, discs, flows }: Sheet): Markup {
  const drawn = view.links.map((link, index) => {
    const animals = pick(link.animals, state.count);
    const width = flows.most > 0 ? (flows.widest * animals) / flows.most : 0;
    const ends = {
      from: pick(placing.points, link.from),
      to: pick(placing.points, link.to),
      fromRadius: pick(discs.radius, link.from),
      toRadius: pick(discs.radius, link.to),
    };
    const path = width < 0.15 ? '' : bandPath(ends, width);
    return mark`<path data-link="${String(index)}" d="${path}"><title>${linkLine(view, link, state.count)}</title></path>`;
  });
  return mark`<g fill="${umber}" fill-opacity="0.6">${drawn}</g>`;
}

function patches(sheet: Sheet): Markup {
  return mark`<g>${sheet.view.patches.map((_, p) => patch(sheet, p))}</g>`;
}

function patch(sheet: Sheet, p: number): Markup {
  const { view, state, placing, discs } = sheet;
  const [x, y] = pick(placing.points, p);
  const radius = pick(discs.radius, p);
  const said = [pick(view.patches, p).name, ...patchLines(view, p, state.count)].join('. ');
  const live =
    state.focus === null
      ? null
      : mark` class="patch" role="img" tabindex="${state.focus === p ? '0' : '-1'}" data-patch="${String(p)}" aria-label="${said}"`;
  const halo = mark`<circle class="halo" cx="${x}" cy="${y}" r="${radius + 5}" fill="none" stroke="none"/>`;
  const title = state.focus === null ? mark`<title>${said}</title>` : null;
  return mark`<g${live}>${title}${halo}${filling(sheet, p)}</g>`;
}

function filling({ view, state, placing, discs }: Sheet, p: number): Markup {
  const [x, y] = pick(placing.points, p);
  const radius = pick(discs.radius, p);
  const { fan, empty, capacity } = pick(view.patches, p);
  const median = pick(fan.median, state.count);
  if (state.show === 'empty' && empty !== null) {
    const chance = pick(empty, state.count);
    const number =
      radius >= 13
        ? mark`<text x="${x}" y="${y + 4.5}" text-anchor="middle" fill="${inkOn(chance)}">${Math.round(chance * 100)}</text>`
        : null;
    return mark`<circle cx="${x}" cy="${y}" r="${radius}" fill="${ramp(chance)}" stroke="${ink}"/>${number}`;
  }
  if (discs.perDot === null) {
    const share = median / Math.max(capacity ?? largest(fan.p95), 1e-9);
    return mark`<circle cx="${x}" cy="${y}" r="${radius}" fill="${ramp(Math.min(1, share))}" stroke="${ink}" stroke-width="0.75"/>`;
  }
  const dots = Math.round(median / discs.perDot);
  const few =
    dots === 0 && median > 0
      ? mark`<circle cx="${x}" cy="${y}" r="${discs.dotRadius}" fill="none" stroke="${deep}"/>`
      : null;
  return mark`<circle cx="${x}" cy="${y}" r="${radius}" fill="#fff" stroke="${softInk}"/><path d="${dotPath(dots, pick(discs.slots, p), radius, [x, y])}" stroke="${deep}" stroke-width="${discs.dotRadius * 2}" stroke-linecap="round" fill="none"/>${few}`;
}

function names({ view, width, height, placing, discs }: Sheet): Markup {
  const frame = { left: 9, right: width - 9, top: 46, bottom: height - 34 };
  const labels = placeLabels(
    view.patches.map((one) => one.name),
    placing.points,
    discs.radius,
    frame,
  );
  const texts = labels.map(
    (label) => mark`<text x="${label.x}" y="${label.y}" text-anchor="${label.anchor}">${label.text}</text>`,
  );
  return mark`<g fill="${ink}" stroke="${paper}" stroke-width="3.5" stroke-linejoin="round" paint-order="stroke" pointer-events="none">${texts}</g>`;
}

function foot({ view, width, height, placing }: Sheet): Markup {
  const stamp = mark`<text x="${width - 14}" y="${height - 13}" font-size="11" text-anchor="end" fill="${softInk}">${fitText(view.title, 11, width * 0.4)} · ${view.hash.slice(0, 8)}</text>`;
  if (placing.pixelsPerKm === null) {
    return mark`${stamp}<text x="18" y="${height - 13}" font-size="12" fill="${softInk}">a scheme, not to scale</text>`;
  }
  return mark`${stamp}${scaleBar(placing.pixelsPerKm, 18, height - 30, Math.min(150, width * 0.26))}`;
}

function words({ view, state }: Sheet) {
  const year = pick(view.years, state.count);
  const what =
    state.show === 'empty' ? 'chance of being empty' : `abundance in the middle of ${plain(view.futures)} futures`;
  const order = view.patches
    .map((one) => ({ name: one.name, median: pick(one.fan.median, state.count) }))
    .sort((a, b) => b.median - a.median)
    .slice(0, 3);
  const most = order.map((one) => `${one.name} ${whole(one.median)}`).join(', ');
  const moved = view.links.reduce((sum, link) => sum + pick(link.animals, state.count), 0);
  const movement = view.links.length > 0 ? ` ${flow(moved)} ${view.animals} arrive in another patch in the year.` : '';
  return {
    title: `Map of ${view.title}, ${year}`,
    description: `${what} in ${view.patches.length} patches; most in ${most}.${movement} All numbers stand in the table below it.`,
  };
}
