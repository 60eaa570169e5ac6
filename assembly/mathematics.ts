// Transcendental functions with the same bits on every machine: the compiler's own software versions, never the host's.

export function exp(x: f64): f64 {
  return NativeMath.exp(x);
}

export function log(x: f64): f64 {
  return NativeMath.log(x);
}

export function pow(base: f64, exponent: f64): f64 {
  return NativeMath.pow(base, exponent);
}
