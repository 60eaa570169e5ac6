// Sixteen courses of mean animals side by side, each under the conditions that a lane of the batch has.
import { laneNumbers } from '../batch';
import { classes, patches } from '../image';
import { copyRow, fillRow } from './rows';
import { courseTotals, fillStart, heldCourses, rowAt, rowBytes, useCourses } from './state';
import { forgetTables } from './tables';

/** Puts the start into all courses; the tables of the image are read anew. */
export function startCourses(): void {
  forgetTables();
  useCourses();
  fillStart();
}

/** So many animals in each patch and class. */
export function fillCourses(each: f64): void {
  useCourses();
  for (let c = 0; c < classes; c++) fillRow(rowAt(c), each);
}

/** Puts the courses aside as they are. */
export function holdCourses(): void {
  useCourses();
  for (let c = 0; c < classes; c++) copyRow(heldCourses() + <usize>c * rowBytes, rowAt(c));
}

/** All animals of each course, patch by patch and class by class. */
export function sumCourses(): void {
  useCourses();
  const totals = courseTotals();
  memory.fill(totals, 0, laneNumbers);
  for (let patch = 0; patch < patches; patch++) {
    for (let c = 0; c < classes; c++) {
      const cell = rowAt(c) + <usize>patch * laneNumbers;
      for (let at: usize = 0; at < laneNumbers; at += 16) {
        v128.store(totals + at, f64x2.add(v128.load(totals + at), v128.load(cell + at)));
      }
    }
  }
}

/** Brings each course from its last sum to so many animals; one of nobody goes back to what was put aside. */
export function scaleCourses(wanted: f64): void {
  useCourses();
  for (let c = 0; c < classes; c++) {
    const row = rowAt(c);
    const before = heldCourses() + <usize>c * rowBytes;
    for (let at: usize = 0; at < rowBytes; at += laneNumbers) scaleCell(row + at, before + at, wanted);
  }
}

function scaleCell(cell: usize, before: usize, wanted: f64): void {
  const totals = courseTotals();
  const sizes = f64x2.splat(wanted);
  for (let at: usize = 0; at < laneNumbers; at += 16) {
    const total = v128.load(totals + at);
    const scaled = f64x2.mul(f64x2.div(v128.load(cell + at), total), sizes);
    v128.store(cell + at, v128.bitselect(scaled, v128.load(before + at), f64x2.gt(total, f64x2.splat(0))));
  }
}
