// Bytes that are the same.

export function sameBytes(a: ArrayBuffer, b: ArrayBuffer): boolean {
  if (a === b) return true;
  if (a.byteLength !== b.byteLength) return false;
  const [left, right] = [new Uint8Array(a), new Uint8Array(b)];
  return left.every((byte, i) => byte === right[i]);
}
