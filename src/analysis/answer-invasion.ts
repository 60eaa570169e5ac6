// The part of the analysis about a few animals on empty land, where growth depends on numbers.
import { leading } from '../numeric/leading.ts';
import { forEachEntry } from '../numeric/sparse.ts';
import { because, type Answer } from './answer.ts';
import { mostEntries } from './cautions.ts';
import type { AnalysisInput } from './input.ts';
import { stateName } from './label.ts';
import { amongLargest } from './largest.ts';
import { patchRoles } from './patches.ts';
import type { Analysis } from './schema.ts';

export type Invasion = NonNullable<Analysis['invasion']>;

/** The year's matrix A(0): with births that depend on the sexes, at the make-up that a few settle to. */
export function invasionAnswer({ yearMap, block, factorsAtZero = [] }: AnalysisInput): Answer<Invasion> {
  if (!yearMap)
    return because(
      'No rate depends on numbers, so a few animals grow by the same matrix as many, which is the one analysed.',
    );
  const nobody = new Float64Array(yearMap.states);
  const matrix = yearMap.matrixAt(nobody);
  const found = leading(matrix);
  const alone = patchRoles(matrix, block.states, nobody, block.patches.length);
  const kept = amongLargest(matrix.values, mostEntries);
  const entries: Invasion['entries'] = [];
  forEachEntry(matrix, (row, column, value) => {
    if (kept(value)) entries.push({ from: stateName(block, column), to: stateName(block, row), value });
  });
  return {
    value: {
      growthRate: found.growthRate,
      factors: [...factorsAtZero],
      patches: alone.map(({ growthAlone }, p) => ({ patch: block.patches[p] ?? '?', growthAlone })),
      makeUp: found.right && Array.from(found.right, (share, s) => ({ ...stateName(block, s), share })),
      entries,
    },
  };
}
