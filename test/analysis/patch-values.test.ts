// What each patch is to the whole, asked for by itself, is what the whole analysis says.
import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { analyseModel } from '../../src/analysis/analyse-model.ts';
import { patchValues } from '../../src/analysis/patch-values.ts';
import { compileText } from '../pipeline/compile-text.ts';

function modelOf(name: string) {
  return compileText(readFileSync(new URL(`../../models/${name}.yaml`, import.meta.url), 'utf8'));
}

it('agrees with the analysis with nobody there', () => {
  const compiled = modelOf('reed-hare');
  const [quick, whole] = [patchValues(compiled).value, analyseModel(compiled, { at: 'zero' }).value];
  expect(quick?.growthRate).toBe(whole?.growthRate);
  expect(whole?.patches?.length).toBe(8);
  expect(quick?.patches).toEqual(
    whole?.patches?.map(({ growthAlone, contribution, selfRecruitment, role }) => ({
      growthAlone,
      contribution,
      selfRecruitment,
      role,
    })),
  );
});

it('says why there is nothing to tell', () => {
  const found = patchValues(modelOf('ageing-only'));
  expect(found.value).toBeNull();
  expect(found.value === null && found.reason).toMatch(/\.$/);
});
