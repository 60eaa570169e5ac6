// Numbers of a comparison as readers meet them, the same in a terminal and on the page.
import type { Comparison, ComparedPlan, PlanCost, PlanDifference, RiskPrice } from '../../compare/results.ts';
import { wilson } from '../../results/wilson.ts';
import { percent, plain, whole } from '../../view/number.ts';

export function moneyOf(amount: number, { money }: Pick<Comparison, 'money'>): string {
  return `${amount < 0 ? '−' : ''}${plain(Math.abs(amount))}${money === null ? '' : ` ${money.currency}`}`;
}

/** The middle, and the range where prices are ranges. */
export function costWords({ presentValue, least, most }: PlanCost): string {
  return least === most ? plain(presentValue) : `${plain(presentValue)} (${plain(least)} to ${plain(most)})`;
}

/** More or less, with its sign; `points` for chances. */
export function change({ of, estimate }: Pick<PlanDifference, 'of' | 'estimate'>): string {
  if (estimate === 0) return 'none';
  if (of === 'animals' && Math.abs(estimate) < 0.5) return `${estimate < 0 ? 'less' : 'more'} by fewer than 1`;
  return `${estimate < 0 ? '−' : '+'}${amount(of, Math.abs(estimate))}`;
}

/** A chance and its interval, of a hundred futures; of one that was never seen, how far it may still reach. */
export function chanceWords(probability: number, runs: { readonly lower: number; readonly upper: number }): string {
  if (probability === 0) return `0 (at most ${bare(runs.upper)})`;
  return `${bare(probability)} (${rangeWords(runs)})`;
}

export function rangeWords({ lower, upper }: { readonly lower: number; readonly upper: number }): string {
  return `${bare(lower)}–${bare(upper)}`;
}

function bare(share: number): string {
  return percent(share).replace(/\s?%$/u, '');
}

/** In which money costs are, and what 'now' means. */
export function moneyWords({ currency, priceYear, discount }: NonNullable<Comparison['money']>): string {
  const prices = priceYear === null ? '' : ` at prices of ${priceYear}`;
  return `Costs are in ${currency}${prices}, means over the futures; 'cost now' is discounted by ${percent(discount)} a year, the first year not.`;
}

/** A chance seen in so many futures; where none showed it, how far it may still reach (95 %, Wilson 1927). */
export function seenChance(chance: number, futures: number): string {
  return chance === 0 ? `0\u00a0% (at most ${percent(wilson(0, futures).upper)})` : percent(chance);
}

function amount(of: PlanDifference['of'], value: number): string {
  if (of === 'chance') return `${(value * 100).toFixed(1)}`;
  return of === 'money' ? plain(value) : whole(value);
}

export function between(
  of: PlanDifference['of'],
  { lower, upper }: { readonly lower: number; readonly upper: number },
): string {
  if (!Number.isFinite(lower) || !Number.isFinite(upper)) return 'not known';
  return `${signed(of, lower)} to ${signed(of, upper)}`;
}

/** Whether what is not known was drawn, be it that there is no interval from it. */
export function isDrawn({ intervalFromUnknown, noUnknown }: PlanDifference): boolean {
  return intervalFromUnknown !== null || noUnknown !== undefined;
}

/** The interval from what is not known, or why there is none. */
export function unknownWords({ of, intervalFromUnknown, noUnknown }: PlanDifference): string {
  return intervalFromUnknown === null ? (noUnknown ?? '') : between(of, intervalFromUnknown);
}

/** What a plan is beaten in by another that is as good in all of it and better in one. */
export function beatenIn({ objectives }: Pick<Comparison, 'objectives'>): string {
  const deciding = objectives.filter(({ decides }) => decides);
  const what = [
    ...(deciding.some(({ of }) => of === 'chance') ? ['risks'] : []),
    ...(deciding.some(({ of }) => of === 'animals') ? ['animals at the end'] : []),
    ...(deciding.some(({ of }) => of === 'money') ? ['cost'] : []),
  ];
  return `beaten in ${what.join(' and ')}`;
}

/** Whether all plans have the same number. */
export function areAlike({ best }: Pick<Comparison, 'best'>, { name }: { readonly name: string }): boolean {
  const own = best.filter(({ outcome }) => outcome === name);
  return own.every(({ probability }) => Math.abs(probability * own.length - 1) < 1e-9);
}

function signed(of: PlanDifference['of'], value: number): string {
  const small = of === 'animals' && Math.abs(value) < 0.5;
  const rounded = small ? Math.abs(value).toFixed(1) : amount(of, Math.abs(value));
  return /^0(\.0+)?$/.test(rounded) ? rounded : `${value < 0 ? '−' : '+'}${rounded}`;
}

/** For a chance of one in a hundred less, which is a step that a reader can picture. */
export function priceWords({ costPerRisk, why }: RiskPrice, comparison: Pick<Comparison, 'money'>): string {
  if (costPerRisk === null) return why;
  const [least, most] = [costPerRisk.lower / 100, costPerRisk.upper / 100];
  return `${moneyOf(costPerRisk.estimate / 100, comparison)} (${plain(least)} to ${plain(most)})`;
}

/** What such a price is of: less of what is feared, more of what is hoped for. */
export function priceOfWords({ scenarios, objectives, money }: Comparison): string {
  const hoped = objectives
    .filter(({ of, better }) => of === 'chance' && better === 'more')
    .map(({ name }) => `“${name}”`);
  const feared = objectives.some(({ of, better }) => of === 'chance' && better === 'less');
  const what = !feared ? 'more' : hoped.length === 0 ? 'less' : `less (in ${hoped.join(', ')}: more)`;
  return `What one chance in a hundred ${what} than under “${scenarios[0]?.name ?? ''}” costs now, in ${money?.currency ?? ''}`;
}

export function shareOf100(share: number): string {
  const futures = share * 100;
  if (futures > 0 && futures < 0.5) return 'fewer than 1';
  if (futures < 100 && futures > 99.5) return 'more than 99';
  return String(Math.round(futures));
}

/** Whether it is rising or falling when the run ends. */
export function courseWords({ changeAtEnd, animalsAtEnd }: ComparedPlan): string {
  const share = animalsAtEnd.mean === 0 ? 0 : changeAtEnd / animalsAtEnd.mean;
  if (Math.abs(share) < 0.001) return 'steady';
  return `${share < 0 ? 'falling' : 'rising'} by ${(Math.abs(share) * 100).toFixed(1)}\u00a0% a year`;
}

/** Of 100, how often a plan is best in an outcome: with other futures, and over the draws where there are any. */
export function bestWords({ best }: Comparison, outcome: string, plan: string): string {
  const found = best.find((one) => one.outcome === outcome && one.scenario === plan);
  if (found === undefined) return '';
  const over = found.probabilityOverDraws === null ? '' : ` / ${shareOf100(found.probabilityOverDraws)}`;
  return `${shareOf100(found.probability)}${over}`;
}
