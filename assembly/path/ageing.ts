// The mean of an ageing. Rows of animals go from class to class as they are; only where two come together are numbers added.
import { f64At, i32At } from '../arrays';
import { classes, operand, section } from '../image';
import * as layout from '../layout';
import { addRow, fillRow, ofPatches } from './rows';
import { beginComing, comingAt, giveSpare, putComing, rowAt, rowBytes, takeComing, takeSpare } from './state';
import { rowOf, tableOf } from './tables';

export function meanAgeing<N>(record: usize): void {
  const next = section(operand(record, layout.ageingNext));
  const advance = section(operand(record, layout.ageingAdvance));
  const byPatch = section(operand(record, layout.ageingByPatch));
  beginComing();
  for (let c = 0; c < classes; c++) {
    const to = i32At(next, c);
    const share = byPatch === 0 ? f64At(advance, c) : -1;
    if (share === 0) {
      come(c, rowAt(c));
    } else if (share === 1) {
      come(to, rowAt(c));
    } else {
      const going = takeSpare();
      if (byPatch === 0) part(rowAt(c), going, share);
      else partByPatch<N>(rowAt(c), going, rowOf(tableOf(record, 0, byPatch, classes), c));
      come(c, rowAt(c));
      come(to, going);
    }
  }
  for (let c = 0; c < classes; c++) {
    if (comingAt(c) !== 0) continue;
    putComing(c, takeSpare());
    fillRow(comingAt(c), 0);
  }
  takeComing();
}

/** A row comes into a class, or out of the model. */
function come(c: i32, row: usize): void {
  if (c >= 0 && comingAt(c) === 0) {
    putComing(c, row);
    return;
  }
  if (c >= 0) addRow(comingAt(c), row);
  giveSpare(row);
}

/** Moves this share of a row to `going`. */
function part(row: usize, going: usize, share: f64): void {
  const splat = f64x2.splat(share);
  for (let at: usize = 0; at < rowBytes; at += 16) split(row + at, going + at, splat);
}

function partByPatch<N>(row: usize, going: usize, shares: usize): void {
  for (let at: usize = 0; at < rowBytes; at += 16) split(row + at, going + at, ofPatches<N>(shares, at));
}

function split(cell: usize, going: usize, share: v128): void {
  const all = v128.load(cell);
  const leaving = f64x2.mul(all, share);
  v128.store(going, leaving);
  v128.store(cell, f64x2.sub(all, leaving));
}
