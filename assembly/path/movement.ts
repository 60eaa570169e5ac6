// The mean of a dispersal.
import { f64At, i32At, putF64 } from '../arrays';
import { classes, operand, patches, section, sectionAt } from '../image';
import * as layout from '../layout';
import { add, animals, animalsIn, arrivals, moved, scaleOf, stateBytes, step } from './state';

export function meanDispersal(record: usize): void {
  const moves = section(operand(record, layout.dispersalMoves));
  const table = sectionAt(operand(record, layout.dispersalLeaving), step);
  const movement = sectionAt(operand(record, layout.dispersalMovement), step);
  const lists = section(operand(record, layout.dispersalSlots));
  movedHere = moved + ((<usize>operand(record, layout.dispersalWays)) << 3);
  memory.fill(arrivals, 0, stateBytes());
  for (let patch = 0; patch < patches; patch++) {
    for (let c = 0; c < classes; c++) {
      if (i32At(moves, c) === 0) continue;
      const leavers = animalsIn(patch, c) * f64At(table, patch * classes + c) * scaleOf(lists, c, patch);
      if (leavers === 0) continue;
      add(animals, patch, c, -leavers);
      send(movement, patch, c, leavers);
    }
  }
  for (let at: usize = 0; at < stateBytes(); at += 8) {
    store<f64>(animals + at, load<f64>(animals + at) + load<f64>(arrivals + at));
  }
}

/** Animals that arrived over the ways of this dispersal. */
let movedHere: usize = 0;

function send(movement: usize, patch: i32, c: i32, leavers: f64): void {
  const start = section(load<i32>(movement + (layout.movementStart << 2)));
  const ends = section(load<i32>(movement + (layout.movementTo << 2)));
  const chance = section(load<i32>(movement + (layout.movementChance << 2)));
  const end = i32At(start, patch + 1);
  for (let way = i32At(start, patch); way < end; way++) {
    const n = leavers * f64At(chance, way);
    add(arrivals, i32At(ends, way), c, n);
    putF64(movedHere, way, f64At(movedHere, way) + n);
  }
}
