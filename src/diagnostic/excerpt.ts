// The line of a mistake with a caret beneath it, cut to the width of the terminal.
import type { Place } from './diagnostic.ts';
import { visible, visibleCharacter, widthOf } from './visible.ts';

export interface Excerpt {
  readonly line: string;
  readonly carets: string;
}

/** Longer lines are only looked at around the mistake. */
const looked = 2_000;

export function excerptOf(place: Place, width: number): Excerpt {
  const from = Math.max(0, place.column - 1);
  const head = visible(place.text.slice(Math.max(0, from - looked), from));
  const marked = visible(place.text.slice(from, from + Math.min(place.length, looked)));
  const tail = visible(place.text.slice(from + Math.min(place.length, looked), from + 2 * looked));
  const shownMark = fitting(marked, Math.max(1, width - 2), 'start');
  const room = Math.max(0, width - widthOf(shownMark) - 2);
  const shownTail = fitting(tail, Math.max(Math.floor(room / 2), room - widthOf(head)), 'start');
  const shownHead = fitting(head, room - widthOf(shownTail), 'end');
  return {
    line: shownHead + shownMark + shownTail,
    carets: ' '.repeat(widthOf(shownHead)) + '^'.repeat(Math.max(1, widthOf(shownMark))),
  };
}

/** As much of the start or the end as fits, with an ellipsis in place of the rest. */
function fitting(text: string, width: number, keep: 'start' | 'end'): string {
  if (widthOf(text) <= width) return text;
  const characters = [...text];
  if (keep === 'end') characters.reverse();
  const kept: string[] = [];
  let used = 1;
  for (const character of characters) {
    used += widthOf(visibleCharacter(character));
    if (used > width) break;
    kept.push(character);
  }
  return keep === 'start' ? `${kept.join('')}…` : `…${kept.reverse().join('')}`;
}
