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
  /** By step, each with the lanes of one number next to each other. */
  readonly #steps: readonly Float64Array[];
  readonly #width: number;
  /** Steps that were written from the first on. */
  #written = 0;

  constructor(size: TapeSize) {
    this.#width = size.weather * layout.lanes;
    const numbers = new Float64Array(size.steps * this.#width);
    this.#steps = Array.from({ length: size.steps }, (_, i) =>
      numbers.subarray(i * this.#width, (i + 1) * this.#width),
    );
  }

  /** For other replicates. */
  clear(): void {
    this.#written = 0;
  }

  /** What does step t (from 1) of the batch that the machine is at: one after the other. */
  stepsOn(machine: Machine): (t: number) => void {
    const now = new Float64Array(machine.memory.buffer, machine.weatherNumbers(), this.#width);
    return (t) => {
      const own = this.#steps[t - 1];
      if (own === undefined) throw new RangeError(`The tape of the weather has no step ${t}.`);
      if (t <= this.#written) {
        now.set(own);
        machine.stepUnder();
      } else {
        machine.step();
        own.set(now);
        this.#written = t;
      }
    };
  }
}
