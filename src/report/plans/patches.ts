// Who gains and who loses among the patches under a plan.
import type { Comparison } from '../../compare/results.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { plain } from '../../view/number.ts';
import { drawWhiskers } from '../../view/plans/whiskers.ts';
import { drawTable, type Row } from '../../view/table.ts';
import { between, change, seenChance } from '../compare/words.ts';
import { section } from '../section/section.ts';

const widths = { wide: 720, narrow: 340 } as const;
/** More rows than a reader can take in at once go into the table alone. */
const mostRows = 14;

export function patchesSection(comparison: Comparison, chosen: string, animals: string): Markup | null {
  const own = comparison.patches.filter(({ scenario }) => scenario === chosen);
  if (own.length === 0) return null;
  const base = comparison.scenarios[0]?.name ?? '';
  const shown = own.toSorted((a, b) => Math.abs(b.animals.estimate) - Math.abs(a.animals.estimate)).slice(0, mostRows);
  const chart = {
    title: `Patches that gain and lose under ${chosen}`,
    description: `Mean ${animals} at the end against ${base}: ${shown.map((one) => `${one.patch} ${change({ of: 'animals', estimate: one.animals.estimate })}`).join('; ')}.`,
    less: `fewer ${animals}`,
    more: `more ${animals}`,
    rows: shown.map(({ patch, animals: found }) => ({
      label: patch,
      ...found,
      outer: null,
      apart: found.lower > 0 || found.upper < 0,
    })),
    write: (value: number) => (value > 0 ? `+${plain(value)}` : value < 0 ? `−${plain(-value)}` : '0'),
  };
  const left = own.length > shown.length ? ` The ${shown.length} that change most of ${own.length}.` : '';
  return section(
    'patches',
    'Who gains and who loses',
    mark`<figure class="still"><div class="wide">${drawWhiskers(chart, widths.wide)}</div><div class="narrow">${drawWhiskers(chart, widths.narrow)}</div>
<figcaption>“<bdi>${chosen}</bdi>” less “<bdi>${base}</bdi>” at the last count, in the same futures, with 95\u00a0% intervals from the number of runs.${left}</figcaption></figure>
<details class="tables"><summary>Every plan and patch as a table</summary>${table(comparison)}</details>`,
  );
}

function table({ patches, replicates }: Pick<Comparison, 'patches' | 'replicates'>): Markup {
  const rows = patches.map(({ patch, scenario, animals, everEmpty, everEmptyChange }): Row => [
    patch,
    mark`<bdi>${scenario}</bdi>`,
    change({ of: 'animals', estimate: animals.estimate }),
    between('animals', animals),
    seenChance(everEmpty.before, replicates),
    seenChance(everEmpty.after, replicates),
    between('chance', everEmptyChange),
  ]);
  const head = [
    'patch',
    'plan',
    'animals at the end',
    '95 %',
    'ever empty before',
    'ever empty with the plan',
    'difference in points, 95 %',
  ];
  return drawTable({ caption: 'Patches under each plan', head, rows, words: [1] });
}
