// Square matrices of a handful of classes, entry (i, j) at i * n + j.

export function identity(n: number): Float64Array {
  return Float64Array.from({ length: n * n }, (_, i) => (i % (n + 1) === 0 ? 1 : 0));
}

/** A B. */
export function times(a: Float64Array, b: Float64Array, n: number): Float64Array<ArrayBuffer> {
  const out = new Float64Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let k = 0; k < n; k++) {
      const factor = a[i * n + k] ?? 0;
      if (factor === 0) continue;
      for (let j = 0; j < n; j++) out[i * n + j] = (out[i * n + j] ?? 0) + factor * (b[k * n + j] ?? 0);
    }
  }
  return out;
}

export function plus(a: Float64Array<ArrayBuffer>, b: Float64Array): Float64Array<ArrayBuffer> {
  return a.map((value, i) => value + (b[i] ?? 0));
}
