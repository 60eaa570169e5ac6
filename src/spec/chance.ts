// A chance that says what it is a chance of: `0.04 per patch` or `0.04 per landscape`.

export interface ChancePer {
  /** The expression before `per`. */
  readonly amount: string;
  readonly per: 'patch' | 'landscape';
}

/** Null where it does not say so. */
export function readChance(text: string): ChancePer | null {
  const found = /^(.*\S)\s+per\s+(patch|landscape)$/u.exec(text.trim());
  const amount = found?.[1];
  if (amount === undefined) return null;
  return { amount, per: found?.[2] === 'patch' ? 'patch' : 'landscape' };
}
