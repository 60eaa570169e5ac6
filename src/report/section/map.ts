// The map at the last count. The page's script brings the slider, the switch and the tooltips to life.
import { mapShows, type MapState, type ReportView } from '../../view/contract.ts';
import { drawMap } from '../../view/map/draw.ts';
import { mapTables } from '../../view/map/table.ts';
import { layOut } from '../../view/map/sheet.ts';
import { mark, Markup, type Content } from '../../view/markup.ts';
import { plain } from '../../view/number.ts';
import { section } from './section.ts';

/** Pixels, for a screen and for a phone. */
const widths = { wide: 760, narrow: 340 } as const;

interface MapNotes {
  /** What sources and sinks are. */
  readonly worth: string;
  /** How places are hidden; null where they are not. */
  readonly hidden: string | null;
  /** The plan that the map is of, where there are several. */
  readonly plan?: string;
  /** Brings the map to life; stands right behind it. */
  readonly program: Markup;
  /** What stands beneath the map. */
  readonly more?: Content;
}

export function mapSection(view: ReportView, notes: MapNotes): Markup {
  const last = view.years.length - 1;
  const state: MapState = { count: last, show: 'abundance', focus: null };
  const picture = (size: 'wide' | 'narrow') =>
    mark`<div class="${size}" data-figure="map" data-width="${String(widths[size])}">${drawMap(state, layOut(view, widths[size]))}</div>`;
  return section(
    'map',
    'The map',
    mark`${controls(view)}
<figure class="map" id="map-figure">${picture('wide')}${picture('narrow')}<figcaption>${caption(view, notes)}</figcaption></figure>${notes.program}<details class="tables"><summary>The numbers of the map as tables</summary>
<div id="map-tables">${mapTables(view, last)}</div></details>${notes.more ?? null}`,
  );
}

/** Hidden until the script is there to serve them. */
function controls(view: ReportView): Markup {
  const last = view.years.length - 1;
  const year = String(view.years[last] ?? '');
  const choices = choicesFor(view).map(
    (show) =>
      mark`<label><input type="radio" name="show" value="${show}"${show === 'abundance' ? new Markup(' checked') : null}> ${choiceWords[show]}</label>`,
  );
  const choice = mark`<fieldset><legend>Show</legend>${choices}</fieldset>`;
  return mark`<div class="controls" hidden>
<div class="year"><button type="button" id="play" aria-pressed="false">Play</button><label for="year">Year</label>
<input type="range" id="year" min="0" max="${last}" step="1" value="${last}" aria-valuetext="${year}">
<output for="year" id="year-shown">${year}</output></div>
${choices.length > 1 ? choice : null}
<p class="note">Point at a patch or a band, tap it, or tab to the map and use the arrow keys, for the numbers.</p>
</div>`;
}

type Choice = (typeof mapShows)[number];

const choiceWords: Readonly<Record<Choice, string>> = {
  abundance: 'the middle abundance',
  empty: 'the chance of being empty',
  contribution: 'the contribution',
  role: 'source or sink',
};

function choicesFor({ patches, worthAt }: ReportView): readonly Choice[] {
  const known: Readonly<Record<Choice, boolean>> = {
    abundance: true,
    empty: patches.some((patch) => patch.empty !== null),
    contribution: worthAt !== null,
    role: worthAt !== null,
  };
  return mapShows.filter((show) => known[show]);
}

function caption(view: ReportView, { worth, hidden, plan }: MapNotes): Markup {
  const of = plan === undefined ? null : mark`The map is of “<bdi>${plan}</bdi>”. `;
  return mark`${of}${hidden ?? placeWords(view)} ${movementWords(view)} The middle of the futures is taken in each patch and year by itself,
so the patches together are no single future. ${worth}`;
}

function placeWords({ patches }: ReportView): string {
  if (patches.some((patch) => patch.at === null)) {
    return 'The model does not give every patch a place: they stand in a ring in the order of the model, and distances in the picture mean nothing.';
  }
  const drawn = patches.filter((patch) => patch.outline !== null).length;
  if (drawn === patches.length) return 'Patches are drawn in their outlines, true to scale.';
  if (drawn > 0) return 'Patches are drawn in their outlines where the model gives them, the others as circles.';
  return 'Patches stand where they are, as circles, not in their true outlines.';
}

function movementWords({ links, linksLeftOut }: ReportView): string {
  if (links.length === 0) return 'No movement is drawn.';
  const left = linksLeftOut > 0 ? ` The ${plain(linksLeftOut)} weakest links are not drawn.` : '';
  return `Bands are animals that arrive in the year before the count, worked out from mean abundance.${left}`;
}
