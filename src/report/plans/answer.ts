// The answer of a comparison: what the results support, under which rule, how strongly, and whose call it is.
import type { Comparison, ComparedPlan } from '../../compare/results.ts';
import { drawFutures } from '../../view/futures.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { percent, plain } from '../../view/number.ts';
import { paragraph, prose, section } from '../section/section.ts';

export function plansAnswer(comparison: Comparison): Markup {
  const { statement, objectives } = comparison;
  const [objective] = objectives;
  const meaning = objective === undefined ? null : `“${objective.name}” means: ${objective.definition}.`;
  return section(
    'answer',
    'The answer',
    mark`<div class="answer"><div>
<p class="lead">${prose(statement.text)}</p>
${paragraph(meaning)}${statement.reservations.length === 0 ? null : paragraph(statement.reservations.join(' '))}</div>${futures(comparison)}</div>
<div class="sure"><p>The rule: ${prose(statement.rule)}. ${strengthWords[statement.strength]}</p>
${paragraph(sureness(comparison))}
<p>Another rule may choose another plan. How much risk is acceptable, and what it may cost, is not a matter of calculation: it is for those who decide.</p></div>`,
  );
}

const strengthWords = {
  clear:
    'The support is clear: no interval, neither from the number of runs nor from what is not known, leaves room for the opposite.',
  limited: 'The support is limited: read what it rests on below.',
  none: 'By this rule there is no support for a change.',
} as const;

function sureness({ draws, notDrawn, replicates, precision }: Comparison): string {
  const chance =
    'Every plan met the same weather and luck in the future of the same number, so that differences are those of the plans.';
  const runs =
    draws === undefined
      ? `${plain(replicates)} futures of each plan.`
      : `${plain(draws.number - draws.failed)} draws of what is not known, ${plain(draws.replicatesEach)} futures each.`;
  const sharp =
    precision === undefined
      ? ''
      : ` Differences of chances are known to ${(precision.halfWidth * 100).toFixed(1)} points of a hundred either way${precision.reached ? '' : ', which is less sharp than was asked for'}.`;
  if (draws !== undefined) return `${runs} ${chance}${sharp}`;
  const unknown =
    notDrawn === true
      ? ' What is not known was not drawn: `--draws 200` shows how far that could move the answer.'
      : ' The model gives no uncertainty for its numbers, so how far the answer could move for that reason is in no interval here.';
  return `${runs} ${chance}${sharp}${unknown}`;
}

/** A hundred futures as now, and under the plan that the rule leaves. */
function futures({ scenarios, objectives, statement }: Comparison): Markup | null {
  const [objective] = objectives;
  const [now] = scenarios;
  if (objective?.of !== 'chance' || now === undefined) return null;
  const chosen = scenarios.find(({ name }) => name === statement.plans[0]);
  const shown = chosen === undefined || chosen === now ? [now] : [now, chosen];
  const figures = shown.map((plan) => {
    const chance = chanceOf(plan, objective.name);
    const caption = mark`<bdi>${plan.name}</bdi>: ${percent(chance)}`;
    return mark`<figure class="futures">${drawFutures(chance, `come to ${objective.name} under ${plan.name}`)}<figcaption>${caption}</figcaption></figure>`;
  });
  return mark`<div>${figures}<p class="note">a hundred futures each, those that come to “<bdi>${objective.name}</bdi>” filled</p></div>`;
}

export function chanceOf({ outcomes }: ComparedPlan, name: string): number {
  return outcomes.find((one) => one.name === name)?.probability ?? 0;
}
