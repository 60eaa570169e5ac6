// Logarithms of factorials.
import { f64At } from '../arrays';
import { log } from '../mathematics';

/** ½ ln(2π). */
const halfLogTwoPi: f64 = 0.9189385332046728;

/**
 * What Stirling's formula lacks: ln k! = ½ ln 2π + (k + ½) ln(k + 1) − (k + 1) + stirlingTail(k).
 * Table and series after Hörmann (1993); the table is exact to the last digits, the series to 1e-11 from k = 10.
 */
export function stirlingTail(k: f64): f64 {
  if (k < 10) return f64At(tails, i32(k));
  const r = 1 / (k + 1);
  const rr = r * r;
  return (1 / 12.0 - (1 / 360.0 - (1 / 1260.0 - rr / 1680.0) * rr) * rr) * r;
}

/** ln k! for whole k ≥ 0. */
export function logFactorial(k: f64): f64 {
  return halfLogTwoPi + (k + 0.5) * log(k + 1) - (k + 1) + stirlingTail(k);
}

const tails = memory.data<f64>([
  0.08106146679532726, 0.04134069595540929, 0.02767792568499834, 0.02079067210376509, 0.01664469118982119,
  0.01387612882307075, 0.01189670994589177, 0.01041126526197209, 0.00925546218271273, 0.00833056343336287,
]);
