// The order of very many numbers: by digits of their bits instead of by comparison, in time in proportion to how many they are.

const digitBits = 16;
const digits = 1 << digitBits;

/** Fewer than these are sorted faster by comparison. */
const few = 5000;

/** Indices from the least number to the greatest, those of equal ones in their order, NaN last. Both zeros are equal. */
export function ascendingOrder(values: Float64Array): Uint32Array {
  if (values.length < few) return byComparison(values);
  const { low, high } = keysOf(values);
  let order = Uint32Array.from(values.keys());
  for (const [words, shift] of [
    [low, 0],
    [low, digitBits],
    [high, 0],
    [high, digitBits],
  ] as const) {
    order = sortedBy(words, shift, order);
  }
  return order;
}

function byComparison(values: Float64Array): Uint32Array {
  const last = (value: number): number => (Number.isNaN(value) ? 1 : 0);
  return Uint32Array.from(values.keys()).sort((a, b) => {
    const [x, y] = [values[a] ?? NaN, values[b] ?? NaN];
    return x < y ? -1 : x > y ? 1 : last(x) - last(y) || a - b;
  });
}

/** Bits that are in the order of the numbers as whole numbers without a sign are. */
function keysOf(values: Float64Array): { readonly low: Uint32Array; readonly high: Uint32Array } {
  const [low, high] = [new Uint32Array(values.length), new Uint32Array(values.length)];
  const view = new DataView(new ArrayBuffer(8));
  for (const [i, value] of values.entries()) {
    view.setFloat64(0, value === 0 ? 0 : value);
    const [upper, lower] = [view.getUint32(0), view.getUint32(4)];
    const negative = upper >>> 31 === 1;
    const missing = Number.isNaN(value);
    high[i] = missing ? 0xffffffff : negative ? ~upper : upper | 0x80000000;
    low[i] = missing ? 0xffffffff : negative ? ~lower : lower;
  }
  return { low, high };
}

/** By 16 bits of the words; what is equal there stays in its order. */
function sortedBy(words: Uint32Array, shift: number, order: Uint32Array<ArrayBuffer>): Uint32Array<ArrayBuffer> {
  const starts = new Uint32Array(digits + 1);
  for (const word of words) {
    const next = ((word >>> shift) & (digits - 1)) + 1;
    starts[next] = (starts[next] ?? 0) + 1;
  }
  for (let digit = 0; digit < digits; digit++) starts[digit + 1] = (starts[digit + 1] ?? 0) + (starts[digit] ?? 0);
  const sorted = new Uint32Array(order.length);
  for (const index of order) {
    const digit = ((words[index] ?? 0) >>> shift) & (digits - 1);
    const place = starts[digit] ?? 0;
    sorted[place] = index;
    starts[digit] = place + 1;
  }
  return sorted;
}
