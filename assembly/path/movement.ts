// The mean of a dispersal.
import { f64At, i32At, putF64 } from '../arrays';
import { classes, operand, patches, section, sectionAt } from '../image';
import * as layout from '../layout';
import { blockBytes, rowAt, rowBytes, rowOfOnes, step, workRow } from './state';
import { addRow, besides, first, fourth, scaleOf, second, third } from './rows';
import { sumOverPairs } from './pairs';
import { hasAny, placeAt, rowOf, tableOf } from './tables';
import { chancesOf, originsOf, pairsOf, readLists, readPairs, startsOf } from './ways';

const leavers: i32 = 0;
const arrived: i32 = 1;
const scales: i32 = 2;

export function meanDispersal<N>(record: usize): void {
  const moves = section(operand(record, layout.dispersalMoves));
  const table = tableOf(record, 0, sectionAt(operand(record, layout.dispersalLeaving), step), classes);
  const movement = sectionAt(operand(record, layout.dispersalMovement), step);
  const lists = section(operand(record, layout.dispersalSlots));
  for (let c = 0; c < classes; c++) {
    if (i32At(moves, c) === 0 || !hasAny(table, c)) continue;
    const scale = scaleOf(lists, c, workRow(scales));
    const finite = leave<N>(rowAt(c), workRow(leavers), rowOf(table, c), scale === 0 ? workRow(rowOfOnes) : scale);
    if (isVector<N>()) arriveInCourses(listsOf(record, movement));
    // Nobody times a number without end would be no number.
    else if (finite && placeAt(record, 2) !== 0)
      sumOverPairs(workRow(arrived), workRow(leavers), pairsIn(record, movement));
    else arriveOverLists(listsOf(record, movement));
    addRow(rowAt(c), workRow(arrived));
  }
}

function listsOf(record: usize, movement: usize): usize {
  readLists(placeAt(record, 1), movement);
  return placeAt(record, 1);
}

function pairsIn(record: usize, movement: usize): usize {
  readPairs(placeAt(record, 2), movement, rowBytes);
  return pairsOf(placeAt(record, 2));
}

/** Takes those that leave; whether all their numbers are finite. */
function leave<N>(row: usize, leaving: usize, rates: usize, scale: usize): bool {
  let sum = f64x2.splat(0);
  for (let at: usize = 0; at < rowBytes; at += blockBytes) {
    const n = row + at;
    const r = besides<N>(rates, at);
    const s = scale + at;
    const l = leaving + at;
    const l0 = f64x2.mul(f64x2.mul(v128.load(n), first<N>(r)), v128.load(s));
    const l1 = f64x2.mul(f64x2.mul(v128.load(n, 16), second<N>(r)), v128.load(s, 16));
    const l2 = f64x2.mul(f64x2.mul(v128.load(n, 32), third<N>(r)), v128.load(s, 32));
    const l3 = f64x2.mul(f64x2.mul(v128.load(n, 48), fourth<N>(r)), v128.load(s, 48));
    v128.store(n, f64x2.sub(v128.load(n), l0));
    v128.store(n, f64x2.sub(v128.load(n, 16), l1), 16);
    v128.store(n, f64x2.sub(v128.load(n, 32), l2), 32);
    v128.store(n, f64x2.sub(v128.load(n, 48), l3), 48);
    v128.store(l, l0);
    v128.store(l, l1, 16);
    v128.store(l, l2, 32);
    v128.store(l, l3, 48);
    sum = f64x2.add(sum, f64x2.add(f64x2.add(l0, l1), f64x2.add(l2, l3)));
  }
  const all = f64x2.extract_lane(sum, 0) + f64x2.extract_lane(sum, 1);
  return all - all === 0;
}

/** Sums over the ways that end in a patch, from the first origin on. */
function arriveOverLists(lists: usize): void {
  const starts = startsOf(lists);
  const origins = originsOf(lists);
  const chances = chancesOf(lists);
  const source = workRow(leavers);
  const target = workRow(arrived);
  for (let patch = 0; patch < patches; patch++) {
    const end = i32At(starts, patch + 1);
    let sum: f64 = 0;
    for (let way = i32At(starts, patch); way < end; way++) {
      sum += f64At(source, i32At(origins, way)) * f64At(chances, way);
    }
    putF64(target, patch, sum);
  }
}

/** The sums over lists for sixteen courses at a time. */
function arriveInCourses(lists: usize): void {
  const starts = startsOf(lists);
  const origins = originsOf(lists);
  const chances = chancesOf(lists);
  const source = workRow(leavers);
  let target = workRow(arrived);
  for (let patch = 0; patch < patches; patch++) {
    const end = i32At(starts, patch + 1);
    let s0 = f64x2.splat(0);
    let s1 = s0;
    let s2 = s0;
    let s3 = s0;
    let s4 = s0;
    let s5 = s0;
    let s6 = s0;
    let s7 = s0;
    for (let way = i32At(starts, patch); way < end; way++) {
      const chance = v128.load64_splat(chances + ((<usize>way) << 3));
      const from = source + ((<usize>i32At(origins, way)) << 7);
      s0 = f64x2.add(s0, f64x2.mul(v128.load(from), chance));
      s1 = f64x2.add(s1, f64x2.mul(v128.load(from, 16), chance));
      s2 = f64x2.add(s2, f64x2.mul(v128.load(from, 32), chance));
      s3 = f64x2.add(s3, f64x2.mul(v128.load(from, 48), chance));
      s4 = f64x2.add(s4, f64x2.mul(v128.load(from, 64), chance));
      s5 = f64x2.add(s5, f64x2.mul(v128.load(from, 80), chance));
      s6 = f64x2.add(s6, f64x2.mul(v128.load(from, 96), chance));
      s7 = f64x2.add(s7, f64x2.mul(v128.load(from, 112), chance));
    }
    v128.store(target, s0);
    v128.store(target, s1, 16);
    v128.store(target, s2, 32);
    v128.store(target, s3, 48);
    v128.store(target, s4, 64);
    v128.store(target, s5, 80);
    v128.store(target, s6, 96);
    v128.store(target, s7, 112);
    target += 128;
  }
}
