// Names to the 32-bit keys of random streams. A key depends on the name alone, never on its position; where two names meet
// in one key, the later in the order of names is hashed again until it stands alone.

const offsetBasis = 0x811c9dc5;
const fnvPrime = 0x01000193;
const encoder = new TextEncoder();

/** FNV-1a over UTF-8, then the 32-bit finaliser of MurmurHash3. */
export function keyOfName(name: string): number {
  let hash = offsetBasis;
  for (const byte of encoder.encode(name)) hash = Math.imul(hash ^ byte, fnvPrime);
  hash = Math.imul(hash ^ (hash >>> 16), 0x85ebca6b);
  hash = Math.imul(hash ^ (hash >>> 13), 0xc2b2ae35);
  return (hash ^ (hash >>> 16)) >>> 0;
}

/** One key a name, in the order given, all different. `kind` keeps a patch and a phase of one name apart. */
export function keysOfNames(kind: string, names: readonly string[], hash = keyOfName): Int32Array {
  const taken = new Set<number>();
  const keys = new Map<string, number>();
  for (const name of [...new Set(names)].sort(byCodeUnits)) {
    let key = hash(`${kind}:${name}`);
    for (let again = 1; taken.has(key); again++) key = hash(`${kind}:${name}:${String(again)}`);
    taken.add(key);
    keys.set(name, key);
  }
  return Int32Array.from(names, (name) => keys.get(name) ?? 0);
}

function byCodeUnits(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}
