// Columns of numbers as lines of text with commas between, each number as JavaScript writes it.
import { reserve } from '../memory';
import { digits, exponent, shorten, takePowers } from './decimal';

const comma: u8 = 44;
const minus: u8 = 45;
const point: u8 = 46;
const zero: u8 = 48;
const letterE: u8 = 101;
const lineFeed: u8 = 10;
const plus: u8 = 43;

/** More than the longest number with what stands after it. */
const mostBytes: usize = 26;
const powerBytes: usize = 617 * 16;

let powers: usize = 0;
/** f64 [column][row] */
let cells: usize = 0;
let text: usize = 0;
let columns: i32 = 0;
let rowsOfColumn: i32 = 0;
/** The digits of one number, from the last to the first, end here. */
let scratch: usize = 0;
const mostDigits: usize = 24;

/** Room for so many lines at a time; false where the memory cannot grow so far. */
export function openLines(columnCount: i32, most: i32): bool {
  columns = columnCount;
  rowsOfColumn = most;
  const numbers = <usize>columnCount * <usize>most;
  powers = reserve(powerBytes);
  cells = reserve(numbers << 3);
  text = reserve(numbers * mostBytes);
  scratch = reserve(mostDigits) + mostDigits;
  takePowers(powers);
  return powers !== 0 && cells !== 0 && text !== 0 && scratch !== mostDigits;
}

/** u64 [617][high, low]: see `decimal.ts`; written by the host. */
export function linePowers(): usize {
  return powers;
}
export function lineCells(): usize {
  return cells;
}
export function lineText(): usize {
  return text;
}

/** Bytes of the lines of the first so many rows. What is not finite is left empty. */
export function writeLines(rows: i32): i32 {
  let at = text;
  for (let row = 0; row < rows; row++) {
    let cell = cells + ((<usize>row) << 3);
    for (let column = 0; column < columns; column++, cell += (<usize>rowsOfColumn) << 3) {
      at = writeNumber(at, load<f64>(cell));
      store<u8>(at++, column + 1 < columns ? comma : lineFeed);
    }
  }
  return <i32>(at - text);
}

function writeNumber(to: usize, value: f64): usize {
  if (!(abs<f64>(value) < Infinity)) return to;
  if (value === 0) {
    store<u8>(to, zero);
    return to + 1;
  }
  let at = to;
  if (value < 0) store<u8>(at++, minus);
  shorten(abs<f64>(value));
  return place(at, spell());
}

/** The digits in their place before `scratch`, without zeros at the end; how many they are. */
function spell(): i32 {
  let at = scratch;
  const upper = digits / 100000000;
  let part = u32(digits - upper * 100000000);
  if (upper !== 0) {
    for (let i = 0; i < 8; i++, part /= 10) store<u8>(--at, zero + u8(part % 10));
    // At most nine more.
    part = u32(upper);
  }
  for (; part !== 0; part /= 10) store<u8>(--at, zero + u8(part % 10));
  return i32(scratch - at);
}

/** With the point where it belongs, or with an exponent where that is far away. */
function place(to: usize, spelled: i32): usize {
  const first = scratch - <usize>spelled;
  const before = spelled + exponent;
  let count = spelled;
  while (load<u8>(first + <usize>count - 1) === zero) count--;
  let at = to;
  if (before > 21 || before <= -6) return placeWithExponent(at, first, count, before - 1);
  if (before <= 0) {
    store<u8>(at, zero);
    store<u8>(at + 1, point);
    at += 2;
    for (let i = before; i < 0; i++) store<u8>(at++, zero);
    return copyDigits(at, first, count);
  }
  if (count <= before) {
    at = copyDigits(at, first, count);
    for (let i = count; i < before; i++) store<u8>(at++, zero);
    return at;
  }
  at = copyDigits(at, first, before);
  store<u8>(at++, point);
  return copyDigits(at, first + <usize>before, count - before);
}

function placeWithExponent(to: usize, first: usize, count: i32, power: i32): usize {
  let at = copyDigits(to, first, 1);
  if (count > 1) {
    store<u8>(at++, point);
    at = copyDigits(at, first + 1, count - 1);
  }
  store<u8>(at, letterE);
  store<u8>(at + 1, power < 0 ? minus : plus);
  at += 2;
  const size = abs<i32>(power);
  if (size >= 100) store<u8>(at++, zero + u8(size / 100));
  if (size >= 10) store<u8>(at++, zero + u8((size / 10) % 10));
  store<u8>(at, zero + u8(size % 10));
  return at + 1;
}

function copyDigits(to: usize, from: usize, count: i32): usize {
  for (let i: usize = 0; i < <usize>count; i++) store<u8>(to + i, load<u8>(from + i));
  return to + <usize>count;
}
