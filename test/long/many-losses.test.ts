// More states than one inverse can hold: what is not worked out by itself is told as such, with the reason.
import { expect, test } from 'vitest';
import { analyseModel } from '../../src/analysis/analyse-model.ts';
import { largeModel } from '../large/landscape.ts';
import { compileText } from '../pipeline/compile-text.ts';

test('losses of 2400 patches: the ones that matter most, a reason for the others, and a caution for links', () => {
  const { text, files } = largeModel({ patches: 2400, classes: 3, crowded: false });
  const { value: found } = analyseModel(compileText(text, {}, files), { at: 'zero' });
  const { patches, links, reasons, cautions } = found!;
  const missing = patches!.filter(({ removalLoss }) => removalLoss === null).length;
  expect(missing).toBeGreaterThan(0);
  expect(missing).toBeLessThan(2400);
  expect(reasons['patches.removalLoss']).toMatch(/for those that matter most/);
  const about = links!.filter(({ exact }) => !exact);
  expect(about.length).toBeGreaterThan(0);
  expect(cautions.some((one) => one.includes(`${about.length} of ${links!.length} links`))).toBe(true);
  for (const { removalLoss, share, sensitivity } of about) expect(removalLoss).toBeCloseTo(share * sensitivity, 12);
});
