// The block projection matrix as files that other programs read.
import type { BlockMatrix } from '../compile/block-matrix.ts';
import { forEachEntry } from '../numeric/sparse.ts';

/** Matrix Market, coordinate format (Boisvert, Pozo & Remington 1996): entries are `row column value`, counted from 1. */
export function matrixMarket(block: BlockMatrix, title: string): string {
  const entries: string[] = [];
  forEachEntry(block.matrix, (to, from, value) => entries.push(`${to + 1} ${from + 1} ${value}`));
  const size = block.states.length;
  const comments = [
    `Block projection matrix of: ${title}`,
    'From one count to the next, in numbers near zero. Columns are from, rows are to.',
    'Rows and columns:',
    ...block.states.map((_, i) => {
      const { patch, class: name } = stateOf(block, i);
      return `${i + 1}: ${patch}, ${name}`;
    }),
  ];
  return [
    '%%MatrixMarket matrix coordinate real general',
    ...comments.map((comment) => `% ${comment.replaceAll(/[\n\r]/g, ' ')}`),
    `${size} ${size} ${entries.length}`,
    ...entries,
    '',
  ].join('\n');
}

export const matrixColumns = ['to', 'from', 'to_patch', 'to_class', 'from_patch', 'from_class', 'value'] as const;

/** One row an entry that is not zero; `to` and `from` are counted from 1. */
export function matrixRows(block: BlockMatrix): readonly (readonly (string | number)[])[] {
  const rows: (readonly (string | number)[])[] = [];
  forEachEntry(block.matrix, (to, from, value) => {
    const [target, origin] = [stateOf(block, to), stateOf(block, from)];
    rows.push([to + 1, from + 1, target.patch, target.class, origin.patch, origin.class, value]);
  });
  return rows;
}

function stateOf(
  { states, patches, classes }: BlockMatrix,
  i: number,
): { readonly patch: string; readonly class: string } {
  const state = states[i];
  return { patch: patches[state?.patch ?? 0] ?? '', class: classes[state?.class ?? 0] ?? '' };
}
