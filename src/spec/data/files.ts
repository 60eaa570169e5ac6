// The files that a spec names: it says which it wants, whoever has a disk reads them.

/** What was found under the name of a file: its text, or why it has none. */
export type DataFile =
  { readonly ok: true; readonly text: string } | { readonly ok: false; readonly why: string; readonly fix?: string };

/** By the name as it stands in the spec. */
export type DataFiles = ReadonlyMap<string, DataFile>;

/** Larger files are no tables of patches; what is larger is cut or simplified first. */
export const mostDataCharacters = 16_000_000;
