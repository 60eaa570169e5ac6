// The map at the last count. The page's script brings the slider, the switch and the tooltips to life.
import type { MapState, ReportView } from '../../view/contract.ts';
import { drawMap } from '../../view/map/draw.ts';
import { mapTables } from '../../view/map/table.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { plain } from '../../view/number.ts';

/** Pixels, for a screen and for a phone. */
export const mapWidths = { wide: 760, narrow: 340 } as const;

export function mapSection(view: ReportView): Markup {
  const last = view.years.length - 1;
  const state: MapState = { count: last, show: 'abundance', focus: null };
  const picture = mark`<div class="wide" data-figure="map" data-width="${String(mapWidths.wide)}">${drawMap(view, state, mapWidths.wide)}</div><div class="narrow" data-figure="map" data-width="${String(mapWidths.narrow)}">${drawMap(view, state, mapWidths.narrow)}</div>`;
  return mark`<section id="map" aria-labelledby="map-title"><h2 id="map-title">The map</h2>${controls(view)}<figure class="map" id="map-figure">${picture}<figcaption>${caption(view)}</figcaption></figure><details class="tables"><summary>The numbers of the map as tables</summary><div id="map-tables">${mapTables(view, last)}</div></details></section>`;
}

function controls(view: ReportView): Markup {
  const last = view.years.length - 1;
  const canBeEmpty = view.patches.some((patch) => patch.empty !== null);
  const choice = canBeEmpty
    ? mark`<fieldset><legend>Show</legend><label><input type="radio" name="show" value="abundance" checked> the middle abundance</label><label><input type="radio" name="show" value="empty"> the chance of being empty</label></fieldset>`
    : null;
  return mark`<div class="controls" hidden><div class="year"><button type="button" id="play" aria-pressed="false">Play</button><label for="year">Year</label><input type="range" id="year" min="0" max="${last}" step="1" value="${last}" aria-valuetext="${String(view.years[last] ?? '')}"><output for="year" id="year-shown">${String(view.years[last] ?? '')}</output></div>${choice}</div>`;
}

function caption(view: ReportView): Markup {
  const schematic = view.patches.some((patch) => patch.at === null)
    ? 'The model gives no places for its patches: they stand in a ring in the order of the model, and distances in the picture mean nothing. '
    : 'Patches stand where they are, as circles, not in their true outlines. ';
  const left = view.linksLeftOut > 0 ? `The ${plain(view.linksLeftOut)} weakest links are not drawn. ` : '';
  const movement =
    view.links.length > 0
      ? `Bands are animals that arrive in the year before the count, worked out from mean abundance. ${left}`
      : 'Movement is not drawn. ';
  return mark`${schematic}${movement}The middle of the futures is taken in each patch and year by itself, so the patches together are no single future.`;
}
