// Sums over all patches in which ways begin, for many patches in which they end at a time: as many sums as there are registers.
// Each loop is a function of its own with more than one caller, since a loop put into its caller has fewer registers.
import { patches } from '../image';
import { rowBytes } from './state';

/** Bytes of the numbers that thirteen, eight and four registers hold. */
const thirteen: usize = 208;
const eight: usize = 128;
const four: usize = 64;

/** target[to] = Σ numbers[from] × pairs[from][to], each sum from the first patch on; all are rows. */
export function sumOverPairs(target: usize, numbers: usize, pairs: usize): void {
  const row = rowBytes;
  const end = (<usize>patches) << 3;
  let at: usize = 0;
  for (; at + thirteen <= end; at += thirteen) sumThirteen(target + at, numbers, pairs + at);
  if (at >= end) return;
  const rest = end - at;
  // Sums done before may be done again: they come out the same.
  if (rest > eight && row >= thirteen) {
    const last = min<usize>(at, row - thirteen);
    sumThirteen(target + last, numbers, pairs + last);
  } else if (rest > eight) {
    sumEight(target, numbers, pairs);
    sumFour(target + eight, numbers, pairs + eight);
  } else if (rest > four) {
    const last = min<usize>(at, row - eight);
    sumEight(target + last, numbers, pairs + last);
  } else {
    const last = min<usize>(at, row - four);
    sumFour(target + last, numbers, pairs + last);
  }
}

function sumThirteen(target: usize, numbers: usize, pairs: usize): void {
  const row = rowBytes;
  const end = numbers + ((<usize>patches) << 3);
  let s0 = f64x2.splat(0);
  let s1 = s0;
  let s2 = s0;
  let s3 = s0;
  let s4 = s0;
  let s5 = s0;
  let s6 = s0;
  let s7 = s0;
  let s8 = s0;
  let s9 = s0;
  let s10 = s0;
  let s11 = s0;
  let s12 = s0;
  while (numbers < end) {
    const n = v128.load64_splat(numbers);
    s0 = f64x2.add(s0, f64x2.mul(n, v128.load(pairs)));
    s1 = f64x2.add(s1, f64x2.mul(n, v128.load(pairs, 16)));
    s2 = f64x2.add(s2, f64x2.mul(n, v128.load(pairs, 32)));
    s3 = f64x2.add(s3, f64x2.mul(n, v128.load(pairs, 48)));
    s4 = f64x2.add(s4, f64x2.mul(n, v128.load(pairs, 64)));
    s5 = f64x2.add(s5, f64x2.mul(n, v128.load(pairs, 80)));
    s6 = f64x2.add(s6, f64x2.mul(n, v128.load(pairs, 96)));
    s7 = f64x2.add(s7, f64x2.mul(n, v128.load(pairs, 112)));
    s8 = f64x2.add(s8, f64x2.mul(n, v128.load(pairs, 128)));
    s9 = f64x2.add(s9, f64x2.mul(n, v128.load(pairs, 144)));
    s10 = f64x2.add(s10, f64x2.mul(n, v128.load(pairs, 160)));
    s11 = f64x2.add(s11, f64x2.mul(n, v128.load(pairs, 176)));
    s12 = f64x2.add(s12, f64x2.mul(n, v128.load(pairs, 192)));
    numbers += 8;
    pairs += row;
  }
  v128.store(target, s0);
  v128.store(target, s1, 16);
  v128.store(target, s2, 32);
  v128.store(target, s3, 48);
  v128.store(target, s4, 64);
  v128.store(target, s5, 80);
  v128.store(target, s6, 96);
  v128.store(target, s7, 112);
  v128.store(target, s8, 128);
  v128.store(target, s9, 144);
  v128.store(target, s10, 160);
  v128.store(target, s11, 176);
  v128.store(target, s12, 192);
}

function sumEight(target: usize, numbers: usize, pairs: usize): void {
  const row = rowBytes;
  const end = numbers + ((<usize>patches) << 3);
  let s0 = f64x2.splat(0);
  let s1 = s0;
  let s2 = s0;
  let s3 = s0;
  let s4 = s0;
  let s5 = s0;
  let s6 = s0;
  let s7 = s0;
  while (numbers < end) {
    const n = v128.load64_splat(numbers);
    s0 = f64x2.add(s0, f64x2.mul(n, v128.load(pairs)));
    s1 = f64x2.add(s1, f64x2.mul(n, v128.load(pairs, 16)));
    s2 = f64x2.add(s2, f64x2.mul(n, v128.load(pairs, 32)));
    s3 = f64x2.add(s3, f64x2.mul(n, v128.load(pairs, 48)));
    s4 = f64x2.add(s4, f64x2.mul(n, v128.load(pairs, 64)));
    s5 = f64x2.add(s5, f64x2.mul(n, v128.load(pairs, 80)));
    s6 = f64x2.add(s6, f64x2.mul(n, v128.load(pairs, 96)));
    s7 = f64x2.add(s7, f64x2.mul(n, v128.load(pairs, 112)));
    numbers += 8;
    pairs += row;
  }
  v128.store(target, s0);
  v128.store(target, s1, 16);
  v128.store(target, s2, 32);
  v128.store(target, s3, 48);
  v128.store(target, s4, 64);
  v128.store(target, s5, 80);
  v128.store(target, s6, 96);
  v128.store(target, s7, 112);
}

function sumFour(target: usize, numbers: usize, pairs: usize): void {
  const row = rowBytes;
  const end = numbers + ((<usize>patches) << 3);
  let s0 = f64x2.splat(0);
  let s1 = s0;
  let s2 = s0;
  let s3 = s0;
  while (numbers < end) {
    const n = v128.load64_splat(numbers);
    s0 = f64x2.add(s0, f64x2.mul(n, v128.load(pairs)));
    s1 = f64x2.add(s1, f64x2.mul(n, v128.load(pairs, 16)));
    s2 = f64x2.add(s2, f64x2.mul(n, v128.load(pairs, 32)));
    s3 = f64x2.add(s3, f64x2.mul(n, v128.load(pairs, 48)));
    numbers += 8;
    pairs += row;
  }
  v128.store(target, s0);
  v128.store(target, s1, 16);
  v128.store(target, s2, 32);
  v128.store(target, s3, 48);
}
