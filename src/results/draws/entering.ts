// Whether what is not known enters a model at all: whether its image differs between the draws.
import { sameBytes } from '../../numeric/bytes.ts';

export class Entering {
  #first: ArrayBuffer | null = null;
  #enters = false;

  see(image: ArrayBuffer): void {
    this.#first ??= image;
    this.#enters ||= !sameBytes(this.#first, image);
  }

  get enters(): boolean {
    return this.#enters;
  }
}
