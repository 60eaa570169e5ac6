// Would another sound model reverse the order of the plans?
import type { Comparison } from '../../compare/results.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { drawTable, type Row } from '../../view/table.ts';
import { robustWords, variantWords } from '../compare/robust-words.ts';
import { section } from '../section/section.ts';

export function robustSection({ robustness }: Comparison): Markup {
  const none = mark`<p>Other sound models were not run: <code>skein compare --robust</code> asks the other answer to where leavers end, another correlation between patches, another form of crowding, a second threshold, and plans that do less than is hoped.</p>`;
  if (robustness.length === 0) return section('robust', 'Would another sound model reverse it?', none);
  const rows = robustness.map((one): Row => [
    one.variant,
    one.what,
    one.holds === null ? 'not run' : one.holds ? 'holds' : 'does not hold',
    variantWords(one),
  ]);
  const table = drawTable({
    caption: 'Other models, each as sound as this one',
    head: ['model', 'what is different', 'order', 'what comes of it'],
    rows,
    words: [1, 2, 3],
  });
  return section('robust', 'Would another sound model reverse it?', mark`<p>${robustWords(robustness)}</p>${table}`);
}
