// Growth of eight irreducible matrices of one pattern side by side, each from the vectors of a matrix that resembles it.
// A round solves (σI − A) z = x and t (σI − A) = y. Since Az = σz − x, every ratio (Az)ᵢ/zᵢ is σ − xᵢ/zᵢ: where all zᵢ have the same
// sign, the least and greatest of them enclose the growth (Collatz 1942, Wielandt 1950), and so do those of t. What they enclose is
// the growth and no other eigenvalue, since only its vectors are positive. The quotient tAz/tz is σ − tx/tz.
// σ stands a little above the quotient, with which digits triple from round to round (Ostrowski 1959), as long as the signs agree;
// else it is the upper bound, with which they do and which draws in from any start (Noda 1971). None of the eight knows the others.
import { f64At } from '../arrays';
import { eliminate, solve } from './eliminate';
import * as room from './room';

/** How close bounds have to come. */
const settledAt: f64 = 1e-12;
const mostRounds = 24;
/** How far above the quotient, of the way to the upper bound, where bounds lie far apart. */
const margin: f64 = 0.2;

/** f64 [8] each, in `steering`. */
const shiftAt: usize = 0;
const quotientAt: usize = 64;
const highAt: usize = 128;
const apartAt: usize = 192;
/** All bits where it is so. */
const trustingAt: usize = 256;
const doneAt: usize = 320;
const takenAt: usize = 384;
/** How much above the upper bound, where rounding has let it fall below the growth. */
const moreAt: usize = 448;
const growthAt: usize = 512;

/** Growth of each into `to`, f64 [8]; not a number where an entry is none above 0, or where the bounds did not close. */
export function iterate(to: usize): void {
  begin();
  for (let round = 0; round < mostRounds; round++) {
    choose();
    eliminate(room.steering + shiftAt);
    solve();
    let all = i64x2.splat(-1);
    let taken = all;
    for (let h: usize = 0; h < room.row; h += 16) {
      judge(h);
      all = v128.and(all, v128.load(room.steering + doneAt + h));
      taken = v128.and(taken, v128.load(room.steering + takenAt + h));
    }
    if (i64x2.all_true(all)) break;
    if (!i64x2.all_true(taken)) keepRest();
    room.swapVectors();
  }
  memory.copy(to, room.steering + growthAt, room.row);
}

/** Bounds and quotient of the vectors to start from, which are the same for all. */
function begin(): void {
  const vectors = room.starts();
  for (let i = 0; i < room.states; i++) {
    const place = <usize>i * room.row;
    const right = f64x2.splat(f64At(vectors, i));
    const left = f64x2.splat(f64At(vectors, room.states + i));
    for (let h: usize = 0; h < room.row; h += 16) {
      v128.store(room.right + place + h, right);
      v128.store(room.left + place + h, left);
    }
  }
  for (let h: usize = 0; h < room.row; h += 16) beginPair(h);
}

/** Entries row by row: how many, and where each stands on the tape. */
function beginPair(h: usize): void {
  const tape = room.tape + h;
  let at = room.entriesPart() + 4;
  let entryWeight = room.entryWeights();
  let rowWeight = room.rowWeights();
  let low = f64x2.splat(Infinity);
  let least = low;
  let high = f64x2.splat(0);
  let most = high;
  let quotient = high;
  for (let i = 0; i < room.states; i++) {
    let ratio = f64x2.splat(0);
    let entries = load<u32>(at);
    for (at += 4; entries > 0; entries--, at += 4, entryWeight += 8) {
      const entry = v128.load(tape + load<u32>(at));
      least = f64x2.pmin(least, entry);
      most = f64x2.pmax(most, entry);
      ratio = f64x2.add(ratio, f64x2.mul(entry, v128.load64_splat(entryWeight)));
    }
    low = f64x2.pmin(low, ratio);
    high = f64x2.pmax(high, ratio);
    quotient = f64x2.add(quotient, f64x2.mul(ratio, v128.load64_splat(rowWeight)));
    rowWeight += 8;
  }
  const own = room.steering + h;
  v128.store(own + quotientAt, quotient);
  v128.store(own + highAt, high);
  v128.store(own + apartAt, f64x2.div(f64x2.sub(high, low), high));
  v128.store(own + trustingAt, i64x2.splat(-1));
  v128.store(own + moreAt, f64x2.splat(0));
  v128.store(own + growthAt, f64x2.splat(NaN));
  const numbers = v128.and(f64x2.gt(least, f64x2.splat(0)), f64x2.lt(most, f64x2.splat(Infinity)));
  v128.store(own + doneAt, v128.not(v128.and(numbers, isNumber(quotient))));
}

