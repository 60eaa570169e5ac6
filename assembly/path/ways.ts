// Ways of a dispersal as lists by the patch in which they end, and, where many pairs of patches have one, as a table of all pairs.
// Both keep the order of the patches in which ways begin, so that sums over them come out alike.
import { f64At, i32At, putF64, putU32 } from '../arrays';
import { operand, patches, section } from '../image';
import * as layout from '../layout';

/** A table pays where more than one pair in so many has a way. */
const pairsAWay: f64 = 4;
const mostPatchesOfTable: i32 = 4096;

/** Before the lists and before the table: the movement in the image that they are from. */
const headBytes: usize = 16;

function waysIn(movement: usize): i32 {
  return i32At(section(i32At(movement, layout.movementStart)), patches);
}

/** Bytes of the lists of a dispersal. */
export function listsBytes(record: usize): usize {
  const ways = waysIn(section(operand(record, layout.dispersalMovement)));
  return headBytes + aligned(patches + 1) + aligned(ways) + ((<usize>ways) << 3);
}

/** Bytes of the table of a dispersal; 0 where none pays. */
export function pairsBytes(record: usize, row: usize): usize {
  const ways = f64(waysIn(section(operand(record, layout.dispersalMovement))));
  const pays = patches <= mostPatchesOfTable && ways * pairsAWay > f64(patches) * f64(patches);
  return pays ? headBytes + <usize>patches * row : 0;
}

function aligned(words: i32): usize {
  return (((<usize>words) << 2) + 15) & ~(<usize>15);
}

/** i32 [patch + 1]: where the ways that end in a patch start. */
export function startsOf(lists: usize): usize {
  return lists + headBytes;
}

/** i32 [way]: the patch in which it begins. */
export function originsOf(lists: usize): usize {
  return startsOf(lists) + aligned(patches + 1);
}

/** f64 [way] */
export function chancesOf(lists: usize): usize {
  return originsOf(lists) + aligned(i32At(startsOf(lists), patches));
}

/** f64 [from][to] */
export function pairsOf(table: usize): usize {
  return table + headBytes;
}

export function readLists(lists: usize, movement: usize): void {
  if (load<usize>(lists) === movement) return;
  store<usize>(lists, movement);
  const starts = startsOf(lists);
  memory.fill(starts, 0, aligned(patches + 1));
  const outward = section(i32At(movement, layout.movementStart));
  const ends = section(i32At(movement, layout.movementTo));
  const chance = section(i32At(movement, layout.movementChance));
  const ways = i32At(outward, patches);
  for (let way = 0; way < ways; way++) {
    const to = i32At(ends, way) + 1;
    putU32(starts, to, i32At(starts, to) + 1);
  }
  for (let patch = 0; patch < patches; patch++) {
    putU32(starts, patch + 1, i32At(starts, patch) + i32At(starts, patch + 1));
  }
  const origins = originsOf(lists);
  const chances = chancesOf(lists);
  for (let from = 0; from < patches; from++) {
    const end = i32At(outward, from + 1);
    for (let way = i32At(outward, from); way < end; way++) {
      const to = i32At(ends, way);
      const place = i32At(starts, to);
      putU32(origins, place, from);
      putF64(chances, place, f64At(chance, way));
      putU32(starts, to, place + 1);
    }
  }
  // Each start has gone on to its end, which is the next start.
  for (let patch = patches; patch > 0; patch--) putU32(starts, patch, i32At(starts, patch - 1));
  putU32(starts, 0, 0);
}

export function readPairs(table: usize, movement: usize, row: usize): void {
  if (load<usize>(table) === movement) return;
  store<usize>(table, movement);
  const pairs = pairsOf(table);
  memory.fill(pairs, 0, <usize>patches * row);
  const outward = section(i32At(movement, layout.movementStart));
  const ends = section(i32At(movement, layout.movementTo));
  const chance = section(i32At(movement, layout.movementChance));
  for (let from = 0; from < patches; from++) {
    const target = pairs + <usize>from * row;
    const end = i32At(outward, from + 1);
    for (let way = i32At(outward, from); way < end; way++) putF64(target, i32At(ends, way), f64At(chance, way));
  }
}
