// Probes for the tests: single draws and whole samples, one a counter, without an image.
import { putF64, putU32, u32At } from './arrays';
import { bitsFour } from './draws/bits';
import { binomial } from './draws/binomial';
import { hypergeometric } from './draws/hypergeometric';
import { philoxBlock, philoxLanes, setSeed } from './draws/philox';
import { poisson } from './draws/poisson';
import { finalise, firstWord, nextWord, unit } from './draws/stream';
import { expTwo } from './exp-two';
import { lanes } from './layout';

/** The block of the counter at `block`, in place. */
export function probePhilox(block: usize, seedLow: u32, seedHigh: u32): void {
  philoxBlock(block, seedLow, seedHigh);
}

/** The blocks of sixteen replicates whose numbers stand at `replicates`; `counter` holds step, patch key and phase key. */
export function probePhiloxLanes(words: usize, replicates: usize, counter: usize): void {
  philoxLanes(words, replicates, load<u32>(counter), load<u32>(counter, 4), load<u32>(counter, 8));
}

/** Word `index` of the stream whose state stands at `state`, into `word`. */
export function probeStream(word: usize, state: usize, index: i32): void {
  store<u64>(word, nextWord(load<u64>(state), load<u64>(state, 8), index));
}

/** e^x of the two numbers (f64) at `both`, in their place. */
export function probeExpTwo(both: usize): void {
  v128.store(both, expTwo(v128.load(both)));
}

export const sampleBinomial = 0;
export const samplePoisson = 1;
export const sampleHypergeometric = 2;
export const sampleBitsFour = 3;

/**
 * Fills `out` with `draws` (a multiple of 16) numbers (f64), draw i from replicate number i of seed 1. `request` holds x
 * (f64), then what, n and m (i32); 512 bytes after them are used for work.
 */
export function probeSample(out: usize, draws: i32, request: usize): void {
  setSeed(1, 0);
  const replicates = request + 32;
  const words = request + 96;
  for (let first = 0; first < draws; first += lanes) {
    for (let lane = 0; lane < lanes; lane++) putU32(replicates, lane, first + lane);
    philoxLanes(words, replicates, 0, 0, 0);
    for (let lane = 0; lane < lanes; lane++) {
      putF64(out, first + lane, one(request, words, lane));
    }
  }
}

function one(request: usize, all: usize, lane: i32): f64 {
  const words = all + ((<usize>lane) << 3);
  const x = load<f64>(request);
  const what = load<i32>(request, 8);
  const n = load<u32>(request, 12);
  const m = load<u32>(request, 16);
  const w0 = load<u64>(words);
  const w1 = load<u64>(words, 128);
  if (what === sampleBinomial) return f64(binomial(n, x, w0, w1, 7));
  if (what === samplePoisson) return poisson(x, w0, w1, 7);
  if (what === sampleHypergeometric) {
    return f64(hypergeometric(n, u32(x), m, unit(firstWord(finalise(w0 + 7), finalise(w1 + 7)))));
  }
  // The neighbours are other draws of other sizes; they must not matter.
  const counts = request + 352;
  const chances = request + 368;
  for (let i = 0; i < 4; i++) {
    putU32(counts, i, i === (lane & 3) ? n : m);
    putF64(chances, i, i === (lane & 3) ? x : 0.9);
  }
  bitsFour(counts, counts, chances, all + ((<usize>(lane & ~3)) << 3), 7);
  return f64(u32At(counts, lane & 3));
}
