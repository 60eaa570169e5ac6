// One small fan for one patch, to stand beside many others.
import type { PatchView, Series, Size } from './contract.ts';
import { cursor, plot } from './axes.ts';
import { bands } from './fan.ts';
import { figure, fitText } from './figure.ts';
import { mark, type Markup } from './markup.ts';
import { plain, whole } from './number.ts';
import { ink, rule, softInk } from './palette.ts';
import { largest, pick } from './series.ts';

export function drawSmallFan(patch: PatchView, years: Series, marked: number | null, size: Size): Markup {
  const place = plot(size, { top: 30, right: 34, bottom: 22, left: 6 }, years, largest(patch.fan.p95));
  const top = pick(place.y.domain(), 1);
  const last = years.length - 1;
  const frame = mark`<line x1="${place.left}" x2="${place.right}" y1="${place.bottom}" y2="${place.bottom}" stroke="${ink}"/><line x1="${place.left}" x2="${place.right}" y1="${place.top}" y2="${place.top}" stroke="${rule}"/>`;
  const labels = mark`<text x="${place.left}" y="17" fill="${ink}" font-weight="600">${fitText(patch.name, 13, size.width - 12)}</text><text x="${place.right + 5}" y="${place.top + 4}" font-size="12" fill="${softInk}">${plain(top)}</text><text x="${place.right + 5}" y="${place.bottom + 4}" font-size="12" fill="${softInk}">0</text><text x="${place.left}" y="${size.height - 5}" font-size="12" fill="${softInk}">${String(pick(years, 0))}</text><text x="${place.right}" y="${size.height - 5}" font-size="12" text-anchor="end" fill="${softInk}">${String(pick(years, last))}</text>`;
  const content = mark`${frame}${bands(place, years, patch.fan)}${labels}${cursor(place, marked)}`;
  return figure(size, words(patch, years), content);
}

function words(patch: PatchView, years: Series) {
  const last = years.length - 1;
  const end = `In ${pick(years, last)}, 90 of 100 futures lie between ${whole(pick(patch.fan.p05, last))} and ${whole(pick(patch.fan.p95, last))}, the middle at ${whole(pick(patch.fan.median, last))}`;
  return {
    title: `Abundance in ${patch.name}`,
    description: `${end}; at the start it is ${whole(pick(patch.fan.median, 0))}.`,
  };
}
