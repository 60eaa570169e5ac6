// Gathers diagnostics up to a number that someone may still read. Whether there was any error is never forgotten.
import type { Diagnostic } from './diagnostic.ts';
import { inFileOrder, tell } from './tell.ts';

/** Errors, and warnings and notes apart from them. */
const most = 100;

export class Collector {
  readonly #errors: Diagnostic[] = [];
  readonly #others: Diagnostic[] = [];

  add(...list: readonly Diagnostic[]): void {
    for (const one of list) {
      const kept = one.severity === 'error' ? this.#errors : this.#others;
      if (kept.length <= most) kept.push(one);
    }
  }

  get errors(): number {
    return this.#errors.length;
  }

  /** There is no use in looking for more errors. */
  get full(): boolean {
    return this.#errors.length > most;
  }

  /** What was gathered, in no order of the file. */
  get all(): readonly Diagnostic[] {
    return [...this.#errors, ...this.#others];
  }

  /** In the order of the file, with a word at its end where there are more. */
  told(): readonly Diagnostic[] {
    const kept = inFileOrder([...this.#errors.slice(0, most), ...this.#others.slice(0, most)]);
    if (!this.full && this.#others.length <= most) return kept;
    const message = `Only the first ${String(most)} mistakes are told`;
    const details = { place: kept.at(-1)?.place, fix: 'Mend these first.' };
    return [...kept, tell('note', 'many-mistakes', message, details)];
  }
}
