// How the multiplier of a crowding moves with what it is made from, and how its coefficient moves with the capacity.
import { log, pow } from '../../machine/pinned.ts';
import type { Crowding } from '../../model/model.ts';
import type { CrowdingCoefficients } from '../coefficients.ts';
import { multiplierAt } from '../crowding-form.ts';

/** Of one patch: the count, and the slopes of everything that the multiplier depends on. */
export interface MovingCount {
  readonly count: number;
  readonly countSlope: number;
  readonly coefficientSlope: number;
  readonly alleeHalfSlope: number;
  readonly shapeNumberSlope: number;
  /** What is left of the capacity. */
  readonly room: number;
}

/** (f · N/(N + h))' with f the form without its Allee factor. */
export function multiplierSlope(own: CrowdingCoefficients, p: number, moving: MovingCount): number {
  const { count, countSlope, alleeHalfSlope } = moving;
  const half = own.alleeHalf[p] ?? 0;
  const plain = { ...own, alleeHalf: new Float64Array(own.alleeHalf.length) };
  const form = { value: multiplierAt(plain, p, count, moving.room), slope: formSlope(own, p, moving) };
  const sum = count + half;
  const allee = half === 0 ? 1 : count / sum;
  if (sum === 0) return form.slope;
  const alleeSlope = (countSlope * half - count * alleeHalfSlope) / (sum * sum);
  return form.slope * allee + form.value * alleeSlope;
}

function formSlope(own: CrowdingCoefficients, p: number, moving: MovingCount): number {
  const { coefficientSlope, shapeNumberSlope, room } = moving;
  const [count, countSlope] = [moving.count / room, moving.countSlope / room];
  const [a, s] = [own.coefficient[p] ?? 0, own.shapeNumber ?? 1];
  const value = multiplierAt({ ...own, alleeHalf: new Float64Array(own.alleeHalf.length) }, p, count);
  const product = coefficientSlope * count + a * countSlope;
  switch (own.form[p] ?? 'none') {
    case 'none':
      return 0;
    case 'beverton-holt':
      return -value * value * product;
    case 'ricker':
      return -value * product;
    case 'theta': {
      const power = pow(count, s);
      const powerSlope =
        (count > 0 ? (s * power * countSlope) / count : 0) + (count > 0 ? power * log(count) * shapeNumberSlope : 0);
      return -value * (coefficientSlope * power + a * powerSlope);
    }
    case 'hassell':
      return -value * ((s * product) / (1 + a * count) + shapeNumberSlope * log(1 + a * count));
    case 'ceiling':
      return count > a ? (coefficientSlope * count - a * countSlope) / (count * count) : 0;
  }
}

export interface MovingShare {
  /** What the form must give at the capacity, without its Allee factor. */
  readonly share: number;
  readonly shareSlope: number;
  readonly capacity: number;
  readonly capacitySlope: number;
  readonly shapeNumberSlope: number;
}

/** Of the coefficient that gives the share at the capacity. */
export function coefficientSlope({ form, shapeNumber: s = 1 }: Crowding, moving: MovingShare): number {
  const { share, shareSlope, capacity, capacitySlope, shapeNumberSlope } = moving;
  switch (form) {
    case 'beverton-holt':
      return -shareSlope / (share * share * capacity) - ((1 / share - 1) / (capacity * capacity)) * capacitySlope;
    case 'ricker':
      return -shareSlope / (share * capacity) + (log(share) / (capacity * capacity)) * capacitySlope;
    case 'theta': {
      const power = pow(capacity, s);
      const logPowerSlope = (s * capacitySlope) / capacity + log(capacity) * shapeNumberSlope;
      return (-shareSlope / share + log(share) * logPowerSlope) / power;
    }
    case 'hassell': {
      const root = pow(share, -1 / s);
      const rootSlope = root * (-shareSlope / (s * share) + (log(share) / (s * s)) * shapeNumberSlope);
      return rootSlope / capacity - ((root - 1) / (capacity * capacity)) * capacitySlope;
    }
    case 'allee':
      return 0;
  }
}
