// Crowding: reads N = Σ weight × animals in each patch and writes the multiplier g(N) × N / (N + h) into its slot.
import { f64At, i32At } from '../arrays';
import { animals, cellBytes, laneNumbers, rooms, rowBytes, slotValues, step } from '../batch';
import { classes, operand, patches, section, sectionAt } from '../image';
import * as layout from '../layout';
import { exp, pow } from '../mathematics';
import { fillRooms } from '../weather/room';

export function readCrowding(record: usize): void {
  const weights = section(operand(record, layout.crowdingWeights));
  const forms = section(operand(record, layout.crowdingForms));
  const coefficients = sectionAt(operand(record, layout.crowdingCoefficients), step);
  const halves = section(operand(record, layout.crowdingAlleeHalf));
  const shape = crowdingShapeOf(record);
  const slot = slotValues + <usize>operand(record, layout.crowdingSlot) * patches * laneNumbers;
  for (let patch = 0; patch < patches; patch++) {
    const target = slot + <usize>patch * laneNumbers;
    weigh(target, animals + <usize>patch * rowBytes(), weights);
    const form = i32At(forms, patch);
    const coefficient = f64At(coefficients, patch);
    const half = f64At(halves, patch);
    fillRooms(operand(record, layout.crowdingRoom), patch);
    for (let i: usize = 0; i < laneNumbers; i += 8) {
      const at = target + i;
      store<f64>(at, crowdingFactor(load<f64>(at), load<f64>(rooms + i), form, coefficient, half, shape));
    }
  }
}

/** target[lane] = Σ weight × animals of a patch. */
export function weigh(target: usize, row: usize, weights: usize): void {
  memory.fill(target, 0, laneNumbers);
  for (let c = 0; c < classes; c++) {
    const weight = f64At(weights, c);
    if (weight === 0) continue;
    addWeighted(target, row + <usize>c * cellBytes, weight);
  }
}

/** target[lane] += weight × animals of a cell. */
export function addWeighted(target: usize, cell: usize, weight: f64): void {
  const splat = f64x2.splat(weight);
  for (let i: usize = 0; i < cellBytes; i += 8) {
    const n = f64x2.convert_low_i32x4_u(v128.load64_zero(cell + i));
    const at = target + (i << 1);
    v128.store(at, f64x2.add(v128.load(at), f64x2.mul(splat, n)));
  }
}

/** The shape number of the form; 1 for those that have none. */
export function crowdingShapeOf(record: usize): f64 {
  const row = operand(record, layout.crowdingShape);
  return row < 0 ? 1 : load<f64>(section(row));
}

/** g(N / room) times the Allee factor of N, which is 0 where nobody is counted. */
export function crowdingFactor(animals: f64, room: f64, form: i32, coefficient: f64, half: f64, shape: f64): f64 {
  const allee = half > 0 ? animals / (animals + half) : 1;
  const n = animals / room;
  if (form === layout.formBevertonHolt) return allee / (1 + coefficient * n);
  if (form === layout.formRicker) return allee * exp(-coefficient * n);
  if (form === layout.formTheta) return allee * exp(-coefficient * pow(n, shape));
  if (form === layout.formHassell) return allee * pow(1 + coefficient * n, -shape);
  if (form === layout.formCeiling && n > coefficient) return (allee * coefficient) / n;
  return allee;
}
