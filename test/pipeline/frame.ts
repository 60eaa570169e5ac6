// What every spec needs around what a test is about.

export interface Frame {
  /** As in a list of YAML. */
  readonly patches?: string;
  readonly years?: number;
}

/** One patch called Meadow for 20 years, unless the frame says otherwise. */
export function framed(essence: string, { patches = '[{ name: Meadow }]', years = 20 }: Frame = {}): string {
  return `skein: 1
study: { title: A test }
years: ${String(years)}
patches: ${patches}
counts: females
${essence}`;
}

/** A matrix as YAML. */
export function rowsText(rows: readonly (readonly number[])[]): string {
  return `[${rows.map((row) => `[${row.join(', ')}]`).join(', ')}]`;
}
