// Movement on the map: the ways that animals can go, and bands for those that go.
import { mark, type Markup } from '../markup.ts';
import { softInk, umber } from '../palette.ts';
import { pick } from '../series.ts';
import { bandPath } from './band.ts';
import { reachOf } from './shape.ts';
import type { Sheet } from './sheet.ts';
import { linkLine } from './words.ts';

export function drawWays({ view, placing }: Sheet): Markup {
  const pairs = new Map(view.links.map((link) => [[link.from, link.to].sort((a, b) => a - b).join(), link]));
  const path = [...pairs.values()]
    .map((link) => {
      const [a, b] = [pick(placing.points, link.from), pick(placing.points, link.to)];
      return `M${a[0].toFixed(1)} ${a[1].toFixed(1)}L${b[0].toFixed(1)} ${b[1].toFixed(1)}`;
    })
    .join('');
  return mark`<path d="${path}" fill="none" stroke="${softInk}" stroke-opacity="0.55" stroke-dasharray="1 4" stroke-linecap="round"/>`;
}

export function drawBands({ view, state, placing, marks, flows }: Sheet): Markup {
  const bands = view.links.map((link, index) => {
    const width = flows.most > 0 ? (flows.widest * pick(link.animals, state.count)) / flows.most : 0;
    const ends = {
      from: pick(placing.points, link.from),
      to: pick(placing.points, link.to),
      fromRadius: reachOf(pick(marks.shapes, link.from), pick(placing.points, link.to)),
      toRadius: reachOf(pick(marks.shapes, link.to), pick(placing.points, link.from)),
    };
    const path = width < 0.15 ? '' : bandPath(ends, width);
    return mark`<path data-link="${String(index)}" d="${path}"><title>${linkLine(view, link, state.count)}</title></path>`;
  });
  return mark`<g fill="${umber}" fill-opacity="0.6">${bands}</g>`;
}
