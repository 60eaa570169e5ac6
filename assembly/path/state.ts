// The path without chance: mean animals as f64 [patch][class], through the same program.
import { f64At, i32At, putF64 } from '../arrays';
import * as batch from '../batch';
import { classes, entries, header, patches, section, slots, ways } from '../image';
import { headerStart } from '../layout';
import { reserve } from '../memory';

/** f64 [patch][class] */
export let animals: usize = 0;
/** f64 [patch][class]: those on their way, or a row of the next state */
export let arrivals: usize = 0;
/** f64 [slot][patch] */
export let slotValues: usize = 0;
/** f64 [way]: animals that arrived over each way since `startPath` */
export let moved: usize = 0;
export let step: i32 = 0;

export function rowBytes(): usize {
  return (<usize>classes) << 3;
}

export function stateBytes(): usize {
  return (<usize>patches * classes) << 3;
}

export function reservePath(): bool {
  animals = reserve(stateBytes());
  arrivals = reserve(stateBytes());
  slotValues = reserve((<usize>slots * patches) << 3);
  moved = reserve((<usize>ways) << 3);
  return moved !== 0 && animals !== 0 && arrivals !== 0 && slotValues !== 0;
}

export function fillPath(): void {
  const start = section(header(headerStart));
  for (let cell = 0; cell < entries(header(headerStart)); cell++) {
    putF64(animals, cell, f64(i32At(start, cell)));
  }
  memory.fill(moved, 0, (<usize>ways) << 3);
  step = 0;
}

/** What a lane of the batch multiplies rates by. */
export function takeConditions(lane: i32): void {
  for (let i = 0; i < slots * patches; i++) {
    putF64(slotValues, i, f64At(batch.slotValues + <usize>i * batch.laneNumbers, lane));
  }
}

export function setStep(t: i32): void {
  step = t;
}

/** The product of the slots that scale a class in a patch. */
export function scaleOf(lists: usize, c: i32, patch: i32): f64 {
  if (lists === 0) return 1;
  let scale: f64 = 1;
  const end = i32At(lists, c + 1);
  for (let k = i32At(lists, c); k < end; k++) {
    const slot = i32At(lists, classes + 1 + k);
    scale *= f64At(slotValues, slot * patches + patch);
  }
  return scale;
}

export function animalsIn(patch: i32, c: i32): f64 {
  return f64At(animals, patch * classes + c);
}

export function add(state: usize, patch: i32, c: i32, n: f64): void {
  const at = state + ((<usize>(patch * classes + c)) << 3);
  store<f64>(at, load<f64>(at) + n);
}
