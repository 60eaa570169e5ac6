// What the host asks of a batch of replicates.
import { f64At, putF64, putU32, u32At } from './arrays';
import * as batch from './batch';
import { setSeed } from './draws/philox';
import { faultDetail, header, openImage, patches, slots } from './image';
import { faultMemory, faultNone, headerWeather, lanes } from './layout';
import { closePath } from './path/state';
import { advance, advanceUnder, advanceWeather, countStart } from './program';

/** Opens the image at this address, in memory that was reserved; a fault code where it cannot be run. */
export function open(address: usize, size: i32): i32 {
  const fault = openImage(address, size);
  if (fault !== faultNone) return fault;
  closePath();
  return batch.reserveBatch() ? faultNone : faultMemory;
}

export function faultSubject(): i32 {
  return faultDetail;
}

/** Puts the start into the first `count` lanes, whose replicate numbers stand at `replicates()`, and counts it. */
export function start(count: i32, seedLow: u32, seedHigh: u32): void {
  setSeed(seedLow, seedHigh);
  batch.setStep(0);
  batch.fillBatch(count);
  countStart();
}

export function step(): void {
  advance();
}

/** A step under the weather whose numbers of this step were put at `weatherNumbers()`. */
export function stepUnder(): void {
  advanceUnder();
}

/** f64 [number][lane]: what lasts of the weather, as it is after a step. */
export function weatherNumbers(): usize {
  return batch.weather;
}

/** The conditions of one more year without its animals, tables as in the first year: for growth in the long run. */
export function stepWeather(): void {
  advanceWeather();
}

/** So many steps; only the last count stays in `observed()`. */
export function run(steps: i32): void {
  for (let i = 0; i < steps; i++) advance();
}

export function replicates(): usize {
  return batch.replicates;
}
export function observed(): usize {
  return batch.observed;
}
export function stops(): usize {
  return batch.stops;
}
export function moved(): usize {
  return batch.moved;
}
export function animals(): usize {
  return batch.animals;
}

/** f64 [slot][patch][lane]: what conditions multiply rates by in this step. */
export function slotNumbers(): usize {
  return batch.slotValues;
}

/** Bytes of one lane's whole state, as `saveLane` writes it. */
export function laneBytes(): i32 {
  return 24 + i32(batch.stateBytes() / 16) + (slots * patches + header(headerWeather)) * 8;
}

/** Replicate number, stop (three words), step, animals, then what conditions hold, then the weather. */
export function saveLane(lane: i32, target: usize): void {
  store<u32>(target, u32At(batch.replicates, lane));
  memory.copy(target + 4, batch.stops + <usize>lane * 12, 12);
  store<i32>(target, batch.step, 16);
  let at = target + 24;
  for (let cell: usize = 0; cell < batch.stateBytes(); cell += batch.cellBytes) {
    store<u32>(at, u32At(batch.animals + cell, lane));
    at += 4;
  }
  for (let slot: usize = 0; slot < <usize>(slots * patches); slot++) {
    store<f64>(at, f64At(batch.slotValues + slot * batch.laneNumbers, lane));
    at += 8;
  }
  for (let number: usize = 0; number < batch.weatherBytes(); number += batch.laneNumbers) {
    store<f64>(at, f64At(batch.weather + number, lane));
    at += 8;
  }
}

/** Puts a saved state into a lane; false where it was saved at another step than the batch is at. */
export function restoreLane(lane: i32, source: usize): bool {
  if (load<i32>(source, 16) !== batch.step || lane >= lanes) return false;
  putU32(batch.replicates, lane, load<u32>(source));
  memory.copy(batch.stops + <usize>lane * 12, source + 4, 12);
  let at = source + 24;
  for (let cell: usize = 0; cell < batch.stateBytes(); cell += batch.cellBytes) {
    putU32(batch.animals + cell, lane, load<u32>(at));
    at += 4;
  }
  for (let slot: usize = 0; slot < <usize>(slots * patches); slot++) {
    putF64(batch.slotValues + slot * batch.laneNumbers, lane, load<f64>(at));
    at += 8;
  }
  for (let number: usize = 0; number < batch.weatherBytes(); number += batch.laneNumbers) {
    putF64(batch.weather + number, lane, load<f64>(at));
    at += 8;
  }
  return true;
}

/** For a batch that goes on from saved lanes. */
export function setBatchStep(t: i32): void {
  batch.setStep(t);
}
