// Dispersal: a binomial draw of those that leave, then for each of them where the way ends. All move at once.
import { f64At, i32At, putF64, u32At } from '../arrays';
import * as batch from '../batch';
import { addCell, drawCell, occupied, scaledRates, subtractCell } from '../cells';
import { binomial } from '../draws/binomial';
import { philoxLanes } from '../draws/philox';
import { finalise, firstWord, streamOf, substreamOf, unit } from '../draws/stream';
import { classes, classKeys, operand, patches, patchKeys, section, sectionAt } from '../image';
import * as layout from '../layout';

let start: usize = 0;
let ends: usize = 0;
let onward: usize = 0;
let aliasStart: usize = 0;
let aliasKeep: usize = 0;
let aliasEnds: usize = 0;

/** Above so many leavers a column of the alias table, one binomial draw a destination costs less than a pick a leaver. */
const manyPerColumn: u32 = 5;

export function disperse(record: usize): void {
  const moves = section(operand(record, layout.dispersalMoves));
  moved = batch.moved + ((<usize>operand(record, layout.dispersalWays)) << 3);
  openMovement(sectionAt(operand(record, layout.dispersalMovement), batch.step));
  memory.fill(batch.arrivals, 0, batch.stateBytes());
  for (let patch = 0; patch < patches; patch++) leavePatch(record, patch, moves);
  for (let patch = 0; patch < patches; patch++) {
    for (let c = 0; c < classes; c++) {
      if (i32At(moves, c) === 0) continue;
      const at = <usize>(patch * classes + c) * batch.cellBytes;
      addCell(batch.animals + at, batch.arrivals + at);
    }
  }
}

function openMovement(movement: usize): void {
  start = section(load<i32>(movement + (layout.movementStart << 2)));
  ends = section(load<i32>(movement + (layout.movementTo << 2)));
  onward = section(load<i32>(movement + (layout.movementOnward << 2)));
  aliasStart = section(load<i32>(movement + (layout.movementAliasStart << 2)));
  const keepRow = load<i32>(movement + (layout.movementAlias << 2));
  aliasKeep = section(keepRow);
  aliasEnds = section(keepRow + 1);
}

function leavePatch(record: usize, patch: i32, moves: usize): void {
  const row = batch.animals + <usize>patch * batch.rowBytes();
  if (!occupied(row, batch.rowBytes())) return;
  const leaving = sectionAt(operand(record, layout.dispersalLeaving), batch.step);
  const key = u32At(patchKeys, patch);
  philoxLanes(batch.words, batch.replicates, batch.step, key, operand(record, layout.recordKey));
  for (let c = 0; c < classes; c++) {
    const share = f64At(leaving, patch * classes + c);
    const cell = row + <usize>c * batch.cellBytes;
    if (i32At(moves, c) === 0 || share === 0 || !occupied(cell, batch.cellBytes)) continue;
    const classKey = u32At(classKeys, c);
    scaledRates(batch.rates, share, section(operand(record, layout.dispersalSlots)), c, patch);
    drawCell(batch.counts, cell, streamOf(classKey, layout.useLeave));
    subtractCell(cell, batch.counts);
    sendAll(patch, c, streamOf(classKey, layout.useTravel), streamOf(classKey, layout.useSpread));
  }
}

function sendAll(patch: i32, c: i32, travel: u64, spreading: u64): void {
  const first = i32At(aliasStart, patch);
  const width = i32At(aliasStart, patch + 1) - first;
  if (width === 0) return;
  const target = batch.arrivals + <usize>c * batch.cellBytes;
  const largest = mostOfLanes();
  if (largest === 0) return;
  if (largest <= min<u32>(manyPerColumn * width, fewLeavers)) {
    pickTogether(largest, target, first, width, travel);
    return;
  }
  for (let lane: usize = 0; lane < <usize>layout.lanes; lane++) {
    const leavers = load<u32>(batch.counts + (lane << 2));
    if (leavers === 0) continue;
    laneTarget = target + (lane << 2);
    const at = batch.words + (lane << 3);
    if (leavers > manyPerColumn * width) {
      spread(leavers, patch, at, spreading);
    } else {
      pick(leavers, first, width, finalise(load<u64>(at) + travel), finalise(load<u64>(at, 128) + travel));
    }
  }
}

/** Leavers of a lane that `pickTogether` takes at most. */
const fewLeavers: u32 = 32;
/** i32 [pick]: the lane of each, with room for a last one's. u64 [lane][2]: states of the streams. */
const pickLanes = memory.data(4 * (16 * 32 + 32), 16);
const pickStates = memory.data(16 * 16, 16);

