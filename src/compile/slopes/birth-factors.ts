// How the factors of births that depend on who is there move: the share that finds room, and the meeting of the sexes.
import type { BreedingPhase, CeilingPhase, Mating, Phase } from '../../model/model.ts';
import { shareWithin } from '../ceiling.ts';
import { birthsMap, type LifeRequest } from '../life-map.ts';
import { matingFactor } from '../mating.ts';
import { shareWithinSlope } from './ceiling-slope.ts';

export interface BirthFactors {
  readonly phase: BreedingPhase;
  readonly request: LifeRequest;
  readonly animalSlopes: Float64Array;
  /** Of all phases, with slopes as their numbers. */
  readonly slopes: readonly (Phase | null)[];
}

/** C×C: births without the factor, times the slope of the factor. */
export function birthFactorSlope(factors: BirthFactors): Float64Array {
  const n = factors.request.model.classes.length;
  const [waiting, mating] = [waitingSlope(factors), matingSlope(factors)];
  return Float64Array.from({ length: n * n }, (_, i) => (waiting?.[i] ?? 0) + (mating?.[i] ?? 0));
}

function waitingSlope({ phase, request, animalSlopes, slopes }: BirthFactors): Float64Array | null {
  const { waits, ...free } = phase;
  const { animals, patch, room = 1 } = request;
  if (waits === undefined || animals === undefined || shareWithin(waits, { patch, animals, room }) === 1) return null;
  const moved = slopes.find((one): one is CeilingPhase => one?.kind === 'ceiling' && one.name === waits.name);
  const capacitySlope = moved?.capacity[patch] ?? 0;
  const slope = shareWithinSlope(waits, { patch, animals, room, animalSlopes, capacitySlope });
  return birthsMap(free, request).map((births, i) => (waits.counted[i % animals.length] === 1 ? births * slope : 0));
}

function matingSlope({ phase, request, animalSlopes, slopes }: BirthFactors): Float64Array | null {
  const { mating, ...free } = phase;
  const { animals } = request;
  if (mating === undefined || animals === undefined) return null;
  const moved = slopes.find((one): one is BreedingPhase => one?.kind === 'breeding' && one.name === phase.name);
  const slope = factorSlope(mating, { animals, animalSlopes, perMaleSlope: moved?.mating?.femalesPerMale ?? 0 });
  return slope === 0 ? null : birthsMap(free, request).map((births) => births * slope);
}

interface MovingSexes {
  readonly animals: Float64Array;
  readonly animalSlopes: Float64Array;
  readonly perMaleSlope: number;
}

/** With m = hM: of 2m / (F + m) it is (2m'F − 2mF') / (F + m)², of m / F it is (m' − F' m / F) / F. */
function factorSlope(mating: Mating, { animals, animalSlopes, perMaleSlope }: MovingSexes): number {
  const { form, femalesPerMale: h } = mating;
  const sum = (mask: Uint8Array, values: Float64Array): number =>
    values.reduce((total, value, c) => total + (mask[c] === 1 ? value : 0), 0);
  const [females, males] = [sum(mating.females, animals), sum(mating.males, animals)];
  const [femaleSlope, maleSlope] = [sum(mating.females, animalSlopes), sum(mating.males, animalSlopes)];
  const [m, mSlope] = [h * males, h * maleSlope + perMaleSlope * males];
  if (form === 'female-dominant' || females === 0) return 0;
  if (form === 'harmonic mean') return (2 * (mSlope * females - m * femaleSlope)) / ((females + m) * (females + m));
  return matingFactor(mating, animals) === 1 ? 0 : (mSlope - (femaleSlope * m) / females) / females;
}
