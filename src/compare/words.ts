// Numbers in the sentences of a comparison.

/** A chance or a share, such as `8.2 %`. */
export function percentWords(share: number): string {
  return `${(share * 100).toFixed(1)}\u00a0%`;
}

/** A difference of chances, such as `3.1 points`. */
export function pointsWords(difference: number): string {
  const points = Math.abs(difference * 100).toFixed(1);
  return `${points} ${points === '1.0' ? 'point' : 'points'}`;
}

/** Grouped by thousands. */
export function moneyWords(amount: number, currency: string): string {
  const digits = String(Math.round(Math.abs(amount)));
  return `${amount < 0 ? '−' : ''}${digits.replaceAll(/\B(?=(\d{3})+$)/g, ',')} ${currency}`;
}

/** With its range where prices are ranges. */
export function costWords(
  { presentValue, least, most }: { readonly presentValue: number; readonly least: number; readonly most: number },
  currency: string,
): string {
  const middle = moneyWords(presentValue, currency);
  const [low, high] = [least, most].map((amount) => moneyWords(amount, '').trim());
  return least === most ? middle : `${middle} (${low} to ${high}, as prices are)`;
}

export function namesWords(names: readonly string[]): string {
  const quoted = names.map((name) => `“${name}”`);
  if (quoted.length < 2) return quoted.join('');
  return `${quoted.slice(0, -1).join(', ')} and ${quoted.at(-1) ?? ''}`;
}
