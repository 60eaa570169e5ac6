// Structures in the compact protocol of Apache Thrift, as the headers of Parquet files are written in.

const types = { i32: 5, i64: 6, binary: 8, list: 9, struct: 12 } as const;

/** A field of a structure; numbers below 2^53. */
export type Field =
  | { readonly i32: number }
  | { readonly i64: number }
  | { readonly binary: string }
  | { readonly struct: Fields }
  | { readonly list: readonly Field[] };

/** Numbers of the fields, ascending, and what is in them. */
export type Fields = readonly (readonly [id: number, value: Field])[];

export function compactBytes(fields: Fields): Uint8Array {
  const bytes: number[] = [];
  writeStruct(bytes, fields);
  return Uint8Array.from(bytes);
}

function typeOf(field: Field): number {
  if ('i32' in field) return types.i32;
  if ('i64' in field) return types.i64;
  if ('binary' in field) return types.binary;
  return 'struct' in field ? types.struct : types.list;
}

function writeStruct(bytes: number[], fields: Fields): void {
  let before = 0;
  for (const [id, value] of fields) {
    bytes.push(((id - before) << 4) | typeOf(value));
    before = id;
    writeValue(bytes, value);
  }
  bytes.push(0);
}

function writeValue(bytes: number[], value: Field): void {
  if ('i32' in value) writeVarint(bytes, zigzag(value.i32));
  else if ('i64' in value) writeVarint(bytes, zigzag(value.i64));
  else if ('struct' in value) writeStruct(bytes, value.struct);
  else if ('binary' in value) {
    const text = new TextEncoder().encode(value.binary);
    writeVarint(bytes, text.length);
    for (const byte of text) bytes.push(byte);
  } else {
    const { list } = value;
    const type = list[0] === undefined ? types.struct : typeOf(list[0]);
    bytes.push(list.length < 15 ? (list.length << 4) | type : 0xf0 | type);
    if (list.length >= 15) writeVarint(bytes, list.length);
    for (const item of list) writeValue(bytes, item);
  }
}

function zigzag(value: number): number {
  return value < 0 ? -2 * value - 1 : 2 * value;
}

/** Seven bits a byte, the lowest first. */
export function writeVarint(bytes: number[], value: number): void {
  let rest = value;
  for (; rest >= 128; rest = Math.floor(rest / 128)) bytes.push((rest % 128) | 128);
  bytes.push(rest);
}
