// Ceiling: where more animals are counted than the patch holds, the surplus is removed: at random without replacement, or
// the youngest first.
import { f64At, i32At, u32At } from '../arrays';
import { animals, cellBytes, counts, replicates, rooms, rowBytes, step, words } from '../batch';
import { addCell } from '../cells';
import { hypergeometric } from '../draws/hypergeometric';
import { philoxLanes } from '../draws/philox';
import { finalise, firstWord, streamOf, unit } from '../draws/stream';
import { classes, classKeys, operand, patches, patchKeys, section, sectionAt } from '../image';
import * as layout from '../layout';
import { fillRooms } from '../weather/room';

export function limit(record: usize): void {
  const takes = operand(record, layout.ceilingTakes);
  if (takes === layout.takesNobody) return;
  const counted = section(operand(record, layout.ceilingCounted));
  const capacities = sectionAt(operand(record, layout.ceilingCapacity), step);
  for (let patch = 0; patch < patches; patch++) {
    const row = animals + <usize>patch * rowBytes();
    const capacity = f64At(capacities, patch);
    fillRooms(operand(record, layout.ceilingRoom), patch);
    if (!exceeds(row, counted, capacity)) continue;
    philoxLanes(words, replicates, step, u32At(patchKeys, patch), operand(record, layout.recordKey));
    removeSurplus(row, counted, capacity, takes === layout.takesYoungest);
  }
}

/** Whether any lane has more counted animals than what is left (`rooms`) of the capacity. */
export function exceeds(row: usize, counted: usize, capacity: f64): bool {
  countRow(row, counted);
  return anySurplus(capacity);
}

/** Removes the surplus from a row of animals whose numbers `exceeds` has counted; the random words of the patch are there. */
export function removeSurplus(row: usize, counted: usize, capacity: f64, youngest: bool): void {
  for (let lane: usize = 0; lane < <usize>layout.lanes; lane++) {
    const all = load<u32>(counts + (lane << 2));
    const surplus = surplusOf(all, capacity * load<f64>(rooms + (lane << 3)), words + (lane << 3));
    if (surplus === 0) continue;
    if (youngest) removeYoungest(row, counted, lane, surplus);
    else remove(row, counted, lane, surplus);
  }
}

function removeYoungest(row: usize, counted: usize, lane: usize, surplus: u32): void {
  for (let c = 0; c < classes && surplus !== 0; c++) {
    const at = row + <usize>c * cellBytes + (lane << 2);
    if (i32At(counted, c) === 0) continue;
    const taken = min<u32>(load<u32>(at), surplus);
    store<u32>(at, load<u32>(at) - taken);
    surplus -= taken;
  }
}

/** counts[lane] = the counted animals of a patch. */
function countRow(row: usize, counted: usize): void {
  memory.fill(counts, 0, cellBytes);
  for (let c = 0; c < classes; c++) {
    if (i32At(counted, c) !== 0) addCell(counts, row + <usize>c * cellBytes);
  }
}

function anySurplus(capacity: f64): bool {
  for (let lane: usize = 0; lane < <usize>layout.lanes; lane++) {
    if (f64(load<u32>(counts + (lane << 2))) > capacity * load<f64>(rooms + (lane << 3))) return true;
  }
  return false;
}

/** A capacity that is not whole holds one more with the chance of its fraction. */
function surplusOf(all: u32, capacity: f64, laneWords: usize): u32 {
  if (f64(all) <= capacity) return 0;
  let whole = floor<f64>(capacity);
  if (whole < capacity && word(laneWords, streamOf(0, layout.useCapacity)) < capacity - whole) whole += 1;
  return all - u32(whole);
}

function word(laneWords: usize, stream: u64): f64 {
  return unit(firstWord(finalise(load<u64>(laneWords) + stream), finalise(load<u64>(laneWords, 128) + stream)));
}

/** Class by class: how many of the surplus are of this class, given what the earlier classes gave. */
function remove(row: usize, counted: usize, lane: usize, surplus: u32): void {
  let all = load<u32>(counts + (lane << 2));
  for (let c = 0; c < classes && surplus !== 0; c++) {
    const at = row + <usize>c * cellBytes + (lane << 2);
    const n = load<u32>(at);
    if (i32At(counted, c) === 0 || n === 0) continue;
    const stream = streamOf(u32At(classKeys, c), layout.useRemove);
    const taken = hypergeometric(all, n, surplus, word(words + (lane << 3), stream));
    store<u32>(at, n - taken);
    all -= n;
    surplus -= taken;
  }
}
