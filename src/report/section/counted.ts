// What was counted in the past over what the futures have of the same classes: how many counts lie outside, and by how much
// one would expect to.
import type { ObservedResult } from '../../results/results.ts';
import type { ReportView } from '../../view/contract.ts';
import { drawObserved } from '../../view/observed.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { plain, whole } from '../../view/number.ts';
import { drawSmallFan } from '../../view/small-fan.ts';
import { drawTable, type Row } from '../../view/table.ts';

const sizes = {
  wide: { width: 720, height: 320 },
  narrow: { width: 340, height: 340 },
  small: { width: 172, height: 130 },
} as const;

/** Null where nothing was counted. */
export function countedPart(view: ReportView, result: ObservedResult | undefined): Markup | null {
  const { observed } = view;
  if (observed === undefined || result === undefined) return null;
  const big = (['wide', 'narrow'] as const).map(
    (size) =>
      mark`<div class="${size}" data-figure="observed">${drawObserved(view, observed, null, sizes[size])}</div>`,
  );
  const smalls = observed.patches.map((patch, i) => {
    const picture = drawSmallFan(patch, view.years, null, sizes.small);
    return mark`<div data-figure="observed-small" data-index="${String(i)}">${picture}</div>`;
  });
  const table = drawTable({ caption: `Counts of ${observed.classes}`, head: heads, rows: rows(result), words: [2, 4] });
  return mark`<h3 id="counted">Against what was counted</h3><p>${outsideWords(result)}</p>
<figure class="chart">${big}</figure>
<div class="smalls">${smalls}</div>
<details class="tables"><summary>The counts as a table</summary>${table}</details>`;
}

/** Of counts of single patches. */
export function outsideWords({ compared, outside, beyondError, counts }: ObservedResult): string {
  const single = counts.filter(({ patch }) => patch !== null).length;
  if (compared === 0) {
    const all = `${plain(single)} ${single === 1 ? 'count is' : 'counts are'}`;
    return `The ${all} from years that the model does not run through, so nothing here was tested: they show where the
futures set out from. A model whose first year lies before the counts can be held against them.`.replaceAll('\n', ' ');
  }
  const expected = `if the model were right and counts exact, about one in ten would`;
  const error =
    beyondError === null
      ? 'How exact the counts are was not said; counts that are not exact lie outside more often.'
      : `${plain(beyondError)} of them ${beyondError === 1 ? 'does' : 'do'} so with all of the 95 % interval of the count itself.`;
  return `${plain(outside)} of ${plain(compared)} counts in single patches lie outside the band of 90 of 100 futures; ${expected}. ${error}`;
}

const heads = ['patch', 'year', 'where it lies', 'counted', 'with its own interval'];

const lying = {
  below: 'below the band',
  within: 'within the band',
  above: 'above the band',
} as const;

function rows({ counts }: ObservedResult): readonly Row[] {
  return counts.map(({ patch, year, animals, lies, beyondError }) => [
    patch ?? 'all counted patches',
    String(year),
    lies === null ? 'not in a year of the model' : lying[lies],
    whole(animals),
    beyondError === null ? '' : beyondError ? 'outside' : 'reaches the band',
  ]);
}
