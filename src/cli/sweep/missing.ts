// Which parts of a sweep are missing, and which shard would make them.

const named = 12;
const mostShards = 1000;

/** Null where none is. */
export function missingWords(parts: number, there: ReadonlySet<number>): string | null {
  const missing = Array.from({ length: parts }, (_, part) => part).filter((part) => !there.has(part));
  const [first] = missing;
  if (first === undefined) return null;
  const names = missing.slice(0, named).map((part) => String(part + 1));
  const more = missing.length > named ? ` and ${missing.length - named} more` : '';
  const words = `${missing.length === 1 ? 'part' : 'parts'} ${names.join(', ')}${more} of ${parts} ${missing.length === 1 ? 'is' : 'are'} missing`;
  const of = shardOf(parts, missing);
  return of === null ? words : `${words}, which is shard ${(first % of) + 1}/${of}`;
}

/** So many shards that one of them is all that is missing. */
function shardOf(parts: number, missing: readonly number[]): number | null {
  const [first = 0] = missing;
  for (let of = 2; of <= Math.min(mostShards, parts); of++) {
    const size = Math.ceil((parts - (first % of)) / of);
    if (size === missing.length && missing.every((part) => part % of === first % of)) return of;
  }
  return null;
}
