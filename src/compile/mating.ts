// The mating function φ(F, M) that scales births where both sexes are followed: homogeneous of degree 0, and 0 where a sex that is
// needed is absent (Caswell & Weeks 1986). With h females per male: 1; 2hM / (F + hM); min(1, hM / F).
import type { Mating } from '../model/model.ts';

/** From animals by class in one patch. Where nobody of either sex is there, it is that of as many females as males. */
export function matingFactor(mating: Mating, animals: Float64Array | undefined): number {
  const { form, femalesPerMale: h } = mating;
  if (form === 'female-dominant') return 1;
  let [females, males] = [countOf(mating.females, animals), countOf(mating.males, animals)];
  if (females === 0 && males === 0) [females, males] = [1, 1];
  if (females === 0 || males === 0) return 0;
  return form === 'harmonic mean' ? (2 * h * males) / (females + h * males) : Math.min(1, (h * males) / females);
}

function countOf(mask: Uint8Array, animals: Float64Array | undefined): number {
  return animals?.reduce((sum, value, c) => sum + (mask[c] === 1 ? value : 0), 0) ?? 0;
}
