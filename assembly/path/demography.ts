// The mean of a year in one matrix for each patch.
import { classes, operand, section, sectionAt } from '../image';
import * as layout from '../layout';
import { fillRow, ofPatches, scaleOf } from './rows';
import {
  beginComing,
  comingAt,
  giveSpare,
  putComing,
  rowAt,
  rowBytes,
  rowOfOnes,
  step,
  takeComing,
  takeSpare,
  workRow,
} from './state';
import { hasAny, rowOf, tableOf } from './tables';

export function meanDemography<N>(record: usize): void {
  const fates = tableOf(record, 0, sectionAt(operand(record, layout.demographyFates), step), classes * classes);
  const births = tableOf(record, 1, sectionAt(operand(record, layout.demographyBirths), step), classes * classes);
  beginComing();
  for (let c = 0; c < classes; c++) {
    putComing(c, takeSpare());
    fillRow(comingAt(c), 0);
  }
  for (let c = 0; c < classes; c++) {
    const lives = orOnes(scaleOf(section(operand(record, layout.demographyFateSlots)), c, workRow(0)));
    const breeds = orOnes(scaleOf(section(operand(record, layout.demographyBirthSlots)), c, workRow(1)));
    for (let to = 0; to < classes; to++) {
      const k = to * classes + c;
      if (!hasAny(fates, k) && !hasAny(births, k)) continue;
      addFates<N>(comingAt(to), rowAt(c), rowOf(fates, k), rowOf(births, k), lives, breeds);
    }
    giveSpare(rowAt(c));
  }
  takeComing();
}

function orOnes(row: usize): usize {
  return row === 0 ? workRow(rowOfOnes) : row;
}

/** target += animals × (fate × lives + birth × breeds) */
function addFates<N>(target: usize, animals: usize, fate: usize, birth: usize, lives: usize, breeds: usize): void {
  for (let at: usize = 0; at < rowBytes; at += 16) {
    const living = f64x2.mul(ofPatches<N>(fate, at), v128.load(lives + at));
    const each = f64x2.add(living, f64x2.mul(ofPatches<N>(birth, at), v128.load(breeds + at)));
    v128.store(target + at, f64x2.add(v128.load(target + at), f64x2.mul(v128.load(animals + at), each)));
  }
}
