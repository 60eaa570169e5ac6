// Standard normal numbers, each from one random word.
import { putF64, u64At } from '../arrays';
import { lanes } from '../layout';
import { log } from '../mathematics';

const unit: f64 = 1.1102230246251565e-16; // 2^-53
const largest: i64 = 9007199254740991; // 2^53 − 1

/** u64 [lane]: top 53 bits of each word. i32 [place]: lanes that lie outside the middle, with room for one too many. */
const tops = memory.data(8 * 16, 16);
const outer = memory.data(4 * 18, 16);

/**
 * target[lane] = the normal quantile of (k + ½) / 2^53, k the top 53 bits of word[lane] (u64): algorithm AS 241 (Wichura 1988),
 * relative accuracy about 1e-16. It never falls when the word rises, and both tails are as fine. Three of twenty lie outside the
 * middle; they are listed and done afterwards, since a processor that guesses wrong loses much of what one costs.
 */
export function normalLanes(target: usize, words: usize): void {
  let end = outer;
  for (let lane = 0; lane < lanes; lane += 2) {
    const at = (<usize>lane) << 3;
    const k = i64x2.shr_u(v128.load(words + at), 11);
    v128.store(tops + at, k);
    const q = offCentre(k);
    v128.store(target + at, central(q));
    const beyond = i64x2.bitmask(f64x2.gt(f64x2.abs(q), f64x2.splat(0.425)));
    store<i32>(end, lane);
    end += (<usize>(beyond & 1)) << 2;
    store<i32>(end, lane + 1);
    end += (<usize>(beyond >> 1)) << 2;
  }
  for (let next = outer; next < end; next += 4) {
    const lane = load<i32>(next);
    putF64(target, lane, outside(i64(u64At(tops, lane))));
  }
}

/** (k + ½) / 2^53 − ½ of two k. */
function offCentre(k: v128): v128 {
  const first = f64(i64x2.extract_lane(k, 0) - 4503599627370496);
  const both = f64x2.replace_lane(f64x2.splat(first), 1, f64(i64x2.extract_lane(k, 1) - 4503599627370496));
  return f64x2.mul(f64x2.add(both, f64x2.splat(0.5)), f64x2.splat(unit));
}

function outside(k: i64): f64 {
  // All bits where k lies in the upper half.
  const upper = (4503599627370495 - k) >> 63;
  const rare = k ^ (upper & largest);
  const r = sqrt<f64>(-log((f64(rare) + 0.5) * unit));
  const z = r <= 5 ? middle(r - 1.6) : far(r - 5);
  return copysign<f64>(z, f64(<i64>-1 - upper * 2));
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
