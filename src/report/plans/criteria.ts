// What each plan says of the windows of criterion E, where an outcome is that nobody is left anywhere.
import { mark, type Markup } from '../../view/markup.ts';
import { criterionSaid, withoutWindows } from '../criterion-words.ts';
import { criterionId } from '../section/criterion.ts';
import { section } from '../section/section.ts';
import type { PlanReport } from './input.ts';

export function saysCriteria(plans: readonly PlanReport[]): boolean {
  return plans.some(({ input }) => input.results.criterionE !== undefined);
}

/** Plans change how long a generation is, and so the windows: each has its own. */
export function criteriaSection(plans: readonly PlanReport[]): Markup | null {
  const said = plans.flatMap(({ name, input: { results } }) =>
    results.criterionE === undefined ? [] : [{ name, ...criterionSaid(results.criterionE) }],
  );
  if (said.length === 0) return null;
  const none = withoutWindows(plans.map(({ name }) => name).filter((name) => !said.some((one) => one.name === name)));
  const each = said.map(
    ({ name, lead, windows }) =>
      mark`<h3><bdi>${name}</bdi></h3><p>${lead}</p><ul>${windows.map((words) => mark`<li>${words}</li>`)}</ul>`,
  );
  return section(
    criterionId,
    'Windows of criterion E',
    mark`${each}${none === '' ? null : mark`<p>${none}</p>`}<p>${said[0]?.caution ?? ''}</p>`,
  );
}