/** σ of the next round; of those that are done one that makes nothing grow. */
function choose(): void {
  const one = f64x2.splat(1);
  for (let h: usize = 0; h < room.row; h += 16) {
    const own = room.steering + h;
    const high = v128.load(own + highAt);
    const quotient = v128.load(own + quotientAt);
    const little = f64x2.mul(f64x2.splat(margin), f64x2.min(one, v128.load(own + apartAt)));
    const close = f64x2.add(quotient, f64x2.mul(little, f64x2.sub(high, quotient)));
    const safe = f64x2.mul(high, f64x2.add(one, v128.load(own + moreAt)));
    const shift = v128.bitselect(close, safe, v128.load(own + trustingAt));
    v128.store(own + shiftAt, v128.bitselect(f64x2.add(high, high), shift, v128.load(own + doneAt)));
  }
}

/** What the vectors of this round say of two of them, and whether they are taken. */
function judge(h: usize): void {
  const own = room.steering + h;
  let at = h;
  let x = v128.load(room.right + at);
  let z = v128.load(room.nextRight + at);
  let t = v128.load(room.nextLeft + at);
  let lowRight = f64x2.div(x, z);
  let highRight = lowRight;
  let lowLeft = f64x2.div(v128.load(room.left + at), t);
  let highLeft = lowLeft;
  let above = f64x2.mul(t, x);
  let below = f64x2.mul(t, z);
  for (at += room.row; at < room.vector; at += room.row) {
    x = v128.load(room.right + at);
    z = v128.load(room.nextRight + at);
    t = v128.load(room.nextLeft + at);
    const ofRight = f64x2.div(x, z);
    const ofLeft = f64x2.div(v128.load(room.left + at), t);
    lowRight = f64x2.pmin(lowRight, ofRight);
    highRight = f64x2.pmax(highRight, ofRight);
    lowLeft = f64x2.pmin(lowLeft, ofLeft);
    highLeft = f64x2.pmax(highLeft, ofLeft);
    above = f64x2.add(above, f64x2.mul(t, x));
    below = f64x2.add(below, f64x2.mul(t, z));
  }
  const shift = v128.load(own + shiftAt);
  const high = f64x2.sub(shift, f64x2.max(lowRight, lowLeft));
  const low = f64x2.sub(shift, f64x2.min(highRight, highLeft));
  const apart = f64x2.max(
    f64x2.div(f64x2.sub(highRight, lowRight), f64x2.sub(shift, lowRight)),
    f64x2.div(f64x2.sub(highLeft, lowLeft), f64x2.sub(shift, lowLeft)),
  );
  const quotient = f64x2.sub(shift, f64x2.div(above, below));
  const signs = v128.and(sameSign(lowRight, highRight), sameSign(lowLeft, highLeft));
  const fine = v128.and(signs, isNumber(quotient));
  steer(own, fine, low, high, apart, quotient);
}

/** What is none on the way to it is none in the sums, whatever becomes of bounds: `pmin` and `pmax` pass it over. */
function isNumber(x: v128): v128 {
  return f64x2.eq(x, x);
}

function sameSign(low: v128, high: v128): v128 {
  const zero = f64x2.splat(0);
  return v128.or(f64x2.gt(low, zero), f64x2.lt(high, zero));
}

function steer(own: usize, fine: v128, low: v128, high: v128, apart: v128, quotient: v128): void {
  const trusting = v128.load(own + trustingAt);
  const done = v128.load(own + doneAt);
  const before = v128.load(own + apartAt);
  const more = v128.load(own + moreAt);
  const closer = v128.and(fine, f64x2.lt(apart, f64x2.mul(before, f64x2.splat(0.9))));
  // A round with the bound draws in, but not always by what is measured.
  const taken = v128.bitselect(closer, fine, trusting);
  const wider = f64x2.add(f64x2.mul(more, f64x2.splat(10)), f64x2.splat(1e-15));
  v128.store(own + moreAt, v128.bitselect(f64x2.splat(0), v128.bitselect(more, wider, trusting), taken));
  v128.store(own + quotientAt, v128.bitselect(quotient, v128.load(own + quotientAt), taken));
  v128.store(own + highAt, v128.bitselect(high, v128.load(own + highAt), taken));
  v128.store(own + apartAt, v128.bitselect(apart, before, taken));
  v128.store(own + trustingAt, taken);
  v128.store(own + takenAt, taken);
  const settled = v128.andnot(v128.and(taken, f64x2.le(apart, f64x2.splat(settledAt))), done);
  const held = f64x2.max(low, f64x2.min(high, quotient));
  v128.store(own + growthAt, v128.bitselect(held, v128.load(own + growthAt), settled));
  v128.store(own + doneAt, v128.or(done, settled));
}

/** Those whose vectors were not taken go on from the ones before. */
function keepRest(): void {
  keep(room.nextRight, room.right);
  keep(room.nextLeft, room.left);
}

function keep(next: usize, found: usize): void {
  for (let at: usize = 0; at < room.vector; at += 16) {
    const taken = v128.load(room.steering + takenAt + (at & (room.row - 1)));
    v128.store(next + at, v128.bitselect(v128.load(next + at), v128.load(found + at), taken));
  }
}
