// Plain data from keys and values.

/** Sections become objects without a prototype, so that no name of a user's is mistaken for a method. */
export function sectionOf(entries: readonly (readonly [string, unknown])[]): Readonly<Record<string, unknown>> {
  const section: Record<string, unknown> = Object.create(null) as Record<string, unknown>;
  for (const [key, value] of entries) section[key] = value;
  return section;
}
