// Breeding: young of each breeding class by a Poisson draw or by another distribution of litters, shared over the classes that they enter.
import { f64At, putU32, u32At } from '../arrays';
import {
  animals,
  arrivals,
  cellBytes,
  counts,
  laneNumbers,
  moreCounts,
  numbers,
  rates,
  replicates,
  rowBytes,
  step,
  stopLane,
  words,
} from '../batch';
import { addCell, addNumbers, drawCell, multiplyByCell, occupied, scaledRates, subtractCell } from '../cells';
import { philoxLanes } from '../draws/philox';
import { poissonFour } from '../draws/poisson-four';
import { streamOf } from '../draws/stream';
import { classes, classKeys, operand, patches, patchKeys, section, sectionAt } from '../image';
import * as layout from '../layout';
import { fillRooms } from '../weather/room';
import { exceeds, removeSurplus } from './ceiling';
import { addLitters } from './litters';
import { readMating, scaleByMating } from './mating';

export function breed(record: usize): void {
  const table = sectionAt(operand(record, layout.breedingBirths), step);
  for (let patch = 0; patch < patches; patch++) {
    const row = animals + <usize>patch * rowBytes();
    if (!occupied(row, rowBytes())) continue;
    philoxLanes(words, replicates, step, u32At(patchKeys, patch), operand(record, layout.recordKey));
    const breeders = breedingRow(record, patch, row);
    const mating = operand(record, layout.breedingMating) > 0;
    // The room of the numbers serves for the males first.
    if (mating) readMating(record, row, numbers);
    memory.fill(numbers, 0, 128);
    for (let c = 0; c < classes; c++) {
      const births = f64At(table, patch * classes + c);
      const cell = breeders + <usize>c * cellBytes;
      if (births === 0 || !occupied(cell, cellBytes)) continue;
      scaledRates(rates, births, section(operand(record, layout.breedingSlots)), c, patch);
      if (mating) scaleByMating();
      if (operand(record, layout.breedingOffspring) > 0) addLitters(record, c, cell, u32At(classKeys, c));
      else addYoung(cell, streamOf(u32At(classKeys, c), layout.useYoung));
    }
    wholeYoung(operand(record, layout.recordIndex));
    shareOut(row, section(operand(record, layout.breedingOnward)));
  }
}

/** Those that breed: all, or a copy of the row without the surplus that waits. */
function breedingRow(record: usize, patch: i32, row: usize): usize {
  const counted = section(operand(record, layout.breedingWaitCounted));
  if (counted === 0) return row;
  const capacity = f64At(sectionAt(operand(record, layout.breedingWaitCapacity), step), patch);
  fillRooms(operand(record, layout.breedingWaitRoom), patch);
  if (!exceeds(row, counted, capacity)) return row;
  memory.copy(arrivals, row, rowBytes());
  removeSurplus(arrivals, counted, capacity, false);
  return arrivals;
}

/** numbers[lane] += the young of the animals in a cell. */
function addYoung(cell: usize, stream: u64): void {
  multiplyByCell(rates, cell);
  for (let quarter: usize = 0; quarter < laneNumbers; quarter += 32) {
    poissonFour(rates + quarter, words + quarter, stream);
  }
  addNumbers(numbers, rates);
}

/** counts[lane] = numbers[lane], where a replicate may have so many. */
function wholeYoung(index: i32): void {
  for (let lane = 0; lane < layout.lanes; lane++) {
    let young = f64At(numbers, lane);
    if (young > layout.mostAnimals) {
      stopLane(lane, layout.faultTooMany, index);
      young = 0;
    }
    putU32(counts, lane, u32(young));
  }
}

/** Adds the young to the classes that they enter, class by class; those left over enter the last with a share. */
function shareOut(row: usize, onward: usize): void {
  if (!occupied(counts, cellBytes)) return;
  for (let c = 0; c < classes; c++) {
    const share = f64At(onward, c);
    if (share <= 0) continue;
    const cell = row + <usize>c * cellBytes;
    if (share >= 1) {
      addCell(cell, counts);
      return;
    }
    scaledRates(rates, share, 0, c, 0);
    drawCell(moreCounts, counts, streamOf(u32At(classKeys, c), layout.useInto));
    addCell(cell, moreCounts);
    subtractCell(counts, moreCounts);
  }
}
