// The whole model at a point where nothing but rates moves: they are put into the tables of the base, and only what rests on them
// is made anew. Where and how far animals go, places and names stay, and nothing is read again.
import { solveCapacities } from '../../compile/capacity.ts';
import { buildImage } from '../../compile/image/build.ts';
import { solveStages } from '../../compile/stage-advance.ts';
import { startAnimals } from '../../compile/start.ts';
import type { Compiled } from '../../compile/year-map.ts';
import { buildLandscape } from '../../landscape/build.ts';
import type { Context } from '../../model/context.ts';
import type { Model } from '../../model/model.ts';
import { resolveCatastrophes } from '../../model/variation/catastrophe.ts';
import { resolveVariation } from '../../model/variation/resolve.ts';
import type { Finding } from '../../spec/finding.ts';
import type { Spec } from '../../spec/schema/spec.ts';
import type { Factor, Value } from '../design/factor.ts';
import { movingRates, ratesOf, withRates } from './moving-rates.ts';

export interface MovedModel extends Compiled {
  readonly startAnimals: Float64Array;
  readonly image: ArrayBuffer;
}

/** Null at points that have to be compiled whole, to say what stands against them. */
export type MovingModel = (values: readonly Value[]) => MovedModel | null;

/** `spec` has the base values of the factors, and is run without a plan. Null where what is swept moves more than rates. */
export function movingModel(spec: Spec, factors: readonly Factor[]): MovingModel | null {
  const moving = movingRates(spec, factors);
  if (moving === null || !meansFollowTables(moving.model)) return null;
  const { landscape } = buildLandscape(moving.model);
  return (values) => {
    const rates = ratesOf(moving, values);
    const resolved = rates === null ? null : withChance(moving.context, withRates(moving.model, moving.rates, rates));
    if (resolved === null) return null;
    const { model, findings } = solveStages(resolved, landscape);
    const { coefficients, findings: ofCapacities } = solveCapacities(model);
    const { animals, findings: ofStart } = startAnimals({ model, landscape, coefficients });
    if (anyError([...findings, ...ofCapacities, ...ofStart])) return null;
    const compiled = { model, landscape, coefficients, startAnimals: animals };
    return { ...compiled, image: buildImage(compiled) };
  };
}

/** What differs from year to year are rates, with the tables as their means: no parameters, and nothing that is read anew each year. */
function meansFollowTables({ variation }: Model): boolean {
  if (variation === null) return true;
  const { varied, responses, resampled } = variation;
  return resampled === null && responses.length === 0 && varied.every(({ of }) => of.kind === 'rate');
}

/** With the chance that belongs to the rates; null where some number cannot be. */
function withChance(context: Context, model: Model): Model | null {
  if (model.variation === null && model.catastrophes.length === 0) return model;
  const findings: Finding[] = [];
  const own = { ...context, findings, defaults: [], toldBounds: new Set<string>() };
  const [variation, catastrophes] = [resolveVariation(own, model.phases), resolveCatastrophes(own, model.phases)];
  return anyError(findings) ? null : { ...model, variation, catastrophes };
}

function anyError(findings: readonly Finding[]): boolean {
  return findings.some(({ severity }) => severity === 'error');
}
