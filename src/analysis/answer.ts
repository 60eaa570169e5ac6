// A result, or why there is none.

export type Answer<T> = { readonly value: T } | { readonly value: null; readonly reason: string };

export function because(reason: string): { readonly value: null; readonly reason: string } {
  return { value: null, reason };
}

/** What is asked of `given`, or the reason why nothing is given. */
export function whereGiven<G, T>(given: G | undefined, reason: string, ask: (given: G) => Answer<T>): Answer<T> {
  return given === undefined ? because(reason) : ask(given);
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
