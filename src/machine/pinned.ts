// exp, log and pow with the same bits on every machine. The host's own Math functions differ between engines and versions.
import { loadMachine } from './machine.ts';

const shared = loadMachine();

/** e^x. */
export function exp(x: number): number {
  return shared.exp(x);
}

/** Natural logarithm of x. */
export function log(x: number): number {
  return shared.log(x);
}

/** base^exponent. */
export function pow(base: number, exponent: number): number {
  return shared.pow(base, exponent);
}

export const pinned = { exp, log, pow } as const;
