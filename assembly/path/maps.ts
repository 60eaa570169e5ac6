// The means of the phases that act within a patch.
import { f64At, i32At, putF64 } from '../arrays';
import { classes, operand, patches, section, sectionAt } from '../image';
import * as layout from '../layout';
import { advanceShares } from '../phases/ageing';
import { crowdingFactor, crowdingShapeOf } from '../phases/crowding';
import { matingFactor } from '../phases/mating';
import { roomOf } from './weather';
import { add, animals, animalsIn, arrivals, scaleOf, slotValues, stateBytes, step } from './state';

export function meanBreeding(record: usize): void {
  const table = sectionAt(operand(record, layout.breedingBirths), step);
  const into = section(operand(record, layout.breedingInto));
  const lists = section(operand(record, layout.breedingSlots));
  const waiting = section(operand(record, layout.breedingWaitCounted));
  const places = sectionAt(operand(record, layout.breedingWaitCapacity), step);
  for (let patch = 0; patch < patches; patch++) {
    let young: f64 = 0;
    const mated = matedShare(record, patch);
    const share =
      waiting === 0
        ? 1
        : shareWithin(waiting, f64At(places, patch) * roomOf(operand(record, layout.breedingWaitRoom), patch), patch);
    for (let c = 0; c < classes; c++) {
      const births = f64At(table, patch * classes + c);
      if (births === 0) continue;
      const own = animalsIn(patch, c) * births * scaleOf(lists, c, patch) * mated;
      young += waiting !== 0 && i32At(waiting, c) !== 0 ? own * share : own;
    }
    for (let c = 0; c < classes; c++) add(animals, patch, c, young * f64At(into, c));
  }
}

export function meanSurvival(record: usize): void {
  const table = sectionAt(operand(record, layout.survivalRates), step);
  const lists = section(operand(record, layout.survivalSlots));
  for (let patch = 0; patch < patches; patch++) {
    for (let c = 0; c < classes; c++) {
      const at = (<usize>(patch * classes + c)) << 3;
      store<f64>(animals + at, load<f64>(animals + at) * load<f64>(table + at) * scaleOf(lists, c, patch));
    }
  }
}

export function meanAgeing(record: usize): void {
  const next = section(operand(record, layout.ageingNext));
  memory.fill(arrivals, 0, stateBytes());
  for (let patch = 0; patch < patches; patch++) {
    const advance = advanceShares(record, patch);
    for (let c = 0; c < classes; c++) {
      const going = animalsIn(patch, c) * f64At(advance, c);
      const to = i32At(next, c);
      add(arrivals, patch, c, animalsIn(patch, c) - going);
      if (to >= 0) add(arrivals, patch, to, going);
    }
  }
  memory.copy(animals, arrivals, stateBytes());
}

export function meanDemography(record: usize): void {
  memory.fill(arrivals, 0, stateBytes());
  const fates = sectionAt(operand(record, layout.demographyFates), step);
  const births = sectionAt(operand(record, layout.demographyBirths), step);
  for (let patch = 0; patch < patches; patch++) {
    for (let c = 0; c < classes; c++) {
      const first = (<usize>(patch * classes * classes + c)) << 3;
      const lives = scaleOf(section(operand(record, layout.demographyFateSlots)), c, patch);
      const breeds = scaleOf(section(operand(record, layout.demographyBirthSlots)), c, patch);
      for (let to = 0; to < classes; to++) {
        const at = first + ((<usize>(to * classes)) << 3);
        const each = load<f64>(fates + at) * lives + load<f64>(births + at) * breeds;
        if (each !== 0) add(arrivals, patch, to, animalsIn(patch, c) * each);
      }
    }
  }
  memory.copy(animals, arrivals, stateBytes());
}

function matedShare(record: usize, patch: i32): f64 {
  if (operand(record, layout.breedingMating) <= 0) return 1;
  const sexes = section(operand(record, layout.breedingSexes));
  let females: f64 = 0;
  let males: f64 = 0;
  for (let c = 0; c < classes; c++) {
    if (f64At(sexes, c) > 0) females += animalsIn(patch, c);
    if (f64At(sexes, c) < 0) males += animalsIn(patch, c);
  }
  return matingFactor(record, females, males);
}

/** min(1, K/N) of the counted animals of a patch. */
function shareWithin(counted: usize, capacity: f64, patch: i32): f64 {
  let all: f64 = 0;
  for (let c = 0; c < classes; c++) if (i32At(counted, c) !== 0) all += animalsIn(patch, c);
  return all > capacity ? capacity / all : 1;
}

export function meanCeiling(record: usize): void {
  const counted = section(operand(record, layout.ceilingCounted));
  const capacities = sectionAt(operand(record, layout.ceilingCapacity), step);
  const takes = operand(record, layout.ceilingTakes);
  if (takes === layout.takesNobody) return;
  for (let patch = 0; patch < patches; patch++) {
    const capacity = f64At(capacities, patch) * roomOf(operand(record, layout.ceilingRoom), patch);
    if (takes === layout.takesYoungest) takeYoungest(counted, capacity, patch);
    else takeAlike(counted, shareWithin(counted, capacity, patch), patch);
  }
}

function takeAlike(counted: usize, share: f64, patch: i32): void {
  if (share === 1) return;
  for (let c = 0; c < classes; c++) {
    const at = animals + ((<usize>(patch * classes + c)) << 3);
    if (i32At(counted, c) !== 0) store<f64>(at, load<f64>(at) * share);
  }
}

function takeYoungest(counted: usize, capacity: f64, patch: i32): void {
  let surplus = -capacity;
  for (let c = 0; c < classes; c++) if (i32At(counted, c) !== 0) surplus += animalsIn(patch, c);
  for (let c = 0; c < classes && surplus > 0; c++) {
    if (i32At(counted, c) === 0) continue;
    const taken = min<f64>(surplus, animalsIn(patch, c));
    add(animals, patch, c, -taken);
    surplus -= taken;
  }
}

export function meanCrowding(record: usize): void {
  const weights = section(operand(record, layout.crowdingWeights));
  const forms = section(operand(record, layout.crowdingForms));
  const coefficients = sectionAt(operand(record, layout.crowdingCoefficients), step);
  const halves = section(operand(record, layout.crowdingAlleeHalf));
  const shape = crowdingShapeOf(record);
  const slot = operand(record, layout.crowdingSlot);
  for (let patch = 0; patch < patches; patch++) {
    let all: f64 = 0;
    for (let c = 0; c < classes; c++) all += f64At(weights, c) * animalsIn(patch, c);
    const at = (<usize>patch) << 3;
    const form = i32At(forms, patch);
    const room = roomOf(operand(record, layout.crowdingRoom), patch);
    const factor = crowdingFactor(all, room, form, load<f64>(coefficients + at), load<f64>(halves + at), shape);
    putF64(slotValues, slot * patches + patch, factor);
  }
}
