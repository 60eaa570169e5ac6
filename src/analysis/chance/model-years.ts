// Long-run growth of a model whose years differ, from its variation: what the approximation needs of a compiled model.
import { keptStates } from '../../compile/block.ts';
import { dependsOnMakeUp } from '../../compile/make-up.ts';
import type { Compiled } from '../../compile/year-map.ts';
import type { Variation } from '../../model/chance.ts';
import { leading } from '../../numeric/leading.ts';
import { because, type Answer } from '../answer.ts';
import { vectorsOf } from '../sensitivity.ts';
import type { SmallNoise } from '../small-noise.ts';
import { covarianceOf } from './hermite.ts';
import { mixedYears, workOf } from './mixed-years.ts';
import { atMeanRates, matrixOf, variedYear } from './rate-columns.ts';
import { betweenRates, variedRates, type VariedRate } from './varied-rates.ts';

/** Multiplications: some seconds. */
const mostWork = 4e9;

/** Near zero: with nobody there, in the first year. What catastrophes do is in the mean year only. */
export function modelYears(compiled: Compiled): Answer<SmallNoise> {
  const { model, landscape } = compiled;
  const { variation } = model;
  if (variation === null) return because('Nothing varies from year to year in this model.');
  if (variation.resampled !== null)
    return because('Years of drivers are drawn, which the approximation does not follow; `skein path` simulates them.');
  if (dependsOnMakeUp(model))
    return because('Births depend on who meets whom, so the years are no products of matrices.');
  const rates = variedRates(variation, model.firstYear);
  if (rates.length === 0) return because('Nothing varies in the first year.');
  const places = keptStates(compiled);
  const year = variedYear(compiled, new Float64Array(model.patches.length * model.classes.length), rates);
  const maps = atMeanRates(year);
  const matrix = matrixOf(maps, places);
  const found = leading(matrix);
  const vectors = vectorsOf(found);
  if (vectors === null) return because(found.reason ?? 'There is no single stable distribution.');
  // What is out of proportion must fade faster than chance brings it about: swings that stay let the two halves of a cycle drift apart.
  if (found.period > 1)
    return because('Numbers swing for ever, so that chance adds up in ways that the approximation does not see.');
  const { autocorrelation } = variation;
  const request = { maps, matrix, columns: year.columns, places, autocorrelation };
  if (workOf(request) > mostWork) return because('So many rates vary that it would take minutes; runs follow them.');
  const patches = landscape.weather?.of ?? 0;
  const apart = (p: number, q: number): number =>
    p === q ? 1 : typeof patches === 'number' ? patches : (patches.values[p * patches.columns + q] ?? 0);
  const covariance = (a: number, b: number, later: number): number => {
    const [left, right] = [rates[a], rates[b]];
    return left && right
      ? between(variation, [left, right], carried(autocorrelation, later) * apart(left.patch, right.patch))
      : 0;
  };
  return { value: mixedYears({ ...request, vectors, covariance }) };
}

function carried(autocorrelation: number, later: number): number {
  let left = 1;
  for (let year = 0; year < later; year++) left *= autocorrelation;
  return left;
}

/** `alike` is the correlation of the normal numbers of one quantity. */
function between(variation: Variation, [left, right]: readonly [VariedRate, VariedRate], alike: number): number {
  let sum = 0;
  for (const a of left.along) {
    for (const b of right.along) {
      const correlation = alike * betweenRates(variation, a.varied, b.varied);
      sum += covarianceOf(a.series, b.series, correlation);
    }
  }
  return sum;
}
