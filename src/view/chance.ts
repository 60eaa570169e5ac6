// The chance that an outcome has come by each year, with the band that holds for the whole curve at once.
import type { OutcomeView, Series, Size } from './contract.ts';
import { axes, cursor, plot, type Plot } from './axes.ts';
import { figure } from './figure.ts';
import { course, ribbon } from './fan.ts';
import { key } from './key.ts';
import { mark, type Markup } from './markup.ts';
import { of100, plain } from './number.ts';
import { deep, ink, softInk, tint, umber } from './palette.ts';
import { largest, pick } from './series.ts';

export interface ChanceChart {
  readonly outcome: OutcomeView;
  readonly years: Series;
  readonly marked: number | null;
}

export function drawChance(chart: ChanceChart, size: Size): Markup {
  const { outcome, years } = chart;
  const legend = key(entriesOf(outcome), 0, 4, size.width);
  const margins = { top: legend.height + 32, right: 16, bottom: 28, left: 40 };
  const place = plot(size, margins, years, Math.max(0.1, largest(outcome.upper)) * 100);
  const title = mark`<text x="0" y="${legend.height + 20}" fill="${softInk}">of 100 futures</text>`;
  const content = mark`${legend.markup}${title}${axes(place, plain)}${curves(place, outcome, years)}${cursor(place, chart.marked)}`;
  return figure(size, words(outcome, years), content, { years: [place.left, place.right] });
}

function curves(place: Plot, outcome: OutcomeView, years: Series): Markup {
  const seen = years.slice(outcome.first);
  const scaled = (series: Series) => series.slice(outcome.first).map((chance) => chance * 100);
  const band = ribbon(place, seen, scaled(outcome.lower), scaled(outcome.upper));
  const ever = course(place, seen, scaled(outcome.ever));
  const now = course(place, seen, scaled(outcome.now));
  return mark`<path d="${band}" fill="${tint}"/>
<path d="${now}" fill="none" stroke="${umber}" stroke-width="1.75" stroke-dasharray="2 3.5"/>
<path d="${ever}" fill="none" stroke="${deep}" stroke-width="2.5"/>`;
}

function words(outcome: OutcomeView, years: Series) {
  const last = years.length - 1;
  const end = `${of100(pick(outcome.ever, last))} of 100 futures by ${pick(years, last)}`;
  const within = `the band reaches from ${of100(pick(outcome.lower, last))} to ${of100(pick(outcome.upper, last))}`;
  const title = `Chance of having ${outcome.words.happened}: ${outcome.name}`;
  return { title, description: `${outcome.definition}. It rises to ${end}; ${within}.` };
}

const entriesOf = ({ words: { happened, now } }: OutcomeView) => [
  {
    sample: mark`<rect y="-7" width="26" height="14" fill="${tint}"/><line x1="0" x2="26" stroke="${deep}" stroke-width="2.5"/>`,
    width: 26,
    words: `have ${happened} by then`,
  },
  {
    sample: mark`<line x1="0" x2="26" stroke="${umber}" stroke-width="1.75" stroke-dasharray="2 3.5"/>`,
    width: 26,
    words: `are ${now} in that year`,
  },
  {
    sample: mark`<rect y="-7" width="26" height="14" fill="${tint}" stroke="${ink}" stroke-width="0.5"/>`,
    width: 26,
    words: '95 % band of the curve',
  },
];
