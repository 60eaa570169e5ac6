// Tables in a terminal: nothing is cut, and no line runs on.
import { expect, test } from 'vitest';
import { fittedColumns } from '../../src/report/fitted-columns.ts';

const style = { colour: false, width: 40 };

test('what fits stands as it is', () => {
  expect(fittedColumns(['plan', 'cost'], [['as now', '0']], style)).toBe('plan      cost\nas now       0');
});

test('heads are broken first, that which gives most room before the others', () => {
  const head = ['plan', 'animals at the end', 'few left', 'cost'];
  expect(fittedColumns(head, [['rewet the wash', '80', '7 %', '100']], style)).toBe(
    [
      '                animals                 ',
      '                 at the                 ',
      'plan                end  few left  cost',
      'rewet the wash       80       7 %   100',
    ]
      .map((line) => line.trimEnd())
      .join('\n'),
  );
});

test('then names of rows, and columns that still do not fit stand below', () => {
  const rows = [['culvert and rewetted meadow together', '1,000 (800 to 1,200)', '2,000 (900 to 3,000)']];
  const lines = fittedColumns(['plan', 'few left', 'thriving'], rows, style).split('\n');
  expect(lines).toEqual([
    'plan                           few left',
    'culvert and        1,000 (800 to 1,200)',
    '  rewetted meadow',
    '  together',
    '',
    'plan                           thriving',
    'culvert and        2,000 (900 to 3,000)',
    '  rewetted meadow',
    '  together',
  ]);
  expect(Math.max(...lines.map(({ length }) => length))).toBe(39);
});
