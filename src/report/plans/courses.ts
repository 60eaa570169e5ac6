// Small multiples: the chance of the first outcome by year under each plan, on one scale.
import type { ReportView } from '../../view/contract.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { drawSmallChance, smallChanceOf } from '../../view/plans/small-chance.ts';
import { section } from '../section/section.ts';

const size = { width: 228, height: 160 } as const;

export function planCourses(view: ReportView): Markup | null {
  const { plans = [], outcomes } = view;
  const [outcome] = outcomes;
  const base = plans[0]?.name;
  if (outcome === undefined || base === undefined) return null;
  const pictures = plans.map((_, plan) => {
    const chart = smallChanceOf(view, plans, { plan, outcome: 0, marked: null });
    return mark`<div data-figure="small-chance" data-outcome="0" data-index="${String(plan)}">${drawSmallChance(chart, size)}</div>`;
  });
  return section(
    'chances',
    'Chances by year',
    mark`<p>Futures of 100 that have come to “<bdi>${outcome.name}</bdi>” by each year, all on one scale, with a band that holds for the whole curve at once; dotted: “<bdi>${base}</bdi>”.</p>
<div class="smalls plans">${pictures}</div>`,
  );
}