/** The largest number of leavers in a lane. */
function mostOfLanes(): u32 {
  const low = i32x4.max_u(v128.load(batch.counts), v128.load(batch.counts, 16));
  const high = i32x4.max_u(v128.load(batch.counts, 32), v128.load(batch.counts, 48));
  const four = i32x4.max_u(low, high);
  const two = i32x4.max_u(four, i32x4.shuffle(four, four, 2, 3, 0, 1));
  return max<u32>(i32x4.extract_lane(two, 0), i32x4.extract_lane(two, 1));
}

/**
 * The same picks as `pick`, those of all lanes in one list, without a branch that depends on chance: a processor that guesses
 * wrong loses more than a pick costs.
 */
function pickTogether(largest: u32, target: usize, first: i32, width: i32, stream: u64): void {
  let end = pickLanes;
  for (let lane = 0; lane < layout.lanes; lane++) {
    const at = batch.words + ((<usize>lane) << 3);
    const state = pickStates + ((<usize>lane) << 4);
    store<u64>(state, finalise(load<u64>(at) + stream));
    store<u64>(state, finalise(load<u64>(at, 128) + stream), 8);
    const same = i32x4.splat(lane);
    for (let at: usize = 0; at < (<usize>largest) << 2; at += 16) v128.store(end + at, same);
    end += (<usize>load<u32>(batch.counts + ((<usize>lane) << 2))) << 2;
  }
  const keep = aliasKeep + ((<usize>first) << 3);
  const both = aliasEnds + ((<usize>first) << 3);
  const row = batch.rowBytes();
  for (let next = pickLanes; next < end; next += 4) {
    const lane = <usize>load<u32>(next);
    const state = pickStates + (lane << 4);
    const s0 = load<u64>(state);
    const s1 = load<u64>(state, 8);
    const position = unit(firstWord(s0, s1)) * f64(width);
    const column = <usize>i32(position);
    const other = <usize>(position - f64(column) >= load<f64>(keep + (column << 3)));
    const way = load<i32>(both + (column << 3) + (other << 2));
    // -1 is death on the way: nobody arrives over the first.
    const nobody = way >> 31;
    const taken = way & ~nobody;
    const at = target + (lane << 2) + <usize>i32At(ends, taken) * row;
    store<i32>(at, load<i32>(at) + 1 + nobody);
    putF64(moved, taken, f64At(moved, taken) + f64(1 + nobody));
    const t = s1 ^ s0;
    store<u64>(state, rotl<u64>(s0, 49) ^ t ^ (t << 21));
    store<u64>(state, rotl<u64>(t, 28), 8);
  }
}

/** Where the arrivals of the class and lane at hand stand for the first patch. */
let laneTarget: usize = 0;

/** Animals that arrived over the ways of this dispersal. */
let moved: usize = 0;

function arrive(way: i32, n: u32): void {
  const at = laneTarget + <usize>i32At(ends, way) * batch.rowBytes();
  store<u32>(at, load<u32>(at) + n);
  putF64(moved, way, f64At(moved, way) + f64(n));
}

/** An alias pick (Walker 1977) for each leaver: a column, and which of its two ends. */
function pick(leavers: u32, first: i32, width: i32, s0: u64, s1: u64): void {
  const keep = aliasKeep + ((<usize>first) << 3);
  const both = aliasEnds + ((<usize>first) << 3);
  for (let i: u32 = 0; i < leavers; i++) {
    const position = unit(firstWord(s0, s1)) * f64(width);
    const column = <usize>i32(position);
    const other = <usize>(position - f64(column) >= load<f64>(keep + (column << 3)));
    const way = load<i32>(both + (column << 3) + (other << 2));
    if (way >= 0) arrive(way, 1);
    const t = s1 ^ s0;
    s0 = rotl<u64>(s0, 49) ^ t ^ (t << 21);
    s1 = rotl<u64>(t, 28);
  }
}

/** A binomial draw for each destination out of those not placed yet; who is left over dies on the way. */
function spread(leavers: u32, patch: i32, laneWords: usize, stream: u64): void {
  const end = i32At(start, patch + 1);
  for (let way = i32At(start, patch); way < end && leavers !== 0; way++) {
    const own = substreamOf(stream, u32At(patchKeys, i32At(ends, way)));
    const n = binomial(leavers, f64At(onward, way), load<u64>(laneWords), load<u64>(laneWords, 128), own);
    arrive(way, n);
    leavers -= n;
  }
}
