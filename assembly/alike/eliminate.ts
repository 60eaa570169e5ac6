// Solves (σI − A) z = x and t (σI − A) = y for eight matrices of one pattern, by elimination without exchange of rows: for σ above
// the growth, σI − A is an M-matrix, whose pivots are all positive and whose elimination loses no digits. Which entries there are,
// in which order they go, and what fills in, was decided once; this follows it.
import * as room from './room';

/** factors = σI − A, eliminated: multipliers below the diagonal, the upper triangle above it; `shift` is f64 [8]. */
export function eliminate(shift: usize): void {
  shiftAll(shift);
  const factors = room.factors;
  let at = room.eliminationPart();
  let pivot = room.pivots;
  const end = pivot + room.vector;
  for (; pivot < end; pivot += room.row) {
    // Of a row: its first slot, that of its diagonal, how many entries stand below it.
    let slot = factors + load<u32>(at);
    const diagonal = factors + load<u32>(at, 4);
    let below = load<u32>(at, 8);
    for (at += 12; below > 0; below--, slot += room.row) {
      const over = room.pivots + load<u32>(at);
      let source = factors + load<u32>(at, 4);
      let updates = load<u32>(at, 8);
      const m0 = f64x2.mul(v128.load(slot), v128.load(over));
      const m1 = f64x2.mul(v128.load(slot, 16), v128.load(over, 16));
      const m2 = f64x2.mul(v128.load(slot, 32), v128.load(over, 32));
      const m3 = f64x2.mul(v128.load(slot, 48), v128.load(over, 48));
      v128.store(slot, m0);
      v128.store(slot, m1, 16);
      v128.store(slot, m2, 32);
      v128.store(slot, m3, 48);
      for (at += 12; updates > 0; updates--, at += 4, source += room.row) {
        const to = factors + load<u32>(at);
        v128.store(to, f64x2.sub(v128.load(to), f64x2.mul(m0, v128.load(source))));
        v128.store(to, f64x2.sub(v128.load(to, 16), f64x2.mul(m1, v128.load(source, 16))), 16);
        v128.store(to, f64x2.sub(v128.load(to, 32), f64x2.mul(m2, v128.load(source, 32))), 32);
        v128.store(to, f64x2.sub(v128.load(to, 48), f64x2.mul(m3, v128.load(source, 48))), 48);
      }
    }
    invert(pivot, diagonal, shift);
  }
}

/** A pivot of 0 means that σ is an eigenvalue to the last digit; a tiny one gives its vector. */
function invert(pivot: usize, diagonal: usize, shift: usize): void {
  for (let h: usize = 0; h < room.row; h += 16) {
    const least = f64x2.mul(v128.load(shift + h), f64x2.splat(1e-17));
    const own = v128.load(diagonal + h);
    const safe = v128.bitselect(least, own, f64x2.lt(f64x2.abs(own), least));
    v128.store(pivot + h, f64x2.div(f64x2.splat(1), safe));
  }
}

/** The entries in their slots, negative; 0 where elimination fills in. */
function shiftAll(shift: usize): void {
  let at = room.loadsPart();
  const tape = room.tape;
  let to = room.factors;
  for (let slots = load<u32>(at); slots > 0; slots--, to += room.row) {
    const from = tape + load<u32>(at, 4);
    v128.store(to, f64x2.neg(v128.load(from)));
    v128.store(to, f64x2.neg(v128.load(from, 16)), 16);
    v128.store(to, f64x2.neg(v128.load(from, 32)), 32);
    v128.store(to, f64x2.neg(v128.load(from, 48)), 48);
    at += 4;
  }
  at = room.rowsPart();
  for (let i = 0; i < room.states; i++, at += 20) {
    const diagonal = room.factors + load<u32>(at, 4);
    for (let h: usize = 0; h < room.row; h += 16) {
      v128.store(diagonal + h, f64x2.add(v128.load(diagonal + h), v128.load(shift + h)));
    }
  }
}

