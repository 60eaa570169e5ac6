// Parts that were just made, so that they need not be read back from their files; as many as fit in some memory.
import type { PartColumns } from '../../sweep/point/part.ts';

/** 128 MB. */
const mostNumbers = 1 << 24;

export class KeptParts {
  readonly #parts = new Map<number, PartColumns>();
  #numbers = 0;

  take(part: number, columns: PartColumns): void {
    const numbers = (columns.values.length + columns.numbers.length) * columns.count;
    if (this.#numbers + numbers > mostNumbers) return;
    this.#parts.set(part, columns);
    this.#numbers += numbers;
  }

  /** Undefined where it was not kept; it is let go. */
  release(part: number): PartColumns | undefined {
    const columns = this.#parts.get(part);
    this.#parts.delete(part);
    return columns;
  }
}
