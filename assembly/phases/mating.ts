// The mating function: 2hM / (F + hM), or min(1, hM / F), of females F and males M; 0 where either is absent.
import { f64At, putF64 } from '../arrays';
import { cellBytes, laneNumbers, moreNumbers, rates } from '../batch';
import { classes, operand, section } from '../image';
import * as layout from '../layout';
import { addWeighted } from './crowding';

/** moreNumbers[lane] = φ of the animals of a patch. */
export function readMating(record: usize, row: usize, males: usize): void {
  const sexes = section(operand(record, layout.breedingSexes));
  memory.fill(moreNumbers, 0, laneNumbers);
  memory.fill(males, 0, laneNumbers);
  for (let c = 0; c < classes; c++) {
    const sex = f64At(sexes, c);
    if (sex > 0) addWeighted(moreNumbers, row + <usize>c * cellBytes, 1);
    if (sex < 0) addWeighted(males, row + <usize>c * cellBytes, 1);
  }
  for (let lane = 0; lane < layout.lanes; lane++) {
    putF64(moreNumbers, lane, matingFactor(record, f64At(moreNumbers, lane), f64At(males, lane)));
  }
}

export function matingFactor(record: usize, females: f64, males: f64): f64 {
  if (females <= 0 || males <= 0) return 0;
  const served = f64At(section(operand(record, layout.breedingPerMale)), 0) * males;
  if (operand(record, layout.breedingMating) === layout.matingHarmonic) return (2 * served) / (females + served);
  return min<f64>(1, served / females);
}

/** rates[lane] ×= φ. */
export function scaleByMating(): void {
  for (let i: usize = 0; i < laneNumbers; i += 16) {
    v128.store(rates + i, f64x2.mul(v128.load(rates + i), v128.load(moreNumbers + i)));
  }
}
