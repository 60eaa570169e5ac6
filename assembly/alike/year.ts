// The entries of eight matrices from the values of what moves: numbers on a tape, each of them the same, a line of one value, or a
// sum of products of two earlier ones.
import { f64At } from '../arrays';
import * as room from './room';

/** What is the same in all. */
export function fillSame(): void {
  const places = room.tapePlaces();
  for (let i = 0; i < places; i++) {
    const value = f64x2.splat(f64At(room.numbers, i));
    const at = room.tape + <usize>i * room.row;
    for (let h: usize = 0; h < room.row; h += 16) v128.store(at + h, value);
  }
}

/** The rest, of the eight points from this one. */
export function fillMoving(point: i32): void {
  let line = room.lines();
  let at = room.movingPart();
  const from = room.values + ((<usize>point) << 3);
  for (let left = load<u32>(at); left > 0; left--) {
    const target = room.tape + load<u32>(at, 4);
    const source = from + room.sourceBytes * <usize>load<u32>(at, 8);
    const constant = v128.load64_splat(line);
    const slope = v128.load64_splat(line, 8);
    for (let h: usize = 0; h < room.row; h += 16) {
      v128.store(target + h, f64x2.add(constant, f64x2.mul(slope, v128.load(source + h))));
    }
    at += 8;
    line += 16;
  }
  sumProducts();
}

function sumProducts(): void {
  let at = room.sumsPart();
  const tape = room.tape;
  let sums = load<u32>(at);
  for (at += 4; sums > 0; sums--) {
    const target = tape + load<u32>(at);
    let products = load<u32>(at, 4);
    let a = tape + load<u32>(at, 8);
    let b = tape + load<u32>(at, 12);
    let s0 = f64x2.mul(v128.load(a), v128.load(b));
    let s1 = f64x2.mul(v128.load(a, 16), v128.load(b, 16));
    let s2 = f64x2.mul(v128.load(a, 32), v128.load(b, 32));
    let s3 = f64x2.mul(v128.load(a, 48), v128.load(b, 48));
    for (at += 16, products--; products > 0; products--, at += 8) {
      a = tape + load<u32>(at);
      b = tape + load<u32>(at, 4);
      s0 = f64x2.add(s0, f64x2.mul(v128.load(a), v128.load(b)));
      s1 = f64x2.add(s1, f64x2.mul(v128.load(a, 16), v128.load(b, 16)));
      s2 = f64x2.add(s2, f64x2.mul(v128.load(a, 32), v128.load(b, 32)));
      s3 = f64x2.add(s3, f64x2.mul(v128.load(a, 48), v128.load(b, 48)));
    }
    v128.store(target, s0);
    v128.store(target, s1, 16);
    v128.store(target, s2, 32);
    v128.store(target, s3, 48);
  }
}
