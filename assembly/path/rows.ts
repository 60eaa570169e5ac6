// What the means of phases do with whole rows. N is f64 where a column is a patch, and v128 where a patch has sixteen columns.
import { i32At } from '../arrays';
import { classes, entries, section } from '../image';
import { blockBytes, rowAt, rowBytes, slotValues } from './state';

/** Of a row of numbers by patch, those of the two columns at these bytes. */
export function ofPatches<N>(row: usize, at: usize): v128 {
  return first<N>(besides<N>(row, at));
}

/** Where a row by patch has what belongs to the block of columns at these bytes; the four pairs of the block follow. */
export function besides<N>(row: usize, at: usize): usize {
  if (isVector<N>()) return row + ((at >> 7) << 3);
  return row + at;
}

export function first<N>(block: usize): v128 {
  if (isVector<N>()) return v128.load64_splat(block);
  return v128.load(block);
}

export function second<N>(block: usize): v128 {
  if (isVector<N>()) return v128.load64_splat(block);
  return v128.load(block, 16);
}

export function third<N>(block: usize): v128 {
  if (isVector<N>()) return v128.load64_splat(block);
  return v128.load(block, 32);
}

export function fourth<N>(block: usize): v128 {
  if (isVector<N>()) return v128.load64_splat(block);
  return v128.load(block, 48);
}

export function fillRow(target: usize, value: f64): void {
  const splat = f64x2.splat(value);
  for (let at: usize = 0; at < rowBytes; at += 16) v128.store(target + at, splat);
}

export function copyRow(target: usize, source: usize): void {
  const end = target + rowBytes;
  while (target < end) {
    v128.store(target, v128.load(source));
    v128.store(target, v128.load(source, 16), 16);
    v128.store(target, v128.load(source, 32), 32);
    v128.store(target, v128.load(source, 48), 48);
    target += blockBytes;
    source += blockBytes;
  }
}

export function addRow(target: usize, source: usize): void {
  const end = target + rowBytes;
  while (target < end) {
    v128.store(target, f64x2.add(v128.load(target), v128.load(source)));
    v128.store(target, f64x2.add(v128.load(target, 16), v128.load(source, 16)), 16);
    v128.store(target, f64x2.add(v128.load(target, 32), v128.load(source, 32)), 32);
    v128.store(target, f64x2.add(v128.load(target, 48), v128.load(source, 48)), 48);
    target += blockBytes;
    source += blockBytes;
  }
}

/** target ×= source */
export function multiplyRow(target: usize, source: usize): void {
  const end = target + rowBytes;
  while (target < end) {
    v128.store(target, f64x2.mul(v128.load(target), v128.load(source)));
    v128.store(target, f64x2.mul(v128.load(target, 16), v128.load(source, 16)), 16);
    v128.store(target, f64x2.mul(v128.load(target, 32), v128.load(source, 32)), 32);
    v128.store(target, f64x2.mul(v128.load(target, 48), v128.load(source, 48)), 48);
    target += blockBytes;
    source += blockBytes;
  }
}

/** target /= source */
export function divideRow(target: usize, source: usize): void {
  for (let at: usize = 0; at < rowBytes; at += 16) {
    v128.store(target + at, f64x2.div(v128.load(target + at), v128.load(source + at)));
  }
}

/** target = numbers × rate, by patch; times `scale` after that, where there is one. `target` may be `numbers`. */
export function scaleByPatch<N>(target: usize, numbers: usize, rate: usize, scale: usize): void {
  const end = rowBytes;
  if (scale === 0) {
    for (let at: usize = 0; at < end; at += blockBytes) {
      const n = numbers + at;
      const r = besides<N>(rate, at);
      const t = target + at;
      v128.store(t, f64x2.mul(v128.load(n), first<N>(r)));
      v128.store(t, f64x2.mul(v128.load(n, 16), second<N>(r)), 16);
      v128.store(t, f64x2.mul(v128.load(n, 32), third<N>(r)), 32);
      v128.store(t, f64x2.mul(v128.load(n, 48), fourth<N>(r)), 48);
    }
    return;
  }
  for (let at: usize = 0; at < end; at += blockBytes) {
    const n = numbers + at;
    const r = besides<N>(rate, at);
    const s = scale + at;
    const t = target + at;
    v128.store(t, f64x2.mul(f64x2.mul(v128.load(n), first<N>(r)), v128.load(s)));
    v128.store(t, f64x2.mul(f64x2.mul(v128.load(n, 16), second<N>(r)), v128.load(s, 16)), 16);
    v128.store(t, f64x2.mul(f64x2.mul(v128.load(n, 32), third<N>(r)), v128.load(s, 32)), 32);
    v128.store(t, f64x2.mul(f64x2.mul(v128.load(n, 48), fourth<N>(r)), v128.load(s, 48)), 48);
  }
}

/** target = the sum of the counted classes, from the first on. */
export function sumCounted(target: usize, counted: usize): void {
  fillRow(target, 0);
  for (let c = 0; c < classes; c++) if (i32At(counted, c) !== 0) addRow(target, rowAt(c));
}

/** Where the product of the slots that scale a class stands: 0 for none, a slot itself, or `room`. */
export function scaleOf(lists: usize, c: i32, room: usize): usize {
  if (lists === 0) return 0;
  const first = i32At(lists, c);
  return productOf(lists + ((<usize>(classes + 1 + first)) << 2), i32At(lists, c + 1) - first, room);
}

/** What is left of a capacity, by the product of these slots; 0 for all of it. */
export function roomOf(row: i32, room: usize): usize {
  return productOf(section(row), entries(row), room);
}

function productOf(list: usize, count: i32, room: usize): usize {
  if (count === 0) return 0;
  if (count === 1) return slotRow(i32At(list, 0));
  copyRow(room, slotRow(i32At(list, 0)));
  for (let k = 1; k < count; k++) multiplyRow(room, slotRow(i32At(list, k)));
  return room;
}

/** What conditions and crowding multiply rates by. */
export function slotRow(slot: i32): usize {
  return slotValues + <usize>slot * rowBytes;
}
