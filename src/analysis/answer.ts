// A result, or why there is none.

export type Answer<T> = { readonly value: T } | { readonly value: null; readonly reason: string };

export function because(reason: string): { readonly value: null; readonly reason: string } {
  return { value: null, reason };
}

/** 'North, Ridge and 5 more'. */
export function listNames(names: readonly string[], most = 3): string {
  const more = names.length - most;
  if (more > 0) return `${names.slice(0, most).join(', ')} and ${more} more`;
  return names.length < 2 ? names.join('') : `${names.slice(0, -1).join(', ')} and ${names.at(-1) ?? ''}`;
}

/** Collects the reasons of missing answers by the field they are missing from. */
export interface Reasons {
  readonly told: Readonly<Record<string, string>>;
  readonly take: <T>(field: string, answer: Answer<T>) => T | null;
}

export function collectReasons(): Reasons {
  const told: Record<string, string> = {};
  const take = <T>(field: string, answer: Answer<T>): T | null => {
    if (answer.value === null && 'reason' in answer) told[field] = answer.reason;
    return answer.value;
  };
  return { told, take };
}
