// A scale bar in round kilometres, alternating as on survey sheets.
import { mark, type Markup } from '../markup.ts';
import { ink, paper } from '../palette.ts';
import { roundDown } from '../number.ts';

export function scaleBar(pixelsPerKm: number, x: number, y: number, room: number): Markup {
  const km = roundDown(room / pixelsPerKm);
  const quarter = (km * pixelsPerKm) / 4;
  const blocks = [0, 1, 2, 3].map(
    (i) =>
      mark`<rect x="${x + i * quarter}" y="${y}" width="${quarter}" height="5" fill="${i % 2 === 0 ? ink : paper}" stroke="${ink}" stroke-width="0.75"/>`,
  );
  return mark`<g>${blocks}<text x="${x}" y="${y + 19}" font-size="12" fill="${ink}">0</text><text x="${x + quarter * 4}" y="${y + 19}" font-size="12" text-anchor="middle" fill="${ink}">${kilometres(km)}</text></g>`;
}

function kilometres(km: number): string {
  return km >= 1 ? `${km} km` : `${Math.round(km * 1000)} m`;
}
