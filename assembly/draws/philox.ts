// Philox4x32-10 (Salmon, Moraes, Dror & Shaw 2011): a block of random bits for each counter, with no state in between.
// The counter is (replicate, step, patch key, phase key), the key is the seed.
import { lanes } from '../layout';

const multiplier0: u32 = 0xd2511f53;
const multiplier1: u32 = 0xcd9e8d57;
const weyl0: u32 = 0x9e3779b9;
const weyl1: u32 = 0xbb67ae85;

/** The block of one counter: four 32-bit words at `block`, which holds the counter before and the words after. */
export function philoxBlock(block: usize, seedLow: u32, seedHigh: u32): void {
  let c0 = load<u32>(block, 0);
  let c1 = load<u32>(block, 4);
  let c2 = load<u32>(block, 8);
  let c3 = load<u32>(block, 12);
  let k0 = seedLow;
  let k1 = seedHigh;
  for (let round = 0; round < 10; round++) {
    const product0 = u64(multiplier0) * u64(c0);
    const product1 = u64(multiplier1) * u64(c2);
    c0 = u32(product1 >> 32) ^ c1 ^ k0;
    c1 = u32(product1);
    c2 = u32(product0 >> 32) ^ c3 ^ k1;
    c3 = u32(product0);
    k0 += weyl0;
    k1 += weyl1;
  }
  store<u32>(block, c0, 0);
  store<u32>(block, c1, 4);
  store<u32>(block, c2, 8);
  store<u32>(block, c3, 12);
}

/**
 * The blocks of all lanes, as two 64-bit words a lane: the first words of all lanes at `words`, the second words after
 * them. `replicates` holds one 32-bit replicate number a lane.
 */
export function philoxLanes(words: usize, replicates: usize, step: u32, patchKey: u32, phaseKey: u32): void {
  for (let lane = 0; lane < lanes; lane += 4) {
    philoxFour(words + ((<usize>lane) << 3), v128.load(replicates + ((<usize>lane) << 2)), step, patchKey, phaseKey);
  }
}

let keyLow: u32 = 0;
let keyHigh: u32 = 0;

/** The seed of every block from now on. */
export function setSeed(low: u32, high: u32): void {
  keyLow = low;
  keyHigh = high;
}

function philoxFour(words: usize, replicates: v128, step: u32, patchKey: u32, phaseKey: u32): void {
  const m0 = i32x4.splat(multiplier0);
  const m1 = i32x4.splat(multiplier1);
  let c0 = replicates;
  let c1 = i32x4.splat(step);
  let c2 = i32x4.splat(patchKey);
  let c3 = i32x4.splat(phaseKey);
  let k0 = keyLow;
  let k1 = keyHigh;
  for (let round = 0; round < 10; round++) {
    const low0 = i64x2.extmul_low_i32x4_u(c0, m0);
    const high0 = i64x2.extmul_high_i32x4_u(c0, m0);
    const low1 = i64x2.extmul_low_i32x4_u(c2, m1);
    const high1 = i64x2.extmul_high_i32x4_u(c2, m1);
    c0 = v128.xor(v128.xor(i32x4.shuffle(low1, high1, 1, 3, 5, 7), c1), i32x4.splat(k0));
    c1 = i32x4.shuffle(low1, high1, 0, 2, 4, 6);
    c2 = v128.xor(v128.xor(i32x4.shuffle(low0, high0, 1, 3, 5, 7), c3), i32x4.splat(k1));
    c3 = i32x4.shuffle(low0, high0, 0, 2, 4, 6);
    k0 += weyl0;
    k1 += weyl1;
  }
  v128.store(words, i32x4.shuffle(c0, c1, 0, 4, 1, 5), 0);
  v128.store(words, i32x4.shuffle(c0, c1, 2, 6, 3, 7), 16);
  v128.store(words, i32x4.shuffle(c2, c3, 0, 4, 1, 5), 128);
  v128.store(words, i32x4.shuffle(c2, c3, 2, 6, 3, 7), 144);
}
