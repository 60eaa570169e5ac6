// Standard normal numbers, each from one random word.
import { log } from '../mathematics';

const unit: f64 = 1.1102230246251565e-16; // 2^-53

/**
 * Of two words side by side: the normal quantile of (k + ½) / 2^53, k the top 53 bits of the word: algorithm AS 241 (Wichura 1988),
 * relative accuracy about 1e-16. It never falls when the word rises, and both tails are as fine.
 */
export function normalTwo(first: u64, second: u64): v128 {
  const k0 = first >> 11;
  const k1 = second >> 11;
  const q0 = offCentre(k0);
  const q1 = offCentre(k1);
  let both = central(f64x2.replace_lane(f64x2.splat(q0), 1, q1));
  if (!(abs<f64>(q0) <= widest)) both = f64x2.replace_lane(both, 0, outside(k0, q0));
  if (!(abs<f64>(q1) <= widest)) both = f64x2.replace_lane(both, 1, outside(k1, q1));
  return both;
}

/** As far from the middle the chance is as the central formula reaches. */
const widest: f64 = 0.425;

function offCentre(k: u64): f64 {
  return (f64(i64(k) - 4503599627370496) + 0.5) * unit;
}

function outside(k: u64, q: f64): f64 {
  const rare = q < 0 ? k : 9007199254740991 - k;
  const r = sqrt<f64>(-log((f64(rare) + 0.5) * unit));
  const z = r <= 5 ? middle(r - 1.6) : far(r - 5);
  return q < 0 ? -z : z;
}

function central(q: v128): v128 {
  const r = f64x2.sub(f64x2.splat(0.180625), f64x2.mul(q, q));
  let top = f64x2.splat(2.5090809287301226727e3);
  top = step(top, r, 3.3430575583588128105e4);
  top = step(top, r, 6.7265770927008700853e4);
  top = step(top, r, 4.5921953931549871457e4);
  top = step(top, r, 1.3731693765509461125e4);
  top = step(top, r, 1.9715909503065514427e3);
  top = step(top, r, 1.3314166789178437745e2);
  top = step(top, r, 3.387132872796366608);
  let low = f64x2.splat(5.226495278852854561e3);
  low = step(low, r, 2.8729085735721942674e4);
  low = step(low, r, 3.930789580009271061e4);
  low = step(low, r, 2.1213794301586595867e4);
  low = step(low, r, 5.3941960214247511077e3);
  low = step(low, r, 6.871870074920579083e2);
  low = step(low, r, 4.2313330701600911252e1);
  return f64x2.mul(q, f64x2.div(top, step(low, r, 1)));
}

/** sum × r + next */
function step(sum: v128, r: v128, next: f64): v128 {
  return f64x2.add(f64x2.mul(sum, r), f64x2.splat(next));
}

function middle(r: f64): f64 {
  let top: f64 = 7.7454501427834140764e-4;
  top = top * r + 2.27238449892691845833e-2;
  top = top * r + 2.4178072517745061177e-1;
  top = top * r + 1.27045825245236838258;
  top = top * r + 3.64784832476320460504;
  top = top * r + 5.7694972214606914055;
  top = top * r + 4.6303378461565452959;
  top = top * r + 1.42343711074968357734;
  let low: f64 = 1.05075007164441684324e-9;
  low = low * r + 5.475938084995344946e-4;
  low = low * r + 1.51986665636164571966e-2;
  low = low * r + 1.4810397642748007459e-1;
  low = low * r + 6.8976733498510000455e-1;
  low = low * r + 1.6763848301838038494;
  low = low * r + 2.05319162663775882187;
  return top / (low * r + 1);
}

function far(r: f64): f64 {
  let top: f64 = 2.01033439929228813265e-7;
  top = top * r + 2.71155556874348757815e-5;
  top = top * r + 1.2426609473880784386e-3;
  top = top * r + 2.6532189526576123093e-2;
  top = top * r + 2.9656057182850489123e-1;
  top = top * r + 1.7848265399172913358;
  top = top * r + 5.4637849111641143699;
  top = top * r + 6.6579046435011037772;
  let low: f64 = 2.04426310338993978564e-15;
  low = low * r + 1.4215117583164458887e-7;
  low = low * r + 1.8463183175100546818e-5;
  low = low * r + 7.868691311456132591e-4;
  low = low * r + 1.48753612908506148525e-2;
  low = low * r + 1.3692988092273580531e-1;
  low = low * r + 5.9983220655588793769e-1;
  return top / (low * r + 1);
}
