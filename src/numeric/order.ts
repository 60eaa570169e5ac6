// The order of very many numbers: by digits of their bits instead of by comparison, in time in proportion to how many they are.

const digitBits = 16;
const digits = 1 << digitBits;

/** Fewer than these are sorted faster by comparison. */
const few = 5000;

/** Numbers that a drawer may hold where they are laid out by size. */
const mostInDrawer = 32;

/** Indices from the least number to the greatest, those of equal ones in their order, NaN last. Both zeros are equal. */
export function ascendingOrder(values: Float64Array): Uint32Array {
  if (values.length < few) return byComparison(values);
  return byDrawers(values) ?? byDigits(values);
}

/**
 * As many drawers as numbers, each for equally much of their range, and what lies in one put in order by hand: numbers that are spread
 * over their range are then sorted on two ways through them. Null where they crowd, or are missing or infinite.
 */
function byDrawers(values: Float64Array): Uint32Array | null {
  const count = values.length;
  let [least, most] = [Infinity, -Infinity];
  for (let i = 0; i < count; i++) {
    const value = values[i] ?? NaN;
    if (!(value >= least)) least = value;
    if (!(value <= most)) most = value;
  }
  const scale = (count - 1) / (most - least);
  if (!(scale > 0 && scale < Infinity)) return null;
  const drawer = new Uint32Array(count);
  const starts = new Uint32Array(count + 1);
  for (let i = 0; i < count; i++) {
    const own = ((values[i] ?? 0) - least) * scale;
    if (Number.isNaN(own)) return null;
    const place = Math.min(count - 1, Math.floor(own));
    drawer[i] = place;
    starts[place + 1] = (starts[place + 1] ?? 0) + 1;
  }
  for (let place = 0; place < count; place++) {
    const held = starts[place + 1] ?? 0;
    if (held > mostInDrawer) return null;
    starts[place + 1] = held + (starts[place] ?? 0);
  }
  const order = new Uint32Array(count);
  for (let i = 0; i < count; i++) {
    const place = drawer[i] ?? 0;
    const at = starts[place] ?? 0;
    order[at] = i;
    starts[place] = at + 1;
  }
  putInOrder(values, order);
  return order;
}

/** Nothing is far from its place. What is equal stays in its order. */
function putInOrder(values: Float64Array, order: Uint32Array): void {
  for (let i = 1; i < order.length; i++) {
    const index = order[i] ?? 0;
    const value = values[index] ?? 0;
    let at = i;
    for (; at > 0 && (values[order[at - 1] ?? 0] ?? 0) > value; at--) order[at] = order[at - 1] ?? 0;
    order[at] = index;
  }
}

function byDigits(values: Float64Array): Uint32Array {
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
