// The shortest decimal digits that stand for a number and for no other one, and of those the nearest to it (Giulietti 2020, The
// Schubfach way to render doubles): those that JavaScript writes, too.

/** u64 [power + 292][high, low]: the first 128 bits of ten to this power, rounded up; from −292 to 324. */
let powers: usize = 0;
const leastPower = -292;

/** The digits, as a whole number, and the power of ten that they are to be taken by. */
export let digits: u64 = 0;
export let exponent: i32 = 0;

export function takePowers(at: usize): void {
  powers = at;
}

/** Of a finite number above 0. */
export function shorten(value: f64): void {
  const bits = reinterpret<u64>(value);
  const fraction = bits & 0x000fffffffffffff;
  const biased = i32(bits >> 52);
  const significand = biased === 0 ? fraction : fraction | 0x0010000000000000;
  const binary = (biased === 0 ? 1 : biased) - 1075;
  if (binary <= 0 && binary > -53) {
    const whole = significand >> u64(-binary);
    if (whole << u64(-binary) === significand) {
      digits = whole;
      exponent = 0;
      return;
    }
  }
  between(significand, binary, fraction === 0 && biased > 1);
}

/** The shortest within half the way to both neighbours, of which the lower is nearer below a power of two. */
function between(significand: u64, binary: i32, nearer: bool): void {
  const open: u64 = significand & 1;
  const decimal = (binary * 1262611 - (nearer ? 524031 : 0)) >> 22;
  const up = binary + ((-decimal * 1741647) >> 19) + 1;
  const power = powers + ((<usize>(-decimal - leastPower)) << 4);
  const high = load<u64>(power);
  const low = load<u64>(power, 8);
  const middle = significand << 2;
  const from = scaled(high, low, (middle - 2 + u64(nearer)) << u64(up)) + open;
  const at = scaled(high, low, middle << u64(up));
  const to = scaled(high, low, (middle + 2) << u64(up)) - open;
  const nearest = at >> 2;
  if (nearest >= 10) {
    const shorter = nearest / 10;
    const lowerFits = from <= 40 * shorter;
    const upperFits = 40 * shorter + 40 <= to;
    if (lowerFits !== upperFits) {
      digits = shorter + u64(upperFits);
      exponent = decimal + 1;
      return;
    }
  }
  const lowerFits = from <= nearest << 2;
  const upperFits = (nearest << 2) + 4 <= to;
  const half = (nearest << 2) + 2;
  const above = lowerFits !== upperFits ? upperFits : at > half || (at === half && (nearest & 1) !== 0);
  digits = nearest + u64(above);
  exponent = decimal;
}

/** The upper 64 bits of a product with 128, the last of which is 1 where anything was left out. */
function scaled(high: u64, low: u64, factor: u64): u64 {
  const below = upper(low, factor);
  const next = high * factor;
  const sum = next + below;
  return (upper(high, factor) + u64(sum < next)) | u64(sum > 1);
}

/** The upper 64 bits of a product. */
function upper(a: u64, b: u64): u64 {
  const aLow = a & 0xffffffff;
  const aHigh = a >> 32;
  const bLow = b & 0xffffffff;
  const bHigh = b >> 32;
  const first = aHigh * bLow + ((aLow * bLow) >> 32);
  const second = aLow * bHigh + (first & 0xffffffff);
  return aHigh * bHigh + (first >> 32) + (second >> 32);
}
