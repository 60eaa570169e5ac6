// Drivers whose years are drawn: what an expression over them is in the mean of all years that can come.
import type { Resampled } from './chance.ts';

export class ResampledYears {
  readonly #resampled: Resampled;
  /** The given year whose values are read. */
  #row = 0;

  constructor(resampled: Resampled | null) {
    this.#resampled = resampled ?? { names: [], years: [], values: new Float64Array(0) };
  }

  get names(): readonly string[] {
    return this.#resampled.names;
  }

  /** Of a driver in the year that is read; undefined where there is no such driver. */
  value(name: string): number | undefined {
    const { names, years, values } = this.#resampled;
    const driver = names.indexOf(name);
    return driver < 0 ? undefined : values[driver * years.length + this.#row];
  }

  /** Over all given years, each read in turn. */
  mean(valueInYear: () => number): number {
    const years = this.#resampled.years.length;
    let sum = 0;
    for (let row = 0; row < years; row++) {
      this.#row = row;
      sum += valueInYear();
    }
    this.#row = 0;
    return sum / years;
  }
}
