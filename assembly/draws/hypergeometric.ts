// Draws without replacement: how many of `taken` out of `all` are of a kind that `kind` of them belong to.
// Inversion outwards from the mode, exact for every size; costs about twice the standard deviation in steps.
import { exp } from '../mathematics';
import { logFactorial } from './factorial';

export function hypergeometric(all: u32, kind: u32, taken: u32, u: f64): u32 {
  const lowest = taken > all - kind ? taken - (all - kind) : 0;
  const highest = min<u32>(kind, taken);
  if (lowest === highest) return lowest;
  const mode = u32(floor<f64>(((f64(taken) + 1) * (f64(kind) + 1)) / (f64(all) + 2)));
  const others = f64(all) - f64(kind) - f64(taken);
  let up = mode;
  let down = mode;
  const atMode = exp(logChance(f64(all), f64(kind), f64(taken), f64(mode)));
  let chanceUp = atMode;
  let chanceDown = atMode;
  if (u < atMode) return mode;
  u -= atMode;
  while (up < highest || down > lowest) {
    if (up < highest) {
      const k = f64(up);
      chanceUp *= ((f64(kind) - k) * (f64(taken) - k)) / ((k + 1) * (others + k + 1));
      up++;
      if (u < chanceUp) return up;
      u -= chanceUp;
    }
    if (down > lowest) {
      const k = f64(down);
      chanceDown *= (k * (others + k)) / ((f64(kind) - k + 1) * (f64(taken) - k + 1));
      down--;
      if (u < chanceDown) return down;
      u -= chanceDown;
    }
    if (chanceUp + chanceDown < 1e-300) break;
  }
  return mode;
}

function logChance(all: f64, kind: f64, taken: f64, k: f64): f64 {
  return (
    logFactorial(kind) -
    logFactorial(k) -
    logFactorial(kind - k) +
    (logFactorial(all - kind) - logFactorial(taken - k) - logFactorial(all - kind - (taken - k))) -
    (logFactorial(all) - logFactorial(taken) - logFactorial(all - taken))
  );
}
