// Gamma draws (Marsaglia & Tsang 2000), with normals by the polar method (Marsaglia & Bray 1964).
import { log, pow } from '../mathematics';
import { finalise, firstWord, unit } from './stream';

/** A number of mean `shape` and scale 1, from both words of the block of random bits and the constant of the stream. */
export function gamma(shape: f64, w0: u64, w1: u64, stream: u64): f64 {
  s0 = finalise(w0 + stream);
  s1 = finalise(w1 + stream);
  // Below 1: a draw of shape + 1 times U^(1 / shape).
  if (shape < 1) {
    const u = uniform();
    return aboveOne(shape + 1) * pow(u, 1 / shape);
  }
  return aboveOne(shape);
}

let s0: u64 = 0;
let s1: u64 = 0;

/** In (0, 1). */
function uniform(): f64 {
  const u = unit(firstWord(s0, s1));
  const t = s1 ^ s0;
  s0 = rotl<u64>(s0, 49) ^ t ^ (t << 21);
  s1 = rotl<u64>(t, 28);
  return u + 5.551115123125783e-17;
}

function normal(): f64 {
  while (true) {
    const x = 2 * uniform() - 1;
    const y = 2 * uniform() - 1;
    const r = x * x + y * y;
    if (r < 1 && r > 0) return x * sqrt<f64>((-2 * log(r)) / r);
  }
}

function aboveOne(shape: f64): f64 {
  const d = shape - 1.0 / 3.0;
  const c = 1 / sqrt<f64>(9 * d);
  while (true) {
    const x = normal();
    const root = 1 + c * x;
    if (root <= 0) continue;
    const v = root * root * root;
    const u = uniform();
    if (log(u) < 0.5 * x * x + d - d * v + d * log(v)) return d * v;
  }
}
