// The key of the map: what a dot, a circle, a colour and a band stand for.
import type { KeyEntry } from '../key.ts';
import { mark, type Markup } from '../markup.ts';
import { plain, roundDown } from '../number.ts';
import { deep, ramp, rule, softInk, umber } from '../palette.ts';
import { bandPath } from './band.ts';
import type { Discs } from './discs.ts';
import type { Sheet } from './sheet.ts';

export function legendEntries(sheet: Sheet): readonly KeyEntry[] {
  const entries =
    sheet.state.show === 'empty' ? [rampEntry('empty in 0 to 100 of 100 futures')] : abundanceEntries(sheet);
  return sheet.view.links.length === 0 ? entries : [...entries, ...bandEntry(sheet), wayEntry];
}

function abundanceEntries({ view, discs }: Sheet): readonly KeyEntry[] {
  const circle = mark`<circle cx="8" r="7.5" fill="#fff" stroke="${softInk}"/>`;
  const size = { sample: circle, width: 16, words: sizeWords[discs.sizeMeans] };
  if (discs.perDot === null) return [size, rampEntry(fullness[discs.sizeMeans === 'capacity' ? 'capacity' : 'most'])];
  const dot = mark`<circle cx="5" r="${discs.dotRadius}" fill="${deep}"/>`;
  return [{ sample: dot, width: 10, words: perDotWords(discs.perDot, view.animals) }, size];
}

const fullness = {
  capacity: 'the middle, from nothing to what it can hold',
  most: 'the middle, from nothing to the most in 95 of 100 futures',
} as const;

const sizeWords: Readonly<Record<Discs['sizeMeans'], string>> = {
  capacity: 'circle: what the patch can hold',
  area: 'circle: area of the patch',
  animals: 'circle: the most in 95 of 100 futures',
};

export function perDotWords(perDot: number, animals: string): string {
  if (perDot === 1) return `one dot is one ${animals.replace(/s$/, '')}`;
  return `one dot is ${plain(perDot)} ${animals}`;
}

function rampEntry(words: string): KeyEntry {
  const steps = Array.from({ length: 10 }, (_, i) => step(i));
  const frame = mark`<rect y="-6" width="100" height="12" fill="none" stroke="${rule}" stroke-width="0.75"/>`;
  return { sample: mark`${steps}${frame}`, width: 100, words };
}

function step(i: number): Markup {
  return mark`<rect x="${i * 10}" y="-6" width="10.2" height="12" fill="${ramp((i + 0.5) / 10)}"/>`;
}

function bandEntry({ view, flows }: Sheet): readonly KeyEntry[] {
  if (flows.most <= 0) return [];
  const sample = roundDown(flows.most);
  const width = (flows.widest * sample) / flows.most;
  const path = bandPath({ from: [0, 0], to: [56, 0], fromRadius: 0, toRadius: 0 }, width, 0);
  const count = sample >= 1 ? plain(sample) : String(Number(sample.toPrecision(1)));
  const words = `${count} ${view.animals} a year, from the wide end to the thin`;
  return [{ sample: mark`<path d="${path}" fill="${umber}" fill-opacity="0.6"/>`, width: 58, words }];
}

const wayEntry: KeyEntry = {
  sample: mark`<line x1="0" x2="30" stroke="${softInk}" stroke-dasharray="1 4" stroke-linecap="round"/>`,
  width: 30,
  words: 'animals can go between these',
};
