// The mean of a breeding.
import { f64At, i32At } from '../arrays';
import { classes, operand, section, sectionAt } from '../image';
import * as layout from '../layout';
import { matingFactor } from '../phases/mating';
import { readShares } from './ceiling';
import { addRow, besides, fillRow, first, fourth, multiplyRow, scaleByPatch, scaleOf, second, third } from './rows';
import { blockBytes, rowAt, rowBytes, step, workRow } from './state';
import { hasAny, patchRow, rowOf, tableOf } from './tables';

/** Rows for the phase at hand; `readShares` has those from 3 on. */
const young: i32 = 0;
const born: i32 = 1;
const mated: i32 = 2;
const scales: i32 = 5;

export function meanBreeding<N>(record: usize): void {
  const table = tableOf(record, 0, sectionAt(operand(record, layout.breedingBirths), step), classes);
  const lists = section(operand(record, layout.breedingSlots));
  const waiting = section(operand(record, layout.breedingWaitCounted));
  const mating = operand(record, layout.breedingMating) > 0;
  if (mating) readMated(record);
  const shares: usize = waiting === 0 ? 0 : readWaiting<N>(record, waiting);
  const all = workRow(young);
  if (!mating && shares === 0 && lists === 0) {
    sumBirths<N>(all, table);
  } else {
    fillRow(all, 0);
    for (let c = 0; c < classes; c++) {
      if (!hasAny(table, c)) continue;
      const own = workRow(born);
      scaleByPatch<N>(own, rowAt(c), rowOf(table, c), scaleOf(lists, c, workRow(scales)));
      if (mating) multiplyRow(own, workRow(mated));
      if (shares !== 0 && i32At(waiting, c) !== 0) multiplyRow(own, shares);
      addRow(all, own);
    }
  }
  addYoung(all, section(operand(record, layout.breedingInto)));
}

/** Young of all classes where nothing else decides how many there are. */
function sumBirths<N>(target: usize, table: usize): void {
  const rates = rowOf(table, 0);
  for (let at: usize = 0; at < rowBytes; at += blockBytes) {
    let s0 = f64x2.splat(0);
    let s1 = s0;
    let s2 = s0;
    let s3 = s0;
    for (let c = 0; c < classes; c++) {
      if (!hasAny(table, c)) continue;
      const n = rowAt(c) + at;
      const r = besides<N>(rates + <usize>c * patchRow, at);
      s0 = f64x2.add(s0, f64x2.mul(v128.load(n), first<N>(r)));
      s1 = f64x2.add(s1, f64x2.mul(v128.load(n, 16), second<N>(r)));
      s2 = f64x2.add(s2, f64x2.mul(v128.load(n, 32), third<N>(r)));
      s3 = f64x2.add(s3, f64x2.mul(v128.load(n, 48), fourth<N>(r)));
    }
    v128.store(target + at, s0);
    v128.store(target + at, s1, 16);
    v128.store(target + at, s2, 32);
    v128.store(target + at, s3, 48);
  }
}

function readWaiting<N>(record: usize, waiting: usize): usize {
  const places = tableOf(record, 1, sectionAt(operand(record, layout.breedingWaitCapacity), step), 1);
  return readShares<N>(waiting, rowOf(places, 0), operand(record, layout.breedingWaitRoom));
}

function addYoung(all: usize, into: usize): void {
  for (let c = 0; c < classes; c++) {
    const share = f64At(into, c);
    if (share === 1) addRow(rowAt(c), all);
    else if (share !== 0) addPart(rowAt(c), all, share);
  }
}

/** target += share × source */
function addPart(target: usize, source: usize, share: f64): void {
  const splat = f64x2.splat(share);
  for (let at: usize = 0; at < rowBytes; at += 16) {
    v128.store(target + at, f64x2.add(v128.load(target + at), f64x2.mul(v128.load(source + at), splat)));
  }
}

/** The share of the females of each column that find a male. */
function readMated(record: usize): void {
  const sexes = section(operand(record, layout.breedingSexes));
  const females = workRow(mated);
  const males = workRow(born);
  fillRow(females, 0);
  fillRow(males, 0);
  for (let c = 0; c < classes; c++) {
    if (f64At(sexes, c) > 0) addRow(females, rowAt(c));
    if (f64At(sexes, c) < 0) addRow(males, rowAt(c));
  }
  for (let at: usize = 0; at < rowBytes; at += 8) {
    store<f64>(females + at, matingFactor(record, load<f64>(females + at), load<f64>(males + at)));
  }
}
