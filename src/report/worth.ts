// What the map says of sources and sinks beneath it: what they are, where they were taken, or why they are not told.
import type { ReportInput } from './input.ts';

/** To follow 'taken'. */
export const worthAt = 'with almost nobody there and rates at their means';

export function worthNote({ model, patchValues }: ReportInput): string {
  if (patchValues === undefined) return '';
  if (patchValues.value === null) return `Source or sink is not told: ${patchValues.reason}`;
  const animals = model.counts === 'females' ? 'females' : 'animals';
  const crowded = model.crowding.length > 0 || model.phases.some(({ kind }) => kind === 'ceiling');
  const many = crowded ? '; as patches fill up, all of them leave fewer' : '';
  return `The edge of a patch tells a source (each of its ${animals} leaves more than one a year later, counted in all
patches) from a sink (fewer than one), taken ${worthAt}${many}.`;
}
