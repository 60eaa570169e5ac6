// Paired differences: what each plan changes in the same futures, with its interval, and whether plans can be told apart.
import type { Comparison, ObjectiveWords, PlanDifference } from '../../compare/results.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { plain } from '../../view/number.ts';
import { drawWhiskers, type Whisker, type WhiskerChart } from '../../view/plans/whiskers.ts';
import { drawTable, type Row } from '../../view/table.ts';
import { between, change, unknownWords } from '../compare/words.ts';
import { section } from '../section/section.ts';

const widths = { wide: 720, narrow: 340 } as const;

export function differencesSection(comparison: Comparison): Markup | null {
  const [objective] = comparison.objectives;
  if (objective === undefined) return null;
  return section(
    'differences',
    'What the plans change',
    mark`<p>Each row is one plan less “<bdi>${comparison.scenarios[0]?.name ?? ''}</bdi>” in the same futures: what luck they share cancels. The line is the 95\u00a0% interval
from the number of runs${drawn(comparison) ? ', the dashed one that from what is not known' : ''}; the dot is filled where the two can be told apart.</p>
${chartFigure(comparison, objective)}`,
  );
}

/** Everything else that the plans change. */
export function moreDifferences(comparison: Comparison): Markup {
  const chances = comparison.objectives.slice(1).filter(({ of }) => of === 'chance');
  return section(
    'more-differences',
    'All differences',
    mark`${chances.map((objective) => chartFigure(comparison, objective))}
<details class="tables"><summary>All differences between any two plans as a table</summary>${table(comparison)}</details>`,
  );
}

function drawn({ differences }: Comparison): boolean {
  return differences.some(({ intervalFromUnknown }) => intervalFromUnknown !== null);
}

function chartFigure(comparison: Comparison, objective: ObjectiveWords): Markup {
  const chart = chartOf(comparison, objective);
  return mark`<figure class="still"><h3><bdi>${objective.name}</bdi></h3>
<div class="wide">${drawWhiskers(chart, widths.wide)}</div><div class="narrow">${drawWhiskers(chart, widths.narrow)}</div></figure>`;
}

function chartOf({ differences, scenarios }: Comparison, { name, of, better }: ObjectiveWords): WhiskerChart {
  const base = scenarios[0]?.name ?? '';
  const scale = of === 'chance' ? 100 : 1;
  const rows = differences.filter((one) => one.outcome === name && one.from === base).map((one) => rowOf(one, scale));
  const unit = of === 'chance' ? 'of 100 futures' : of;
  const [good, bad] = ['better', 'worse'];
  const left = better === 'less' ? good : bad;
  const words = rows.map(
    ({ label, estimate, lower, upper }) =>
      `${label}: ${estimate.toFixed(1)} (${lower.toFixed(1)} to ${upper.toFixed(1)})`,
  );
  return {
    title: `What each plan changes in ${name}`,
    description: `Against ${base}, ${unit}. ${words.join('; ')}.`,
    less: `fewer ${unit}, ${left}`,
    more: `more ${unit}, ${left === good ? bad : good}`,
    rows,
    write: (value) => (value > 0 ? `+${plain(value)}` : value < 0 ? `−${plain(-value)}` : '0'),
  };
}

function rowOf({ to, estimate, interval, intervalFromUnknown, toldApart }: PlanDifference, scale: number): Whisker {
  return {
    label: to,
    estimate: estimate * scale,
    lower: interval.lower * scale,
    upper: interval.upper * scale,
    outer: intervalFromUnknown === null ? null : [intervalFromUnknown.lower * scale, intervalFromUnknown.upper * scale],
    apart: toldApart,
  };
}

function table({ differences }: Comparison): Markup {
  const rows = differences.map((one): Row => {
    const { futures } = one;
    const apart = futures === null ? '' : `${plain(futures.onlyFrom)} / ${plain(futures.onlyTo)}`;
    const unknown = unknownWords(one);
    return [
      one.outcome,
      mark`<bdi>${one.to}</bdi> less <bdi>${one.from}</bdi>`,
      change(one),
      between(one.of, one.interval),
      unknown,
      apart,
      one.toldApart ? 'yes' : 'no',
    ];
  });
  const head = [
    'outcome',
    'plans',
    'difference',
    '95 % from runs',
    '95 % from unknown',
    'futures with it under the second / the first only',
    'told apart',
  ];
  return drawTable({ caption: 'Chances in points of a hundred', head, rows, words: [1] });
}
