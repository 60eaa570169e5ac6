// The chance of one plan by year, small, over that of the plan which all are set beside, on one scale for all plans.
import type { OutcomeView, PlanView, ReportView, Series, Size } from '../contract.ts';
import { cursor, plot } from '../axes.ts';
import { course, ribbon } from '../fan.ts';
import { figure, fitText } from '../figure.ts';
import { mark, type Markup } from '../markup.ts';
import { of100, plain } from '../number.ts';
import { deep, ink, rule, softInk, tint, umber } from '../palette.ts';
import { largest, pick } from '../series.ts';

export interface SmallChance {
  readonly plan: string;
  readonly outcome: OutcomeView;
  /** Null for the plan that all are set beside itself. */
  readonly beside: { readonly plan: string; readonly outcome: OutcomeView } | null;
  readonly years: Series;
  /** The upper end of the scale, of 100. */
  readonly most: number;
  readonly marked: number | null;
}

interface Which {
  /** Places among the plans and among the outcomes. */
  readonly plan: number;
  readonly outcome: number;
  readonly marked: number | null;
}

/** All plans share one scale. */
export function smallChanceOf(
  view: ReportView,
  plans: readonly PlanView[],
  { plan, outcome, marked }: Which,
): SmallChance {
  const own = pick(plans, plan);
  const first = pick(plans, 0);
  const uppers = plans.map((one) => largest(pick(one.view.outcomes, outcome).upper) * 100);
  return {
    plan: own.name,
    outcome: pick(own.view.outcomes, outcome),
    beside: plan === 0 ? null : { plan: first.name, outcome: pick(first.view.outcomes, outcome) },
    years: view.years,
    most: Math.max(2, ...uppers),
    marked,
  };
}

export function drawSmallChance(chart: SmallChance, size: Size): Markup {
  const { plan, outcome, beside, years, most, marked } = chart;
  const place = plot(size, { top: 44, right: 36, bottom: 22, left: 6 }, years, most);
  const { left, right, top, bottom } = place;
  const seen = years.slice(outcome.first);
  const of = (series: Series): Series => series.slice(outcome.first).map((chance) => chance * 100);
  const at = marked ?? years.length - 1;
  const year = pick(years, at);
  const frame = mark`<line x1="${left}" x2="${right}" y1="${bottom}" y2="${bottom}" stroke="${ink}"/>
<line x1="${left}" x2="${right}" y1="${top}" y2="${top}" stroke="${rule}"/>`;
  const other =
    beside === null
      ? null
      : mark`<path d="${course(place, seen, of(beside.outcome.ever))}" fill="none" stroke="${umber}" stroke-width="1.5" stroke-dasharray="2 3"/>`;
  const curves = mark`<path d="${ribbon(place, seen, of(outcome.lower), of(outcome.upper))}" fill="${tint}"/>${other}
<path d="${course(place, seen, of(outcome.ever))}" fill="none" stroke="${deep}" stroke-width="2.25"/>`;
  const labels = mark`<text x="${left}" y="16" fill="${ink}" font-weight="600">${fitText(plan, 13.5, size.width - 12)}</text>
<text x="${left}" y="34" font-size="12" fill="${deep}">${of100(pick(outcome.ever, at))} of 100 by ${String(year)}</text>
<g font-size="12" fill="${softInk}"><text x="${right + 5}" y="${top + 4}">${plain(pick(place.y.domain(), 1))}</text><text x="${right + 5}" y="${bottom + 4}">0</text>
<text x="${left}" y="${size.height - 5}">${String(pick(years, 0))}</text><text x="${right}" y="${size.height - 5}" text-anchor="end">${String(pick(years, years.length - 1))}</text></g>`;
  const description = `${of100(pick(outcome.ever, at))} of 100 futures by ${year}${beside === null ? '' : `, against ${of100(pick(beside.outcome.ever, at))} under ${beside.plan}`}.`;
  const words = { title: `Chance of ${outcome.name} under ${plan}`, description };
  return figure(size, words, mark`${frame}${curves}${labels}${cursor(place, marked === null ? null : year)}`, {
    years: [left, right],
  });
}