/** nextRight and nextLeft from right and left, on one way down and one up. */
export function solve(): void {
  memory.copy(room.nextRight, room.right, room.vector);
  memory.copy(room.nextLeft, room.left, room.vector);
  const rows = room.rowsPart();
  let place: usize = 0;
  for (let i = 0; i < room.states; i++, place += room.row) goDown(rows + <usize>i * 20, place);
  for (let i = room.states - 1; i >= 0; i--) {
    place -= room.row;
    goUp(rows + <usize>i * 20, place);
  }
}

/** Of a row: its first slot, that of its diagonal, entries below and above, and where the places of their columns stand. */
function goDown(own: usize, place: usize): void {
  let slot = room.factors + load<u32>(own);
  let column = room.program + load<u32>(own, 16);
  slot = takeDot(room.nextRight, place, slot, column, load<u32>(own, 8));
  column += (<usize>load<u32>(own, 8)) << 2;
  scaleBy(room.nextLeft + place, room.pivots + place);
  spread(room.nextLeft, place, slot + room.row, column, load<u32>(own, 12));
}

function goUp(own: usize, place: usize): void {
  const below = load<u32>(own, 8);
  const column = room.program + load<u32>(own, 16);
  const above = room.factors + load<u32>(own, 4) + room.row;
  takeDot(room.nextRight, place, above, column + ((<usize>below) << 2), load<u32>(own, 12));
  scaleBy(room.nextRight + place, room.pivots + place);
  spread(room.nextLeft, place, room.factors + load<u32>(own), column, below);
}

function scaleBy(target: usize, factor: usize): void {
  for (let h: usize = 0; h < room.row; h += 16) {
    v128.store(target + h, f64x2.mul(v128.load(target + h), v128.load(factor + h)));
  }
}

/** vector[place] −= Σ slots · vector[columns]; the slot after the last. */
function takeDot(vector: usize, place: usize, slot: usize, column: usize, many: u32): usize {
  const target = vector + place;
  let s0 = v128.load(target);
  let s1 = v128.load(target, 16);
  let s2 = v128.load(target, 32);
  let s3 = v128.load(target, 48);
  for (; many > 0; many--, column += 4, slot += room.row) {
    const from = vector + load<u32>(column);
    s0 = f64x2.sub(s0, f64x2.mul(v128.load(slot), v128.load(from)));
    s1 = f64x2.sub(s1, f64x2.mul(v128.load(slot, 16), v128.load(from, 16)));
    s2 = f64x2.sub(s2, f64x2.mul(v128.load(slot, 32), v128.load(from, 32)));
    s3 = f64x2.sub(s3, f64x2.mul(v128.load(slot, 48), v128.load(from, 48)));
  }
  v128.store(target, s0);
  v128.store(target, s1, 16);
  v128.store(target, s2, 32);
  v128.store(target, s3, 48);
  return slot;
}

/** vector[columns] −= slots · vector[place]. */
function spread(vector: usize, place: usize, slot: usize, column: usize, many: u32): void {
  const from = vector + place;
  const s0 = v128.load(from);
  const s1 = v128.load(from, 16);
  const s2 = v128.load(from, 32);
  const s3 = v128.load(from, 48);
  for (; many > 0; many--, column += 4, slot += room.row) {
    const to = vector + load<u32>(column);
    v128.store(to, f64x2.sub(v128.load(to), f64x2.mul(s0, v128.load(slot))));
    v128.store(to, f64x2.sub(v128.load(to, 16), f64x2.mul(s1, v128.load(slot, 16))), 16);
    v128.store(to, f64x2.sub(v128.load(to, 32), f64x2.mul(s2, v128.load(slot, 32))), 32);
    v128.store(to, f64x2.sub(v128.load(to, 48), f64x2.mul(s3, v128.load(slot, 48))), 48);
  }
}
