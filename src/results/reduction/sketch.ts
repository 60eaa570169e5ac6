// Sketched quantiles of many cells: for each the counts of its fixed bins, kept only between the lowest and the highest bin
// that it ever met, so that ten thousand runs of forty thousand cells take some tens of megabytes.
import { binOf, middleOf } from './bins.ts';
import type { QuantileStore } from './store.ts';

/** Bins by which a window grows, so that it seldom does. */
const step = 16;
const pageBins = 1 << 19;

type Page = Uint16Array | Uint32Array;

export class Sketches implements QuantileStore {
  readonly #wide: boolean;
  readonly #pages: Page[] = [];
  #used = pageBins;
  /** Windows of a size that were left for larger ones, by their number of steps. */
  readonly #free = new Map<number, number[]>();
  /** First bin of the window of a cell, its bins, and where it stands: page · pageBins + offset. */
  readonly #lowest: Int16Array;
  readonly #bins: Int16Array;
  readonly #place: Float64Array;

  /** `most` runs at the most. */
  constructor(cells: number, most: number) {
    this.#wide = most > 65535;
    this.#lowest = new Int16Array(cells);
    this.#bins = new Int16Array(cells);
    this.#place = new Float64Array(cells);
  }

  add(cell: number, values: Float64Array, from: number, count: number): void {
    let [lowest, highest] = [Infinity, -1];
    for (let i = from; i < from + count; i++) {
      const bin = binOf(values[i] ?? 0);
      if (bin < lowest) lowest = bin;
      if (bin > highest) highest = bin;
    }
    if (highest < 0) return;
    this.#cover(cell, lowest, highest);
    const [page, offset] = this.#locate(cell);
    const start = offset - (this.#lowest[cell] ?? 0);
    for (let i = from; i < from + count; i++) {
      const at = start + binOf(values[i] ?? 0);
      page[at] = (page[at] ?? 0) + 1;
    }
  }

  at(cell: number, ranks: readonly number[]): readonly number[] {
    if (this.#bins[cell] === 0) return ranks.map(() => 0);
    const [page, offset] = this.#locate(cell);
    const lowest = this.#lowest[cell] ?? 0;
    let [bin, passed] = [0, page[offset] ?? 0];
    return ranks.map((rank) => {
      while (passed <= rank && bin + 1 < (this.#bins[cell] ?? 0)) passed += page[offset + ++bin] ?? 0;
      return middleOf(lowest + bin);
    });
  }

  #locate(cell: number): readonly [Page, number] {
    const place = this.#place[cell] ?? 0;
    const page = this.#pages[Math.floor(place / pageBins)];
    if (page === undefined) throw new Error('A cell of a sketch has no window.');
    return [page, place % pageBins];
  }

  /** Lets the window of a cell hold these bins. */
  #cover(cell: number, lowest: number, highest: number): void {
    const bins = this.#bins[cell] ?? 0;
    const from = this.#lowest[cell] ?? 0;
    if (bins > 0 && lowest >= from && highest < from + bins) return;
    const first = Math.floor(Math.min(lowest, bins > 0 ? from : lowest) / step) * step;
    const end = Math.ceil((Math.max(highest + 1, from + bins) - first) / step) * step + first;
    const place = this.#take(end - first);
    if (bins > 0) {
      const [page, offset] = this.#locate(cell);
      const target = this.#pages[Math.floor(place / pageBins)];
      target?.set(page.subarray(offset, offset + bins), (place % pageBins) + from - first);
      page.fill(0, offset, offset + bins);
      this.#leave(bins, this.#place[cell] ?? 0);
    }
    this.#lowest[cell] = first;
    this.#bins[cell] = end - first;
    this.#place[cell] = place;
  }

  #take(bins: number): number {
    const left = this.#free.get(bins)?.pop();
    if (left !== undefined) return left;
    if (this.#used + bins > pageBins) {
      this.#pages.push(this.#wide ? new Uint32Array(pageBins) : new Uint16Array(pageBins));
      this.#used = 0;
    }
    const place = (this.#pages.length - 1) * pageBins + this.#used;
    this.#used += bins;
    return place;
  }

  #leave(bins: number, place: number): void {
    const free = this.#free.get(bins);
    if (free === undefined) this.#free.set(bins, [place]);
    else free.push(place);
  }
}
