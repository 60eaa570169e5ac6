// The block projection matrix, readable and as data.
import { buildBlock } from '../../compile/block.ts';
import type { BlockMatrix } from '../../compile/block-matrix.ts';
import type { Compiled } from '../../compile/year-map.ts';
import { leading, type Leading } from '../../numeric/leading.ts';
import { forEachEntry, toDense } from '../../numeric/sparse.ts';
import { significant } from '../rounded.ts';
import { columnsOf } from '../terminal.ts';

const plain = { colour: false, width: 100 } as const;
const widestMatrix = 12;

export function matrixJson(compiled: Compiled): unknown {
  const block = buildBlock(compiled, 'zero');
  const solved = leading(block.matrix);
  const state = (i: number) => stateNames(block, i);
  const entries: unknown[] = [];
  forEachEntry(block.matrix, (to, from, value) => entries.push({ from: state(from), to: state(to), value }));
  const vector = (values: Float64Array | null, key: 'share' | 'value') =>
    values === null ? null : Array.from(values, (value, i) => ({ ...state(i), [key]: value }));
  return {
    format: 'skein-matrix/1',
    at: block.at,
    growthRate: solved.growthRate,
    stableDistribution: vector(solved.right, 'share'),
    reproductiveValue: vector(solved.left, 'value'),
    reason: solved.reason ?? null,
    irreducible: solved.irreducible,
    primitive: solved.primitive,
    states: block.states.map((_, i) => state(i)),
    entries,
  };
}

function stateNames(
  { states, patches, classes }: BlockMatrix,
  i: number,
): { readonly patch: string; readonly class: string } {
  const state = states[i];
  return { patch: patches[state?.patch ?? 0] ?? '', class: classes[state?.class ?? 0] ?? '' };
}

export function matrixText(compiled: Compiled): string {
  const block = buildBlock(compiled, 'zero');
  const solved = leading(block.matrix);
  const label = (i: number): string => {
    const { patch, class: name } = stateNames(block, i);
    return block.patches.length === 1 ? name : `${patch}, ${name}`;
  };
  const head =
    'Block projection matrix from one count to the next, near zero. Columns are from, rows are to.\n' +
    `Growth rate ${significant(solved.growthRate, 12)}` +
    (solved.reason === undefined ? '' : `\nNo single stable distribution. ${solved.reason}`);
  const body = block.states.length <= widestMatrix ? fullTable(block, label) : entryTable(block, label);
  return [head, body, vectorTable(solved, block, label)].join('\n\n');
}

function fullTable({ matrix, states }: BlockMatrix, label: (i: number) => string): string {
  const dense = toDense(matrix);
  const n = states.length;
  const legend = states.map((_, i) => `  ${i + 1}: ${label(i)}`).join('\n');
  const rows = states.map((_, i) => [String(i + 1), ...states.map((_, j) => entryText(dense.values[i * n + j] ?? 0))]);
  return `${legend}\n\n${columnsOf(['to / from', ...states.map((_, j) => String(j + 1))], rows, plain)}`;
}

function entryText(value: number): string {
  return value === 0 ? '.' : significant(value, 7);
}

function entryTable({ matrix }: BlockMatrix, label: (i: number) => string): string {
  const rows: string[][] = [];
  forEachEntry(matrix, (to, from, value) => rows.push([label(from), label(to), significant(value, 9)]));
  return columnsOf(['from', 'to', 'entry'], rows, plain);
}

function vectorTable(solved: Leading, { states }: BlockMatrix, label: (i: number) => string): string {
  const { right, left } = solved;
  if (right === null && left === null) return '';
  const number = (values: Float64Array | null, i: number): string =>
    values === null ? '-' : significant(values[i] ?? 0, 9);
  const rows = states.map((_, i) => [label(i), number(right, i), number(left, i)]);
  return columnsOf(['state', 'stable share', 'reproductive value'], rows, plain);
}
