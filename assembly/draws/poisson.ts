// Poisson draws: by inversion where the mean is below 30, else by transformed rejection (algorithm PTRS of Hörmann 1993).
import { exp, log } from '../mathematics';
import { stirlingTail } from './factorial';
import { finalise, firstWord, unit } from './stream';

const halfLogTwoPi: f64 = 0.9189385332046728;
/** Larger means stop the replicate whatever is drawn. */
const largestMean: f64 = 4e9;
/** Up to here the count also never falls when the mean rises; it costs no more than rejection. */
export const mostByInversion: f64 = 30;

/** A count with this mean, from both words of the block of random bits and the constant of the stream. */
export function poisson(mean: f64, w0: u64, w1: u64, stream: u64): f64 {
  if (mean <= 0) return 0;
  if (mean >= largestMean) return floor<f64>(mean);
  const s0 = finalise(w0 + stream);
  const s1 = finalise(w1 + stream);
  return mean < mostByInversion ? byInversion(mean, unit(firstWord(s0, s1))) : byRejection(mean, s0, s1);
}

/** Walks up from 0. Beyond 200 the chance is below 1e-80 where the mean is below 30. */
function byInversion(mean: f64, u: f64): f64 {
  let chance = exp(-mean);
  let k: f64 = 0;
  while (u >= chance && k < 200) {
    u -= chance;
    k++;
    chance *= mean / k;
  }
  return k;
}

function byRejection(mean: f64, s0: u64, s1: u64): f64 {
  const b = 0.931 + 2.53 * sqrt<f64>(mean);
  const a = -0.059 + 0.02483 * b;
  const height = 1.1239 + 1.1328 / (b - 3.4);
  const squeeze = 0.9277 - 3.6224 / (b - 2);
  while (true) {
    const v = unit(firstWord(s0, s1));
    let t = s1 ^ s0;
    s0 = rotl<u64>(s0, 49) ^ t ^ (t << 21);
    s1 = rotl<u64>(t, 28);
    const u = unit(firstWord(s0, s1)) - 0.5;
    t = s1 ^ s0;
    s0 = rotl<u64>(s0, 49) ^ t ^ (t << 21);
    s1 = rotl<u64>(t, 28);
    const us = 0.5 - abs<f64>(u);
    const k = floor<f64>(((2 * a) / us + b) * u + mean + 0.43);
    if (us >= 0.07 && v <= squeeze) return k;
    if (!(k >= 0) || (us < 0.013 && v > us)) continue;
    if (log((v * height) / (a / (us * us) + b)) <= logChance(k, mean)) return k;
  }
}

/** ln of the chance of k, in an order that keeps digits for large means. */
function logChance(k: f64, mean: f64): f64 {
  return k * log(mean / (k + 1)) + (k + 1 - mean) - 0.5 * log(k + 1) - halfLogTwoPi - stirlingTail(k);
}
