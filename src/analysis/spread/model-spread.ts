// How fast the population of a model would spread over empty land like each of its patches, and what that depends on.
import { dependsOnMakeUp } from '../../compile/make-up.ts';
import { exp, log } from '../../machine/pinned.ts';
import { slopesOf } from '../../model/slopes/slopes.ts';
import { growthRateOf, leading } from '../../numeric/leading.ts';
import { sparseFromDense, type DenseMatrix } from '../../numeric/sparse.ts';
import type { CompiledModel } from '../../pipeline.ts';
import { because, type Answer } from '../answer.ts';
import { sensitivityAlong, vectorsOf } from '../sensitivity.ts';
import { seenByFront, slopeSeen, waysOf, type Land } from './land.ts';
import { steepest } from './plane-moment.ts';
import { goldenMinimum } from './speed.ts';

export interface LandSpeed {
  readonly patch: string;
  readonly speedKm: number;
  /** Steepness of the front, per km. */
  readonly theta: number;
  readonly parameters: readonly { readonly name: string; readonly sensitivity: number; readonly elasticity: number }[];
}

/** Patches looked at. */
const mostPatches = 100;

/**
 * c = min over θ > 0 of ln ρ(H(θ)) / θ (Neubert & Caswell 2000, from memory), and ∂c/∂p = vᵀ(∂H/∂p)w / (θρ⟨v, w⟩) at that θ.
 * For patches whose land lets a population grow; null where nothing moves by a kernel, or its tail is so heavy that a front only gets faster.
 */
export function modelSpread(compiled: CompiledModel): Answer<readonly LandSpeed[]> {
  const { model, laid } = compiled;
  if (dependsOnMakeUp(model)) return because('Births depend on who meets whom, and at a front few meet.');
  const ways = waysOf(model.phases);
  if (ways === null)
    return because('Animals move by a table of shares between patches, which says nothing of other land.');
  if (ways.length === 0) return because('Nobody moves between patches.');
  const limit = Math.min(...ways.map(steepest));
  if (limit === 0) {
    return because(
      'Some ways are so much longer than most that a front over empty land gets faster for ever; give the kernel a `reach`.',
    );
  }
  if (model.patches.length > mostPatches) return because(`It is told for up to ${mostPatches} patches.`);
  const scale = Math.max(...ways.map(({ kernel }) => Math.min(kernel.scaleKm, kernel.reachKm ?? Infinity)));
  const slopes = slopesOf(laid);
  const found = model.patches.flatMap(({ name }, patch): LandSpeed[] => {
    const land: Land = { compiled, patch };
    if (!(growthOf(seenByFront(land, 0)) > 1)) return [];
    const speedAt = (theta: number): number => log(growthOf(seenByFront(land, theta))) / theta;
    const high = limit < Infinity ? limit * (1 - 1e-9) : 60 / scale;
    const theta = exp(goldenMinimum((x) => speedAt(exp(x)), [log(1e-3 / scale), log(high)]));
    const speedKm = speedAt(theta);
    const vectors = vectorsOf(leading(sparseFromDense(seenByFront(land, theta))));
    const parameters = model.parameters.flatMap(({ name: parameter, value }) => {
      const own = slopes(parameter);
      if (own === null || own.missed.length > 0 || vectors === null) return [];
      const along = sensitivityAlong(sparseFromDense(slopeSeen(land, own, theta)), vectors);
      const sensitivity = along / (theta * vectors.growthRate);
      return sensitivity === 0 ? [] : [{ name: parameter, sensitivity, elasticity: (value * sensitivity) / speedKm }];
    });
    return [{ patch: name, speedKm, theta, parameters }];
  });
  return found.length > 0
    ? { value: found }
    : because('On land like that of any patch the population does not grow, so it has no front.');
}

function growthOf(map: DenseMatrix): number {
  return growthRateOf(sparseFromDense(map));
}
