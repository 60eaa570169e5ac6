// The means of taking, moving and releasing animals.
import { f64At, i32At } from '../arrays';
import { classes, operand, patches, section, sectionAt } from '../image';
import * as layout from '../layout';
import { isActive, wantedOf } from '../phases/handling';
import { cellAt, step, width } from './state';

/** Fewer are nobody. */
const nobody: f64 = 1e-9;

/** The course at hand: a column of each patch. */
let course: i32 = 0;

export function meanHandling(record: usize): void {
  if (!isActive(record, step)) return;
  for (course = 0; course < width; course++) handleCourse(record);
}

function handleCourse(record: usize): void {
  const inPatches = section(operand(record, layout.handledPatches));
  const together = operand(record, layout.handledTogether) !== 0;
  const groups = together ? 1 : patches;
  for (let patch = 0; patch < groups; patch++) {
    if (!together && i32At(inPatches, patch) === 0) continue;
    meanPatches(record, together ? 0 : patch, together ? patches : patch + 1);
  }
}

function meanPatches(record: usize, first: i32, end: i32): void {
  const inClasses = section(operand(record, layout.handledClasses));
  const byClass = operand(record, layout.handledByClass) !== 0;
  const groups = byClass ? classes : 1;
  for (let c = 0; c < groups; c++) {
    if (byClass && i32At(inClasses, c) === 0) continue;
    const endClass = byClass ? c + 1 : classes;
    let all: f64 = 0;
    for (let patch = first; patch < end; patch++) all += countIn(record, patch, c, endClass);
    if (all <= nobody) continue;
    const share = min<f64>(1, wantedOf(record, all, first, c, step) / all);
    for (let patch = first; patch < end; patch++) takeIn(record, patch, c, endClass, share);
  }
}

function countIn(record: usize, patch: i32, first: i32, end: i32): f64 {
  if (i32At(section(operand(record, layout.handledPatches)), patch) === 0) return 0;
  const inClasses = section(operand(record, layout.handledClasses));
  let all: f64 = 0;
  for (let c = first; c < end; c++) if (i32At(inClasses, c) !== 0) all += load<f64>(here(patch, c));
  return all;
}

function takeIn(record: usize, patch: i32, first: i32, end: i32, share: f64): void {
  if (share <= 0 || i32At(section(operand(record, layout.handledPatches)), patch) === 0) return;
  const inClasses = section(operand(record, layout.handledClasses));
  const moving = operand(record, layout.recordOpcode) === layout.opMove;
  const survival = section(operand(record, layout.handledSurvival));
  const homing = operand(record, layout.handledHoming);
  const back = homing < 0 ? 0 : f64At(section(homing), 0);
  for (let c = first; c < end; c++) {
    if (i32At(inClasses, c) === 0) continue;
    const taken = load<f64>(here(patch, c)) * share;
    add(patch, c, -taken);
    if (!moving) continue;
    const alive = taken * f64At(survival, c);
    add(operand(record, layout.handledTo), c, alive * (1 - back));
    if (back > 0) add(patch, c, alive * back);
  }
}

export function meanRelease(record: usize): void {
  if (!isActive(record, step)) return;
  const amounts = sectionAt(operand(record, layout.handledAmounts), step);
  const inPatches = section(operand(record, layout.handledPatches));
  const survival = section(operand(record, layout.handledSurvival));
  for (let patch = 0; patch < patches; patch++) {
    if (i32At(inPatches, patch) === 0) continue;
    for (let c = 0; c < classes; c++) {
      const released = f64At(amounts, patch * classes + c) * f64At(survival, c);
      for (course = 0; course < width; course++) add(patch, c, released);
    }
  }
}

function here(patch: i32, c: i32): usize {
  return cellAt(c, patch * width + course);
}

function add(patch: i32, c: i32, n: f64): void {
  store<f64>(here(patch, c), load<f64>(here(patch, c)) + n);
}
