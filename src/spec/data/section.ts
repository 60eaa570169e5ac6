// Builds the section that stands for a table, cell by cell: keys within keys, and each value once.
import { put, type Report } from '../shape/report.ts';
import { placeAt, type SourceEntry, type SourceMap, type SourceNode, type SourceScalar } from '../text/source.ts';

interface Branch {
  readonly key: SourceScalar;
  readonly below: Map<string, Branch>;
  value: SourceScalar | null;
}

export class Section {
  readonly #top = new Map<string, Branch>();
  readonly #report: Report;

  constructor(report: Report) {
    this.#report = report;
  }

  /** An empty cell gives nothing; an empty key is a mistake, and so is a second value for the same keys. */
  put(keys: readonly SourceScalar[], value: SourceScalar): void {
    if (value.source === '' || this.#report.found.full) return;
    let level = this.#top;
    let last: Branch | undefined;
    for (const key of keys) {
      if (key.source === '' || key.source === '__proto__') {
        this.#tellKey(key, value);
        return;
      }
      last = level.get(key.source) ?? { key, below: new Map(), value: null };
      level.set(key.source, last);
      level = last.below;
    }
    if (last === undefined) return;
    if (last.value !== null) this.#tellTwice(last.value, value);
    last.value = value;
  }

  node(): SourceMap {
    return this.#mapOf(this.#top);
  }

  #mapOf(level: ReadonlyMap<string, Branch>): SourceMap {
    const file = this.#report.source;
    const entries = [...level.values()].map(({ key, below, value }): SourceEntry => {
      const node: SourceNode = value ?? this.#mapOf(below);
      return { key: key.source, keySpan: key.span, plain: false, value: node, file };
    });
    return { kind: 'map', entries, span: entries[0]?.keySpan ?? { offset: 0, length: 1 }, file };
  }

  #tellKey(key: SourceScalar, value: SourceScalar): void {
    const span = key.source === '' ? value.span : key.span;
    const message = key.source === '' ? 'This row does not say what its number belongs to' : 'This name cannot be used';
    put(this.#report, { code: 'csv-row', message, span }, { fix: 'Fill the cells that name the row.' });
  }

  #tellTwice(first: SourceScalar, second: SourceScalar): void {
    const line = placeAt(this.#report.source, first.span).line;
    put(
      this.#report,
      { code: 'csv-repeated', message: 'There is a number for this already', span: second.span },
      { found: second.source, fix: `Leave out one of the two rows; the first is in line ${String(line)}.` },
    );
  }
}
