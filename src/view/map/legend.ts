// The key of the map: what a dot, a circle, a colour and a band stand for.
import type { MapState, ReportView } from '../contract.ts';
import type { KeyEntry } from '../key.ts';
import { mark, type Markup } from '../markup.ts';
import { plain, roundDown } from '../number.ts';
import { deep, hairline, ink, paper, ramp, rule, softInk, umber } from '../palette.ts';
import { bandPath } from './band.ts';
import type { Discs } from './discs.ts';

export interface Flows {
  /** Animals a year on the busiest link in its busiest year. */
  readonly most: number;
  /** Pixels at the origin for `most`. */
  readonly widest: number;
}

export function legendEntries(view: ReportView, state: MapState, discs: Discs, flows: Flows): readonly KeyEntry[] {
  const entries = state.show === 'empty' ? [rampEntry] : abundanceEntries(view, discs);
  if (view.links.length === 0) return entries;
  return [...entries, ...bandEntry(view, flows), linkEntry];
}

function abundanceEntries(view: ReportView, discs: Discs): readonly KeyEntry[] {
  const circle = mark`<circle cx="8" r="7.5" fill="#fff" stroke="${softInk}"/>`;
  const size = { sample: circle, width: 16, words: sizeWords[discs.sizeMeans] };
  if (discs.perDot === null) return [size, { ...rampEntry, words: 'share of what it can hold, 0 to all' }];
  const dot = mark`<circle cx="5" r="${discs.dotRadius}" fill="${deep}"/>`;
  return [{ sample: dot, width: 10, words: perDotWords(discs.perDot, view.animals) }, size];
}

const sizeWords: Readonly<Record<Discs['sizeMeans'], string>> = {
  capacity: 'circle: what the patch can hold',
  area: 'circle: area of the patch',
  animals: 'circle: the most in 95 of 100 futures',
};

export function perDotWords(perDot: number, animals: string): string {
  if (perDot === 1) return `one dot is one ${singular(animals)}`;
  return `one dot is ${plain(perDot)} ${animals}`;
}

function singular(animals: string): string {
  return animals.replace(/s$/, '');
}

const rampEntry: KeyEntry = {
  sample: rampStrip(),
  width: 100,
  words: 'empty in 0 to 100 of 100 futures',
};

function rampStrip(): Markup {
  const steps = Array.from(
    { length: 10 },
    (_, i) => mark`<rect x="${i * 10}" y="-6" width="10.2" height="12" fill="${ramp((i + 0.5) / 10)}"/>`,
  );
  return mark`${steps}<rect y="-6" width="100" height="12" fill="none" stroke="${rule}" stroke-width="0.75"/>`;
}

function bandEntry(view: ReportView, flows: Flows): readonly KeyEntry[] {
  if (flows.most <= 0) return [];
  const sample = roundDown(flows.most);
  const width = (flows.widest * sample) / flows.most;
  const path = bandPath({ from: [0, 6], to: [56, 6], fromRadius: 0, toRadius: 0 }, width);
  const words = `${sample >= 1 ? plain(sample) : String(sample)} ${view.animals} a year, from the wide end to the thin`;
  return [{ sample: mark`<path d="${path}" fill="${umber}" fill-opacity="0.6"/>`, width: 58, words }];
}

const linkEntry: KeyEntry = {
  sample: mark`<line x1="0" x2="30" stroke="${softInk}" stroke-width="1" stroke-dasharray="1 4" stroke-linecap="round"/>`,
  width: 30,
  words: 'animals can go between these',
};

/** The double frame of a survey sheet. */
export function neatline(width: number, height: number): Markup {
  return mark`<rect x="0.5" y="0.5" width="${width - 1}" height="${height - 1}" fill="${paper}" stroke="${ink}"/><rect x="5.5" y="5.5" width="${width - 11}" height="${height - 11}" fill="none" stroke="${hairline}"/>`;
}
