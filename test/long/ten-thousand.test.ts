// A landscape of 10,000 patches and eight classes, whose kernel reaches twenty neighbours, compiles, runs and is mapped.
import { expect, test } from 'vitest';
import { largeModel } from '../large/landscape.ts';
import { reportOf } from '../page/report-of.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { runModel } from '../../src/pipeline.ts';

test('compiles, runs and is mapped', () => {
  const { text, files } = largeModel({ patches: 10_000, classes: 8 });
  const compiled = compileText(text, { replicates: 16, years: 5 }, files);
  const results = runModel(compiled);
  expect(results.stopped.runs).toBe(0);
  expect(results.abundance.patches).toHaveLength(10_000);
  expect(results.abundance.whole.at(-1)!.mean).toBeGreaterThan(0);
  const page = reportOf(compiled, { results });
  const body = page.slice(0, page.indexOf('id="view"'));
  expect(body).toContain('abundance in the middle of 16 futures in 10000 patches');
  expect(body.match(/data-figure="small"/g)).toHaveLength(400);
  expect(body).toContain('These are the 400 of 10,000 patches with the most animals');
});
