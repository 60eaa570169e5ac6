// A hundred futures as a hundred small marks: filled where the thing happens, hollow where it does not.
import type { Size } from './contract.ts';
import { figure } from './figure.ts';
import { mark, type Markup } from './markup.ts';
import { of100 } from './number.ts';
import { deep } from './palette.ts';

const columns = 20;
const step = 17;

/** `what` completes 'of 100 futures, 12 …'. */
export function drawFutures(chance: number, what: string): Markup {
  const size: Size = { width: columns * step, height: 5 * step };
  const filled = Math.round(chance * 100);
  const half = filled === 0 && chance > 0;
  const marks = Array.from({ length: 100 }, (_, i) => one(i, i < filled, half && i === 0));
  return figure(size, { title: 'A hundred futures', description: `Of 100 futures, ${of100(chance)} ${what}` }, marks);
}

function one(index: number, filled: boolean, dot: boolean): Markup {
  const x = (index % columns) * step + step / 2;
  const y = Math.floor(index / columns) * step + step / 2;
  const core = dot ? mark`<circle cx="${x}" cy="${y}" r="2" fill="${deep}"/>` : null;
  return mark`<circle cx="${x}" cy="${y}" r="5.5" fill="${filled ? deep : 'none'}" stroke="${deep}" stroke-width="1.25"/>${core}`;
}
