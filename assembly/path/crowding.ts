// The mean of a crowding: what it multiplies rates by, in its slot.
import { f64At, i32At } from '../arrays';
import { classes, operand, patches, section, sectionAt } from '../image';
import * as layout from '../layout';
import { crowdingFactor, crowdingShapeOf } from '../phases/crowding';
import { besides, divideRow, first, fourth, roomOf, second, slotRow, third } from './rows';
import { blockBytes, rowAt, rowBytes, rowOfOnes, step, width, workRow } from './state';
import { hasAny, rowOf, tableOf } from './tables';

const rooms: i32 = 0;

export function meanCrowding<N>(record: usize): void {
  const target = slotRow(operand(record, layout.crowdingSlot));
  weigh(target, section(operand(record, layout.crowdingWeights)));
  const forms = section(operand(record, layout.crowdingForms));
  const coefficients = tableOf(record, 0, sectionAt(operand(record, layout.crowdingCoefficients), step), 1);
  const halves = tableOf(record, 1, section(operand(record, layout.crowdingAlleeHalf)), 1);
  const left = roomOf(operand(record, layout.crowdingRoom), workRow(rooms));
  if (hasAny(halves, 0) || !allHave(forms, layout.formBevertonHolt)) {
    factors(record, target, forms, rowOf(coefficients, 0), rowOf(halves, 0), left);
    return;
  }
  if (left !== 0) divideRow(target, left);
  bevertonHolt<N>(target, rowOf(coefficients, 0));
}

function allHave(forms: usize, form: i32): bool {
  for (let patch = 0; patch < patches; patch++) if (i32At(forms, patch) !== form) return false;
  return true;
}

/** From counts over what is left of a capacity to 1 / (1 + k n), where nobody needs others. */
function bevertonHolt<N>(target: usize, coefficients: usize): void {
  const one = f64x2.splat(1);
  for (let at: usize = 0; at < rowBytes; at += blockBytes) {
    const k = besides<N>(coefficients, at);
    const n = target + at;
    v128.store(n, f64x2.div(one, f64x2.add(one, f64x2.mul(first<N>(k), v128.load(n)))));
    v128.store(n, f64x2.div(one, f64x2.add(one, f64x2.mul(second<N>(k), v128.load(n, 16)))), 16);
    v128.store(n, f64x2.div(one, f64x2.add(one, f64x2.mul(third<N>(k), v128.load(n, 32)))), 32);
    v128.store(n, f64x2.div(one, f64x2.add(one, f64x2.mul(fourth<N>(k), v128.load(n, 48)))), 48);
  }
}

/** From counts to factors of any form. */
function factors(record: usize, target: usize, forms: usize, coefficients: usize, halves: usize, left: usize): void {
  const shape = crowdingShapeOf(record);
  const room = left === 0 ? workRow(rowOfOnes) : left;
  let at: usize = 0;
  for (let patch = 0; patch < patches; patch++) {
    const form = i32At(forms, patch);
    const coefficient = f64At(coefficients, patch);
    const half = f64At(halves, patch);
    for (let k = 0; k < width; k++) {
      const factor = crowdingFactor(load<f64>(target + at), load<f64>(room + at), form, coefficient, half, shape);
      store<f64>(target + at, factor);
      at += 8;
    }
  }
}

/** target = Σ weight × animals, from the first class on. */
function weigh(target: usize, weights: usize): void {
  for (let at: usize = 0; at < rowBytes; at += blockBytes) {
    let s0 = f64x2.splat(0);
    let s1 = s0;
    let s2 = s0;
    let s3 = s0;
    for (let c = 0; c < classes; c++) {
      const weight = v128.load64_splat(weights + ((<usize>c) << 3));
      const row = rowAt(c) + at;
      s0 = f64x2.add(s0, f64x2.mul(weight, v128.load(row)));
      s1 = f64x2.add(s1, f64x2.mul(weight, v128.load(row, 16)));
      s2 = f64x2.add(s2, f64x2.mul(weight, v128.load(row, 32)));
      s3 = f64x2.add(s3, f64x2.mul(weight, v128.load(row, 48)));
    }
    v128.store(target + at, s0);
    v128.store(target + at, s1, 16);
    v128.store(target + at, s2, 32);
    v128.store(target + at, s3, 48);
  }
}
