// The windows of criterion E, where an outcome is that nobody is left anywhere.
import type { RunResults } from '../../results/results.ts';
import { mark, type Markup } from '../../view/markup.ts';
import { criterionSaid } from '../criterion-words.ts';
import { section } from './section.ts';

export const criterionId = 'criterion-e';

export function criterionSection({ criterionE }: Pick<RunResults, 'criterionE'>): Markup | null {
  if (criterionE === undefined) return null;
  const { lead, windows, caution } = criterionSaid(criterionE);
  const items = windows.map((words) => mark`<li>${words}</li>`);
  return section(criterionId, 'Windows of criterion E', mark`<p>${lead}</p><ul>${items}</ul><p>${caution}</p>`);
}
