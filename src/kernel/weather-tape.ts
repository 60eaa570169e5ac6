// What lasts of the weather of a batch, step by step: written by the first run of its replicates, and read by runs of other images
// whose weather is drawn from the same. What is drawn is a third of a run of few animals, and the same numbers come out.
import * as layout from '../../assembly/layout.ts';
import type { Machine } from '../machine/instance.ts';

export interface TapeSize {
  readonly steps: number;
  /** Lasting numbers of one replicate. */
  readonly weather: number;
}

export function bytesOfTape({ steps, weather }: TapeSize): number {
  return steps * weather * layout.lanes * Float64Array.BYTES_PER_ELEMENT;
}

export class WeatherTape {
  readonly #width: number;
  readonly #numbers: Float64Array;
  /** Steps that were written from the first on. */
  #written = 0;

  constructor(size: TapeSize) {
    this.#width = size.weather * layout.lanes;
    this.#numbers = new Float64Array(size.steps * this.#width);
  }

  /** For other replicates. */
  clear(): void {
    this.#written = 0;
  }

  /** Step t (from 1) of the batch that the machine is at, one after the other. */
  step(machine: Machine, t: number): void {
    const now = new Float64Array(machine.memory.buffer, machine.weatherNumbers(), this.#width);
    const [start, end] = [(t - 1) * this.#width, t * this.#width];
    if (t <= this.#written) {
      now.set(this.#numbers.subarray(start, end));
      machine.stepUnder();
      return;
    }
    machine.step();
    this.#numbers.set(now, start);
    this.#written = t;
  }
}
