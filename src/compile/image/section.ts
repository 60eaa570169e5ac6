// Sections: the typed arrays that an image is made of, and the list that gives each its row of the directory.
import { none } from '../../../assembly/layout.ts';

export interface Section {
  /** One of the kinds of layout.ts. */
  readonly kind: number;
  readonly data: Int32Array | Float64Array | Uint8Array;
  /** Entries of one epoch or record; the whole length where there is one. */
  readonly columns: number;
  /** Row of the section that says which epoch holds in a step. */
  readonly epochOf: number;
  /** The part of the model that the section is made from, and all that it is made from. */
  readonly reads: string;
}

/** Collects sections; `add` gives the row by which programs and other sections name one. */
export class SectionList {
  readonly #sections: Section[] = [];

  add(section: Section): number {
    this.#sections.push(section);
    return this.#sections.length - 1;
  }

  get sections(): readonly Section[] {
    return this.#sections;
  }
}

/** A section without epochs. */
export function plain(kind: number, data: Section['data'], reads: string): Section {
  return { kind, data, columns: data.length, epochOf: none, reads };
}
