// Weather that points share: what it is drawn from is often the same at all of them, so that it is drawn once for the replicates of the
// first and read at all others. A point comes to the same numbers with and without.
import { weatherNumbersOf, weatherSource } from '../../compile/image/weather.ts';
import { bytesOfTape, WeatherTape } from '../../kernel/weather-tape.ts';

/** Bytes of all tapes that are kept. */
const mostBytes = 1 << 25;

export interface TapedRun {
  readonly image: ArrayBuffer;
  readonly steps: number;
  readonly seed: number;
  readonly batches: number;
}

export class Tapes {
  readonly #kept = new Map<string, readonly WeatherTape[]>();
  #bytes = 0;

  /** One for each batch of the run; none where nothing lasts of the weather or there is too much of it. */
  of({ image, steps, seed, batches }: TapedRun): readonly WeatherTape[] {
    const size = { steps, weather: weatherNumbersOf(image) };
    const bytes = bytesOfTape(size) * batches;
    if (bytes === 0 || bytes > mostBytes) return [];
    const key = [seed, steps, batches, weatherSource(image)].join('\n');
    const known = this.#kept.get(key);
    if (known !== undefined) return known;
    if (this.#bytes + bytes > mostBytes) {
      this.#kept.clear();
      this.#bytes = 0;
    }
    const made = Array.from({ length: batches }, () => new WeatherTape(size));
    this.#kept.set(key, made);
    this.#bytes += bytes;
    return made;
  }
}
