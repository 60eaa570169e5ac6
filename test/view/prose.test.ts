// Sentences made for a terminal, on a page.
import { expect, test } from 'vitest';
import { prose } from '../../src/report/section/section.ts';
import { mark } from '../../src/view/markup.ts';

test('what is typed is code, percent signs keep to their numbers, and everything is escaped', () => {
  expect(mark`${prose('5 % of <all>: `--draws 200` tells, and `a<b`')}`.text).toBe(
    '5\u00a0% of &lt;all&gt;: <code>--draws 200</code> tells, and <code>a&lt;b</code>',
  );
  expect(mark`${prose('nothing to set apart')}`.text).toBe('nothing to set apart');
});
