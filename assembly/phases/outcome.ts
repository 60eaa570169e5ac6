// What an outcome looks at: weighted animals, summed over its patches, or the smallest or largest count of a patch.
import { f64At, i32At } from '../arrays';
import { animals, cellBytes, laneNumbers, moreNumbers, numbers, observed, rowBytes } from '../batch';
import { classes, operand, patches, section } from '../image';
import * as layout from '../layout';
import { addWeighted } from './crowding';

let weights: usize = 0;
let inside: usize = 0;
let rows: i32 = 1;
let over: i32 = layout.overSum;

export function countOutcome(record: usize, outcome: i32): void {
  open(record, outcome);
  const column = observed + <usize>(patches + 1 + outcome) * laneNumbers;
  memory.fill(column, 0, laneNumbers);
  if (over === layout.overSum) sumPatches(column);
  else comparePatches(column);
}

function open(record: usize, outcome: i32): void {
  const rules = section(operand(record, layout.countOutcomeRules));
  const rule = rules + ((<usize>(outcome * layout.ruleWords)) << 2);
  rows = rules === 0 ? 1 : i32At(rule, layout.ruleRows);
  over = rules === 0 ? layout.overSum : i32At(rule, layout.ruleOver);
  const first = rules === 0 ? outcome : i32At(rule, layout.ruleFirstWeights);
  weights = section(operand(record, layout.countOutcomeWeights)) + ((<usize>(first * classes)) << 3);
  inside = section(operand(record, layout.countOutcomePatches)) + ((<usize>(outcome * patches)) << 2);
}

/** Of each row of weights the sum over the patches; the smallest of them. */
function sumPatches(column: usize): void {
  for (let row = 0; row < rows; row++) {
    const target = row === 0 ? column : moreNumbers;
    memory.fill(target, 0, laneNumbers);
    for (let patch = 0; patch < patches; patch++) {
      if (i32At(inside, patch) === 0) continue;
      addRow(target, patch, row);
    }
    if (row > 0) takeSmaller(column, moreNumbers);
  }
}

/** Of each patch the smallest of its rows of weights; the smallest or largest of them. */
function comparePatches(column: usize): void {
  let found = false;
  for (let patch = 0; patch < patches; patch++) {
    if (i32At(inside, patch) === 0) continue;
    weighRow(numbers, patch, 0);
    for (let row = 1; row < rows; row++) {
      weighRow(moreNumbers, patch, row);
      takeSmaller(numbers, moreNumbers);
    }
    if (!found) memory.copy(column, numbers, laneNumbers);
    else if (over === layout.overSmallest) takeSmaller(column, numbers);
    else takeLarger(column, numbers);
    found = true;
  }
}

function weighRow(target: usize, patch: i32, row: i32): void {
  memory.fill(target, 0, laneNumbers);
  addRow(target, patch, row);
}

function addRow(target: usize, patch: i32, row: i32): void {
  const cells = animals + <usize>patch * rowBytes();
  const own = weights + ((<usize>(row * classes)) << 3);
  for (let c = 0; c < classes; c++) {
    const weight = f64At(own, c);
    if (weight !== 0) addWeighted(target, cells + <usize>c * cellBytes, weight);
  }
}

function takeSmaller(target: usize, other: usize): void {
  for (let at: usize = 0; at < laneNumbers; at += 16) {
    v128.store(target + at, f64x2.pmin(v128.load(target + at), v128.load(other + at)));
  }
}

function takeLarger(target: usize, other: usize): void {
  for (let at: usize = 0; at < laneNumbers; at += 16) {
    v128.store(target + at, f64x2.pmax(v128.load(target + at), v128.load(other + at)));
  }
}
