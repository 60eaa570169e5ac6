// Mean animals as rows of numbers, class by class: of the path without chance, whose columns are the patches, or of sixteen courses
// side by side, whose columns are the courses of the first patch, of the second, and so on. One of the two is at hand.
import { f64At, i32At, putF64 } from '../arrays';
import * as batch from '../batch';
import { classes, header, patches, section, slots } from '../image';
import { headerStart, lanes } from '../layout';
import { reserve } from '../memory';
import { patchRow, reserveTables } from './tables';

/** Bytes of a row: whole blocks. */
export let rowBytes: usize = 0;
/** Columns of a patch. */
export let width: i32 = 1;
export let step: i32 = 0;
/** f64 [slot][column] */
export let slotValues: usize = 0;
/** usize [class]: the row of its animals */
let rows: usize = 0;
/** usize [2][class]: rows that hold nothing; as many as there are classes between phases */
let spares: usize = 0;
let spareCount: i32 = 0;
/** usize [class]: the next state as far as it is known; 0 for a class of which nothing is */
let coming: usize = 0;
/** f64 [row][column] */
let work: usize = 0;

/** Bytes that loops over a row take at a time. */
export const blockBytes: usize = 64;
const workRows: i32 = 7;
export const rowOfOnes: i32 = 6;

/** What belongs to the path and to the courses; 0 where there is no room yet. */
let ofPath: usize = 0;
let ofCourses: usize = 0;
let pathSlots: usize = 0;
let plain: usize = 0;
let held: usize = 0;
let totals: usize = 0;

/** Forgets what belongs to another image. */
export function closePath(): void {
  ofPath = 0;
  ofCourses = 0;
}

/** Room for the path; false where the memory cannot grow so far. */
export function openPath(): bool {
  if (ofPath !== 0) return true;
  plain = reserve((<usize>patches * classes) << 3);
  if (plain === 0 || !reserveTables()) return false;
  pathSlots = reserve(<usize>slots * patchRow);
  ofPath = pathSlots === 0 ? 0 : reserveState(patchRow);
  if (ofPath !== 0) memory.fill(pathSlots, 0, <usize>slots * patchRow);
  return ofPath !== 0;
}

/** Room for sixteen courses; false where the memory cannot grow so far. */
export function openCourses(): bool {
  if (ofCourses !== 0) return true;
  if (!openPath()) return false;
  held = reserve(<usize>classes * courseRow());
  totals = reserve(batch.laneNumbers);
  ofCourses = held === 0 || totals === 0 ? 0 : reserveState(courseRow());
  return ofCourses !== 0;
}

function courseRow(): usize {
  return <usize>patches * batch.laneNumbers;
}

/** Lists of rows, then the rows of all animals, as many spare ones, and those for work. */
function reserveState(row: usize): usize {
  const bytes = listBytes() * 4 + (2 * <usize>classes + <usize>workRows) * row;
  const state = reserve(bytes);
  if (state === 0) return 0;
  memory.fill(state, 0, bytes);
  const first = state + listBytes() * 4;
  for (let c: usize = 0; c < <usize>classes; c++) {
    store<usize>(state + (c << 2), first + c * row);
    store<usize>(state + listBytes() + (c << 2), first + (<usize>classes + c) * row);
  }
  const ones = first + (2 * <usize>classes + <usize>rowOfOnes) * row;
  for (let at: usize = 0; at < row; at += 8) store<f64>(ones + at, 1);
  return state;
}

function listBytes(): usize {
  return (((<usize>classes) << 2) + 15) & ~(<usize>15);
}

export function usePath(t: i32): void {
  step = t;
  width = 1;
  rowBytes = patchRow;
  slotValues = pathSlots;
  use(ofPath);
}

/** In the first year, for good. */
export function useCourses(): void {
  step = 1;
  width = lanes;
  rowBytes = courseRow();
  slotValues = batch.slotValues;
  use(ofCourses);
}

function use(state: usize): void {
  rows = state;
  spares = state + listBytes();
  coming = spares + 2 * listBytes();
  work = coming + listBytes() + 2 * <usize>classes * rowBytes;
  spareCount = classes;
}

/** Where the animals of a class stand. */
export function rowAt(c: i32): usize {
  return load<usize>(rows + ((<usize>c) << 2));
}

export function cellAt(c: i32, column: i32): usize {
  return rowAt(c) + ((<usize>column) << 3);
}

/** A row for the phase at hand. */
export function workRow(k: i32): usize {
  return work + <usize>k * rowBytes;
}

/** A row that nobody uses; its numbers may be any. */
export function takeSpare(): usize {
  spareCount -= 1;
  return load<usize>(spares + ((<usize>spareCount) << 2));
}

export function giveSpare(row: usize): void {
  store<usize>(spares + ((<usize>spareCount) << 2), row);
  spareCount += 1;
}

/** The next state begins. Until `takeComing` every row of animals must become that of a class, or a spare one. */
export function beginComing(): void {
  memory.fill(coming, 0, listBytes());
}

export function comingAt(c: i32): usize {
  return load<usize>(coming + ((<usize>c) << 2));
}

export function putComing(c: i32, row: usize): void {
  store<usize>(coming + ((<usize>c) << 2), row);
}

/** The next state is the state. */
export function takeComing(): void {
  for (let c: usize = 0; c < <usize>classes; c++) store<usize>(rows + (c << 2), load<usize>(coming + (c << 2)));
}

/** Animals at the start, class by class for each column of a patch. */
export function fillStart(): void {
  const start = section(header(headerStart));
  for (let patch = 0; patch < patches; patch++) {
    for (let c = 0; c < classes; c++) {
      const n = f64(i32At(start, patch * classes + c));
      for (let k = 0; k < width; k++) store<f64>(cellAt(c, patch * width + k), n);
    }
  }
}

/** f64 [patch][class]: where the host reads and writes the animals of the path. */
export function pathAnimals(): usize {
  return plain;
}

/** Puts the animals of the path where the host reads them. */
export function readPath(): void {
  usePath(step);
  for (let patch = 0; patch < patches; patch++) {
    for (let c = 0; c < classes; c++) putF64(plain, patch * classes + c, load<f64>(cellAt(c, patch)));
  }
}

/** Takes the animals of the path from where the host wrote them. */
export function writePath(): void {
  usePath(step);
  for (let patch = 0; patch < patches; patch++) {
    for (let c = 0; c < classes; c++) store<f64>(cellAt(c, patch), f64At(plain, patch * classes + c));
  }
}

/** f64 [course]: all its animals when they were last summed. */
export function courseTotals(): usize {
  return totals;
}

/** f64 [class][patch][course]: the courses as they were last put aside. */
export function heldCourses(): usize {
  return held;
}
