// How far a kernel in the plane carries along one line: the moment that the speed of a front rests on.
import { exp, log } from '../../machine/pinned.ts';
import { densityPerKm2, logFall, shareBeyond, type DispersalKernel } from '../../model/kernel-shape.ts';

export interface Ways {
  readonly kernel: DispersalKernel;
  /** Dangers of the way. */
  readonly hazardPerKm: number;
  readonly survivalOnTheWay: number;
  /** Whether those that would go beyond the reach go elsewhere within it, or are lost. */
  readonly leavers: 'all arrive' | 'may miss';
}

/** Largest θ (per km) below which the moment exists: the tail, dangers included, must fall faster than e^(−θr). */
export function steepest({ kernel: { shape, scaleKm, shapeNumber, reachKm }, hazardPerKm }: Ways): number {
  if (reachKm !== null) return Infinity;
  if (shape === 'gaussian' || (shape === 'exponential power' && shapeNumber > 1)) return Infinity;
  const exponential = shape === 'exponential' || (shape === 'exponential power' && shapeNumber === 1);
  return hazardPerKm + (exponential ? 1 / scaleKm : 0);
}

/**
 * E e^(θx) over those that arrive alive, x being one coordinate of the way, which goes in any direction alike:
 * ∫ 2πr k(r) e^(−hr) I₀(θr) dr. By tanh-sinh quadrature, to about 1e-12. Infinite from `steepest` on.
 */
export function planeMoment(ways: Ways, theta: number): number {
  const { kernel, hazardPerKm, survivalOnTheWay, leavers } = ways;
  if (theta >= steepest(ways)) return Infinity;
  const logAt = (km: number): number =>
    log(2 * Math.PI * densityPerKm2(kernel, 0) * km) + logFall(kernel, km) - hazardPerKm * km + logBessel(theta * km);
  const farthest = kernel.reachKm ?? farEnd(logAt, kernel.scaleKm);
  const within = leavers === 'all arrive' && kernel.reachKm !== null ? 1 - shareBeyond(kernel, kernel.reachKm) : 1;
  return (survivalOnTheWay * integral(logAt, farthest)) / within;
}

/** Where the integrand has fallen to nothing beside its largest. */
function farEnd(logAt: (km: number) => number, scale: number): number {
  let most = -Infinity;
  for (let km = scale / 16; ; km *= 1.25) {
    const here = logAt(km);
    most = Math.max(most, here);
    if ((here < most - 42 && km > scale) || km > scale * 1e7) return km;
  }
}

const step = 1 / 32;
const widest = 3.4;

function integral(logAt: (x: number) => number, end: number): number {
  let sum = 0;
  for (let t = -widest; t <= widest; t += step) {
    const [grown, fallen] = [exp(t), exp(-t)];
    const inner = exp(-(Math.PI / 2) * (grown - fallen));
    const place = end / (1 + inner);
    if (!(place > 0 && place <= end)) continue;
    const weight = ((Math.PI / 2) * (grown + fallen) * inner) / ((1 + inner) * (1 + inner));
    sum += weight * exp(logAt(place));
  }
  return sum * end * step;
}

/** ln I₀(x), the modified Bessel function (Abramowitz & Stegun 1964, 9.6.10 and 9.7.1). */
export function logBessel(x: number): number {
  if (x < 18) {
    const quarter = (x * x) / 4;
    let [sum, term] = [1, 1];
    for (let k = 1; term > 1e-17 * sum; k++) sum += term *= quarter / (k * k);
    return log(sum);
  }
  let [sum, term] = [1, 1];
  for (let k = 1; k < 30; k++) {
    const next = (term * (2 * k - 1) * (2 * k - 1)) / (8 * k * x);
    if (next > term || next < 1e-17) break;
    sum += term = next;
  }
  return x - log(2 * Math.PI * x) / 2 + log(sum);
}
