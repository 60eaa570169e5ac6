// The mean of a ceiling.
import { i32At } from '../arrays';
import { classes, operand, section, sectionAt } from '../image';
import * as layout from '../layout';
import { addRow, multiplyRow, ofPatches, roomOf, sumCounted } from './rows';
import { rowAt, rowBytes, rowOfOnes, step, workRow } from './state';
import { rowOf, tableOf } from './tables';

const shares: i32 = 3;
const rooms: i32 = 4;

export function meanCeiling<N>(record: usize): void {
  const takes = operand(record, layout.ceilingTakes);
  if (takes === layout.takesNobody) return;
  const counted = section(operand(record, layout.ceilingCounted));
  const capacities = rowOf(tableOf(record, 0, sectionAt(operand(record, layout.ceilingCapacity), step), 1), 0);
  const room = operand(record, layout.ceilingRoom);
  if (takes === layout.takesYoungest) takeYoungest<N>(counted, capacities, room);
  else takeAlike(counted, readShares<N>(counted, capacities, room));
}

/** The row of min(1, K/N) of the counted animals of each column. */
export function readShares<N>(counted: usize, capacities: usize, room: i32): usize {
  const target = workRow(shares);
  sumCounted(target, counted);
  const left = roomOr1(room);
  const one = f64x2.splat(1);
  for (let at: usize = 0; at < rowBytes; at += 16) {
    const all = v128.load(target + at);
    const capacity = f64x2.mul(ofPatches<N>(capacities, at), v128.load(left + at));
    v128.store(target + at, v128.bitselect(f64x2.div(capacity, all), one, f64x2.gt(all, capacity)));
  }
  return target;
}

function roomOr1(room: i32): usize {
  const left = roomOf(room, workRow(rooms));
  return left === 0 ? workRow(rowOfOnes) : left;
}

function takeAlike(counted: usize, share: usize): void {
  for (let c = 0; c < classes; c++) if (i32At(counted, c) !== 0) multiplyRow(rowAt(c), share);
}

function takeYoungest<N>(counted: usize, capacities: usize, room: i32): void {
  const left = roomOr1(room);
  const surplus = workRow(shares);
  for (let at: usize = 0; at < rowBytes; at += 16) {
    v128.store(surplus + at, f64x2.neg(f64x2.mul(ofPatches<N>(capacities, at), v128.load(left + at))));
  }
  for (let c = 0; c < classes; c++) if (i32At(counted, c) !== 0) addRow(surplus, rowAt(c));
  for (let c = 0; c < classes; c++) if (i32At(counted, c) !== 0) takeSurplus(rowAt(c), surplus);
}

/** Takes no more than there are, and tells the surplus. */
function takeSurplus(row: usize, surplus: usize): void {
  for (let at: usize = 0; at < rowBytes; at += 8) {
    const over = load<f64>(surplus + at);
    if (!(over > 0)) continue;
    const own = load<f64>(row + at);
    const taken = min<f64>(over, own);
    store<f64>(row + at, own - taken);
    store<f64>(surplus + at, over - taken);
  }
}
