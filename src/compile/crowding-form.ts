// The multiplier g(N) of a crowding, and the coefficient that gives it at a capacity.
import { exp, log, pow } from '../machine/pinned.ts';
import type { Crowding } from '../model/model.ts';
import type { CrowdingCoefficients } from './coefficients.ts';
import { tableAt } from './rates.ts';

/** g(N) of one patch; where only a share of the room is left, g(N / room), the Allee factor as before. */
export function multiplierAt(own: CrowdingCoefficients, p: number, animals: number, room = 1): number {
  const [coefficient, half] = [own.coefficient[p] ?? 0, own.alleeHalf[p] ?? 0];
  const allee = half === 0 ? 1 : animals / (animals + half);
  const count = animals / room;
  switch (own.form[p] ?? 'none') {
    case 'none':
      return allee;
    case 'beverton-holt':
      return allee / (1 + coefficient * count);
    case 'ricker':
      return allee * exp(-coefficient * count);
    case 'theta':
      return allee * exp(-coefficient * pow(count, own.shapeNumber ?? 1));
    case 'hassell':
      return allee * pow(1 + coefficient * count, -(own.shapeNumber ?? 1));
    case 'ceiling':
      return allee * (count > coefficient ? coefficient / count : 1);
  }
}

/** The coefficients that hold in a step. */
export function coefficientsIn(own: CrowdingCoefficients, step: number): CrowdingCoefficients {
  const { coefficientByYear } = own;
  return coefficientByYear === undefined ? own : { ...own, coefficient: tableAt(coefficientByYear, step) };
}

/** a or b such that the form, without its Allee factor, gives this share (above 0, at most 1) at the capacity. */
export function coefficientAt({ form, shapeNumber = 1 }: Crowding, share: number, capacity: number): number {
  switch (form) {
    case 'beverton-holt':
      return (1 / share - 1) / capacity;
    case 'ricker':
      return -log(share) / capacity;
    case 'theta':
      return -log(share) / pow(capacity, shapeNumber);
    case 'hassell':
      return (pow(share, -1 / shapeNumber) - 1) / capacity;
    case 'allee':
      return 0;
  }
}
