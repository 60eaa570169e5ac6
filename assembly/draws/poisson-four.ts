// Four Poisson draws side by side, each the very number that it would be alone.
import { f64At, putF64, u64At } from '../arrays';
import { expTwo } from '../exp-two';
import { mostByInversion, poisson } from './poisson';
import { finalise, firstWord, unit } from './stream';

/** Puts counts in the place of four means (f64), from the words of the four lanes at `words` and 128 bytes after. */
export function poissonFour(means: usize, words: usize, stream: u64): void {
  const low = v128.load(means);
  const high = v128.load(means, 16);
  const most = f64x2.splat(mostByInversion);
  if (!v128.any_true(v128.or(low, high))) return;
  if (v128.any_true(v128.or(f64x2.ge(low, most), f64x2.ge(high, most)))) {
    for (let i = 0; i < 4; i++) {
      putF64(means, i, poisson(f64At(means, i), u64At(words, i), u64At(words, i + 16), stream));
    }
    return;
  }
  invertFour(means, uniformPair(words, stream), uniformPair(words + 16, stream));
}

function uniformPair(words: usize, stream: u64): v128 {
  const first = firstWord(finalise(load<u64>(words) + stream), finalise(load<u64>(words, 128) + stream));
  const second = firstWord(finalise(load<u64>(words, 8) + stream), finalise(load<u64>(words, 136) + stream));
  return f64x2.replace_lane(f64x2.splat(unit(first)), 1, unit(second));
}

/** The walk of `poisson` in four lanes; one that has arrived waits at u = −1. */
function invertFour(means: usize, u0: v128, u1: v128): void {
  const mean0 = v128.load(means);
  const mean1 = v128.load(means, 16);
  const arrived = f64x2.splat(-1);
  let chance0 = expTwo(f64x2.neg(mean0));
  let chance1 = expTwo(f64x2.neg(mean1));
  let k0 = i64x2.splat(0);
  let k1 = i64x2.splat(0);
  for (let k: f64 = 1; k <= 200; k++) {
    const going0 = f64x2.ge(u0, chance0);
    const going1 = f64x2.ge(u1, chance1);
    if (!v128.any_true(v128.or(going0, going1))) break;
    u0 = v128.bitselect(f64x2.sub(u0, chance0), arrived, going0);
    u1 = v128.bitselect(f64x2.sub(u1, chance1), arrived, going1);
    k0 = i64x2.sub(k0, going0);
    k1 = i64x2.sub(k1, going1);
    const index = f64x2.splat(k);
    chance0 = f64x2.mul(chance0, f64x2.div(mean0, index));
    chance1 = f64x2.mul(chance1, f64x2.div(mean1, index));
  }
  store<f64>(means, f64(i64x2.extract_lane(k0, 0)));
  store<f64>(means, f64(i64x2.extract_lane(k0, 1)), 8);
  store<f64>(means, f64(i64x2.extract_lane(k1, 0)), 16);
  store<f64>(means, f64(i64x2.extract_lane(k1, 1)), 24);
}
