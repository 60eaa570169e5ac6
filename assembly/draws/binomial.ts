// Binomial draws of any size: by bits up to 128 trials, else by inversion where n·p < 10, else by transformed rejection
// (algorithm BTRS of Hörmann 1993, with the whole acceptance test).
import { exp, log } from '../mathematics';
import { bitsOf, mostByBits } from './bits';
import { stirlingTail } from './factorial';
import { finalise, firstWord, unit } from './stream';

/** Successes of n trials with chance p, from both words of the block of random bits and the constant of the stream. */
export function binomial(n: u32, p: f64, w0: u64, w1: u64, stream: u64): u32 {
  if (n === 0 || p <= 0) return 0;
  if (p >= 1) return n;
  if (n <= mostByBits) return bitsOf(n, p, w0, w1, stream);
  const s0 = finalise(w0 + stream);
  const s1 = finalise(w1 + stream);
  const rare = p <= 0.5 ? p : 1 - p;
  const k = f64(n) * rare < 10 ? byInversion(n, rare, unit(firstWord(s0, s1))) : byRejection(n, rare, s0, s1);
  return p <= 0.5 ? k : n - k;
}

/** Walks up from 0. Beyond 120 the chance is below 1e-80 where n·p < 10. */
function byInversion(n: u32, p: f64, u: f64): u32 {
  const odds = p / (1 - p);
  let chance = exp(f64(n) * logOfRest(p));
  let k: u32 = 0;
  while (u >= chance && k < 120) {
    u -= chance;
    k++;
    chance *= (odds * f64(n - k + 1)) / f64(k);
  }
  return k;
}

/** ln(1 − p), without loss for small p. */
function logOfRest(p: f64): f64 {
  return p < 1e-4 ? -p * (1 + p * (0.5 + p * (1 / 3.0 + p * 0.25))) : log(1 - p);
}

function byRejection(n: u32, p: f64, s0: u64, s1: u64): u32 {
  const trials = f64(n);
  const spread = sqrt<f64>(trials * p * (1 - p));
  const b = 1.15 + 2.53 * spread;
  const a = -0.0873 + 0.0248 * b + 0.01 * p;
  const centre = trials * p + 0.5;
  const squeeze = 0.92 - 4.2 / b;
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
    const k = floor<f64>(((2 * a) / us + b) * u + centre);
    if (us >= 0.07 && v <= squeeze) return u32(k);
    if (!(k >= 0 && k <= trials)) continue;
    const height = (2.83 + 5.1 / b) * spread;
    if (log((v * height) / (a / (us * us) + b)) <= logRatioToMode(trials, p, k)) return u32(k);
  }
}

/** ln of the chance of k over the chance of the mode. */
function logRatioToMode(n: f64, p: f64, k: f64): f64 {
  const odds = p / (1 - p);
  const mode = floor<f64>((n + 1) * p);
  const restMode = n - mode + 1;
  const rest = n - k + 1;
  return (
    (mode + 0.5) * log((mode + 1) / (odds * restMode)) +
    (n + 1) * log(restMode / rest) +
    (k + 0.5) * log((rest * odds) / (k + 1)) +
    stirlingTail(mode) +
    stirlingTail(n - mode) -
    stirlingTail(k) -
    stirlingTail(n - k)
  );
}
