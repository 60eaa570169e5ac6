// Money against risk.
import type { Comparison } from '../../compare/results.ts';
import { notBeaten, stepsUp } from '../../compare/worth-the-money.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { plain } from '../../view/number.ts';
import { drawCostRisk } from '../../view/plans/cost-risk.ts';
import { section } from '../section/section.ts';
import { chanceOf } from './answer.ts';
import { priceTable } from './table.ts';

const sizes = { wide: { width: 720, height: 330 }, narrow: { width: 340, height: 320 } } as const;

export function moneySection(comparison: Comparison): Markup | null {
  const { money, objectives, scenarios } = comparison;
  const [objective] = objectives;
  if (money === null || objective?.of !== 'chance') return null;
  if (objective.better !== 'less') return section('money', 'What a gain costs', priceTable(comparison));
  const both = scenarios.map((plan) => ({ cost: plan.cost?.presentValue ?? 0, risk: chanceOf(plan, objective.name) }));
  const free = notBeaten(both);
  const plans = scenarios.map((plan, i) => {
    const runs = plan.outcomes.find(({ name }) => name === objective.name)?.intervals.runs;
    const { cost = 0, risk = 0 } = both[i] ?? {};
    return {
      name: plan.name,
      cost,
      risk,
      lower: runs?.lower ?? risk,
      upper: runs?.upper ?? risk,
      notBeaten: free[i] ?? false,
    };
  });
  const chart = { outcome: objective.name, currency: money.currency, plans };
  const figure = mark`<figure class="still"><div class="wide">${drawCostRisk(chart, sizes.wide)}</div><div class="narrow">${drawCostRisk(chart, sizes.narrow)}</div>
<figcaption>Costs now, with prices that are ranges at their middle. Filled: no other plan has both no higher cost and no higher chance. The upright lines are intervals of each chance by itself; whether two plans differ is told by the paired differences, not by whether these overlap.</figcaption></figure>`;
  return section('money', 'Cost against risk', mark`${figure}${steps(comparison, both)}${priceTable(comparison)}`);
}

function steps({ scenarios, money }: Comparison, both: Parameters<typeof stepsUp>[0]): Markup | null {
  const up = stepsUp(both);
  if (up.length === 0) return null;
  const name = (plan: number): string => scenarios[plan]?.name ?? '';
  const each = up.map(
    ({ from, to, costPerRisk }) =>
      mark`<li>from “<bdi>${name(from)}</bdi>” to “<bdi>${name(to)}</bdi>”: ${plain(costPerRisk / 100)} ${money?.currency ?? ''} for each further future of a hundred</li>`,
  );
  return mark`<p>Step by step along the plans that no mix of others beats, from the best estimates alone:</p><ul>${each}</ul>`;
}
