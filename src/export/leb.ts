// Whole numbers as WebAssembly writes them: seven bits a byte, the lowest first (LEB128).

export function unsigned(value: number): number[] {
  const bytes: number[] = [];
  let rest = value;
  do {
    const low = rest % 128;
    rest = Math.floor(rest / 128);
    bytes.push(rest > 0 ? low + 128 : low);
  } while (rest > 0);
  return bytes;
}

/** For numbers from 0 to 2^31 − 1: the sign bit of the last byte stays clear. */
export function signed(value: number): number[] {
  const bytes = unsigned(value);
  const last = bytes.pop() ?? 0;
  return last >= 64 ? [...bytes, last + 128, 0] : [...bytes, last];
}

export interface Read {
  readonly value: number;
  /** Where the next thing stands. */
  readonly next: number;
}

export function readUnsigned(bytes: Uint8Array, at: number): Read {
  let [value, factor, next] = [0, 1, at];
  for (;;) {
    const byte = bytes[next++] ?? 0;
    value += (byte & 127) * factor;
    if (byte < 128) return { value, next };
    factor *= 128;
  }
}
