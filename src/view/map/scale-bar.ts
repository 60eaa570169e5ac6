// A scale bar in round kilometres, alternating as on survey sheets.
import { mark, type Markup } from '../markup.ts';
import { ink, paper } from '../palette.ts';
import { roundDown } from '../number.ts';

export function scaleBar(pixelsPerKm: number, x: number, y: number, room: number): Markup {
  const km = roundDown(room / pixelsPerKm);
  const length = km * pixelsPerKm;
  const blocks = [0, 1, 2, 3].map((i) => {
    const fill = i % 2 === 0 ? ink : paper;
    return mark`<rect x="${x + (i * length) / 4}" y="${y}" width="${length / 4}" height="5" fill="${fill}"/>`;
  });
  return mark`<g font-size="12" fill="${ink}"><g stroke="${ink}" stroke-width="0.75">${blocks}</g>
<text x="${x}" y="${y + 19}">0</text><text x="${x + length}" y="${y + 19}" text-anchor="middle">${kilometres(km)}</text></g>`;
}

function kilometres(km: number): string {
  return km >= 1 ? `${km} km` : `${Math.round(km * 1000)} m`;
}
