// What a sweep says in a terminal: which plan is best where, or for each measure its range and what matters most, the answer first.
import { toldAssumes } from '../../sweep/summary/assumptions.ts';
import type { SweepSummary } from '../../sweep/summary/summarise.ts';
import { bold, dim, joinBlocks, printable, wrap } from '../terminal.ts';
import { quantityText } from './quantity-text.ts';
import { rankingText } from './ranking-text.ts';
import type { SweepTextStyle } from './style.ts';
import { andRuns, withUnit } from './words.ts';

export function sweepText(summary: SweepSummary, style: SweepTextStyle): string {
  const { model, points, design, failed, quantities, rankings, assumptions } = summary;
  const swept = summary.factors.map(({ name }) => withUnit(name, summary));
  // Of plans, which is best where comes first, and all else is for those who ask.
  const isShort = rankings.length > 0 && !style.details;
  const taken = isShort ? assumptions.filter((text) => text === toldAssumes) : assumptions;
  return joinBlocks([
    bold(printable(model), style),
    wrap(`${points.toLocaleString('en')} points (${design})${andRuns(summary)}, over ${swept.join(', ')}`, style),
    failed.points === 0 ? '' : failedText(summary, style),
    ...rankings.map((ranking) => rankingText(ranking, summary, style)),
    ...(isShort ? [] : quantities.map((quantity) => quantityText(quantity, summary, style))),
    ...taken.map((text) => wrap(text, style)),
    dim(`skein ${summary.tool.version}, kernel ${summary.tool.kernel}, hash ${summary.hash.slice(0, 12)}`, style),
    isShort ? dim(wrap(more, style), style) : '',
  ]);
}

const more =
  'With `--details`: every measure under every plan, what matters most for it, and what these numbers take for granted.';

function failedText({ failed, points }: SweepSummary, style: SweepTextStyle): string {
  const most = failed.reasons.toSorted((a, b) => b.points - a.points).slice(0, 5);
  const head = `${failed.points.toLocaleString('en')} of ${points.toLocaleString('en')} points are models that cannot be, and have no numbers:`;
  return [
    wrap(head, style),
    ...most.map((one) => wrap(`${one.reason} (${one.points.toLocaleString('en')})`, style, '  ')),
  ].join('\n');
}
