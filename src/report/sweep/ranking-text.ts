// Which plan is best where, in a terminal: the answer in a sentence, the plans, and where the best one changes.
import { namesWords } from '../../compare/words.ts';
import type { FactorRanking, Ranking } from '../../sweep/summary/ranking.ts';
import type { QuantitySummary, SweepSummary } from '../../sweep/summary/summarise.ts';
import { percent } from '../../view/number.ts';
import { fittedColumns } from '../fitted-columns.ts';
import { bold, wrap } from '../terminal.ts';
import type { SweepTextStyle } from './style.ts';
import { numberText, preferredWords } from './words.ts';

/** Numbers of which it is said where the best plan changes, unless all are asked for. */
const fewNumbers = 5;

export function rankingText(ranking: Ranking, summary: SweepSummary, style: SweepTextStyle): string {
  const { quantity, better, factors, told } = ranking;
  const head = wrap(`best by ${quantity} (${better} is better)`, style)
    .split('\n')
    .map((line) => bold(line, style))
    .join('\n');
  if (factors.every(({ groups }) => groups.every(({ best }) => areEqual(best))))
    return [head, 'no scenario differs from another by it'].join('\n');
  const shown = style.details ? factors : factors.slice(0, fewNumbers);
  return [
    head,
    wrap(answer(ranking, style), style),
    plansTable(ranking, summary, style),
    ...(told === 0 && !style.details
      ? [wrap('Where the best plan changes is not told by so few runs: take more `--replicates`.', style)]
      : shown.map((factor) => wrap(`over ${factor.name}${changeWords(factor)}`, style))),
    ...(told > 0 && shown.length < factors.length ? [`and over ${factors.length - shown.length} more numbers`] : []),
  ].join('\n');
}

function answer({ scenarios, points, told, agree }: Ranking, { details }: SweepTextStyle): string {
  const most = Math.max(...scenarios.map(({ best }) => best));
  const first = scenarios.filter(({ best }) => best === most).map(({ name }) => name);
  const each = first.length > 1 ? ' each' : '';
  const best = `${namesWords(first)}${each} at ${percent(most)} of ${points.toLocaleString('en')} points`;
  const sure =
    told === points || told === 0
      ? `at ${told === 0 ? 'none' : 'all'} of them the best is told apart from all others`
      : `at ${told.toLocaleString('en')} of them the best is told apart from all others, at ${(points - told).toLocaleString('en')} it is not`;
  const halves = agree === null || !details ? '' : `; both halves of the runs name the same one at ${percent(agree)}`;
  return `${best}; ${sure}${halves}. Changes are against “${scenarios[0]?.name ?? ''}”`;
}

/** Beside the first plan, what the others change at the points. */
function plansTable(
  { quantity, better, scenarios, points }: Ranking,
  summary: SweepSummary,
  style: SweepTextStyle,
): string {
  const base = scenarios[0]?.name ?? '';
  const changes = scenarios.map(({ name }): QuantitySummary | undefined =>
    summary.quantities.find((one) => one.name === `${quantity} [${name} less ${base}]`),
  );
  const isTold = changes.some((one) => one !== undefined && one.told !== null);
  const share = (count: number): string => percent(count / points);
  const rows = scenarios.map(({ name, best, toldBest }, s) => {
    const change = changes[s];
    const { above = 0, below = 0 } = change?.told ?? {};
    const [good, bad] = better === 'more' ? [above, below] : [below, above];
    const versus = change === undefined ? ['', ''] : [share(good), share(bad)];
    return [
      name,
      percent(best),
      percent(toldBest),
      change === undefined ? '' : numberText(change.mean, change.unit),
      ...(isTold ? versus : []),
    ];
  });
  const head = ['plan', 'best at', 'told best at', 'mean change'];
  return fittedColumns([...head, ...(isTold ? ['told better', 'told worse'] : [])], rows, style);
}

/** What a number that decides nothing does from one value to the next is chance. */
function changeWords(factor: FactorRanking): string {
  const { decides } = factor;
  if (decides === 0) return ': it decides nothing by itself';
  return `${decides === null ? '' : `, which decides ${percent(decides)} of it`}: ${preferredWords(factor)}`;
}

function areEqual(shares: readonly number[]): boolean {
  return shares.every((share) => Math.abs(share * shares.length - 1) < 1e-9);
}
