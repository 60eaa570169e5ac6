// Entries of arrays in memory by their index.

export function i32At(array: usize, i: i32): i32 {
  return load<i32>(array + ((<usize>i) << 2));
}

export function u32At(array: usize, i: i32): u32 {
  return load<u32>(array + ((<usize>i) << 2));
}

export function f64At(array: usize, i: i32): f64 {
  return load<f64>(array + ((<usize>i) << 3));
}

export function u64At(array: usize, i: i32): u64 {
  return load<u64>(array + ((<usize>i) << 3));
}

export function putU32(array: usize, i: i32, value: u32): void {
  store<u32>(array + ((<usize>i) << 2), value);
}

export function putF64(array: usize, i: i32, value: f64): void {
  store<f64>(array + ((<usize>i) << 3), value);
}
