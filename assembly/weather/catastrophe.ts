// Catastrophes: whether one starts this year, where it is on, and what it multiplies rates and capacities by.
// The weather keeps how many years ago one began, counted from 1: for each origin, or once for the landscape with its origin.
import { f64At, i32At, putF64, u32At } from '../arrays';
import { laneNumbers, replicates, slotValues, step, weather, weatherGiven, words, work } from '../batch';
import { philoxLanes } from '../draws/philox';
import { entries, operand, patches, patchKeys, section } from '../image';
import * as layout from '../layout';
import { uniform } from './uniform';

let chance: f64 = 0;
let lasts: f64 = 0;
let wait: f64 = 0;
let lowered: f64 = 0;

export function strike(record: usize): void {
  const numbers = section(operand(record, layout.strikeChance));
  chance = f64At(numbers, layout.strikeNumberChance);
  lasts = f64At(numbers, layout.strikeNumberLasts);
  wait = f64At(numbers, layout.strikeNumberWait);
  lowered = f64At(numbers, layout.strikeNumberCapacity);
  // work[patch][lane]: 1 where it is on; then the same for where one begins, and after it where the capacity is lowered.
  memory.fill(work, 0, <usize>(2 * patches) * laneNumbers);
  const ages = weather + <usize>operand(record, layout.strikeWeather) * laneNumbers;
  if (operand(record, layout.strikeOver) === layout.overLandscape) strikeLandscape(record, ages);
  else strikePatches(record, ages);
  if (lowered > 0) lowerCapacities(ages + <usize>strikeAges(record) * laneNumbers);
  writeSlots(record);
}

function strikePatches(record: usize, ages: usize): void {
  const origins = operand(record, layout.strikeOrigins);
  for (let i = 0; i < entries(origins); i++) {
    const patch = i32At(section(origins), i);
    const age = ages + <usize>i * laneNumbers;
    if (!weatherGiven) {
      philoxLanes(words, replicates, step, u32At(patchKeys, patch), operand(record, layout.recordKey));
      for (let lane = 0; lane < layout.lanes; lane++) grow(age, lane);
    }
    for (let lane = 0; lane < layout.lanes; lane++) mark(record, i, lane, f64At(age, lane));
  }
}

function strikeLandscape(record: usize, ages: usize): void {
  const origins = entries(operand(record, layout.strikeOrigins));
  const places = ages + laneNumbers;
  if (!weatherGiven) {
    const key = u32At(section(operand(record, layout.strikeColumn)), 0);
    philoxLanes(words, replicates, step, key, operand(record, layout.recordKey));
    for (let lane = 0; lane < layout.lanes; lane++) {
      if (grow(ages, lane)) putF64(places, lane, floor<f64>(uniform(lane, layout.useOrigin) * f64(origins)));
    }
  }
  for (let lane = 0; lane < layout.lanes; lane++) {
    mark(record, i32(f64At(places, lane)), lane, f64At(ages, lane));
  }
}

/** One year older, and whether a new one begins. A wait w lets years with at least w from start to start. */
function grow(ages: usize, lane: i32): bool {
  let age = f64At(ages, lane);
  if (age > 0) age += 1;
  const begins = (age === 0 || age > wait) && uniform(lane, layout.useStrike) < chance;
  putF64(ages, lane, begins ? 1 : age);
  return begins;
}

function mark(record: usize, origin: i32, lane: i32, age: f64): void {
  if (age === 0) return;
  if (age <= lasts) markReach(record, origin, work + ((<usize>lane) << 3));
  if (age === 1) markReach(record, origin, work + <usize>patches * laneNumbers + ((<usize>lane) << 3));
}

function markReach(record: usize, origin: i32, flags: usize): void {
  const reach = operand(record, layout.strikeReach);
  if (reach < 0) {
    for (let patch = 0; patch < patches; patch++) store<f64>(flags + <usize>patch * laneNumbers, 1);
    return;
  }
  const end = i32At(section(reach), origin + 1);
  for (let i = i32At(section(reach), origin); i < end; i++) {
    store<f64>(flags + <usize>i32At(section(reach + 1), i) * laneNumbers, 1);
  }
}

/** Numbers that say how long ago the catastrophe began, before those of lowered capacities. */
function strikeAges(record: usize): i32 {
  const landscape = operand(record, layout.strikeOver) === layout.overLandscape;
  return landscape ? 2 : entries(operand(record, layout.strikeOrigins));
}

/** Each patch counts for itself the years since one last struck it. */
function lowerCapacities(ages: usize): void {
  const flags = work + <usize>patches * laneNumbers;
  for (let at: usize = 0; at < <usize>patches * laneNumbers; at += 8) {
    let age = load<f64>(ages + at);
    if (!weatherGiven) {
      if (age > 0) age += 1;
      if (load<f64>(flags + at) !== 0) age = 1;
      store<f64>(ages + at, age);
    }
    store<f64>(flags + at, age > 0 && age <= lowered ? 1 : 0);
  }
}

function writeSlots(record: usize): void {
  const slots = operand(record, layout.strikeSlots);
  const values = section(operand(record, layout.strikeValues));
  const ofRates = entries(slots) - operand(record, layout.strikeCapacitySlots);
  for (let k = 0; k < entries(slots); k++) {
    const first = slotValues + <usize>(i32At(section(slots), k) * patches) * laneNumbers;
    const flags = k < ofRates ? work : work + <usize>patches * laneNumbers;
    const value = f64At(values, k);
    for (let at: usize = 0; at < <usize>patches * laneNumbers; at += 8) {
      store<f64>(first + at, load<f64>(flags + at) !== 0 ? value : 1);
    }
  }
}
