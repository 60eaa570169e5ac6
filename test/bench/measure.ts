// How things are measured: in turns within one run, by the time of the processor that each took, as medians.

/** Seconds of processor time of this process spent in `action`. */
export function processorSeconds(action: () => void): number {
  const before = process.cpuUsage();
  action();
  // The sum is exact; how it falls into two parts is only sampled.
  const { user, system } = process.cpuUsage(before);
  return (user + system) / 1e6;
}

/**
 * The same of the second of two turns: starting another program leaves the pages of this one to be copied when they are next
 * written, which costs more than the work itself where much memory is written.
 */
export function settledSeconds(action: () => void): number {
  action();
  return processorSeconds(action);
}

/** By the clock on the wall, which only a machine that nobody else uses makes worth reading. */
export function elapsedSeconds(action: () => void): number {
  const began = performance.now();
  action();
  return (performance.now() - began) / 1000;
}

export interface Contender {
  readonly name: string;
  /** Does the work once; seconds of processor time. */
  readonly run: () => number;
  /** Rounds at most: slow ones need fewer. */
  readonly rounds?: number;
}

/** Median seconds of each, by name. The order turns round from round to round, so that no one always comes first. */
export function inTurns(contenders: readonly Contender[], rounds: number): ReadonlyMap<string, number> {
  const times = new Map<string, number[]>(contenders.map(({ name }) => [name, []]));
  for (let round = 0; round < rounds; round++) {
    for (const { name, run, rounds: most = rounds } of round % 2 === 0 ? contenders : contenders.toReversed()) {
      if (round < most) times.get(name)?.push(run());
    }
  }
  return new Map([...times].map(([name, list]) => [name, median(list)]));
}

export function median(values: readonly number[]): number {
  const sorted = values.toSorted((a, b) => a - b);
  const middle = sorted.length >> 1;
  const upper = sorted[middle] ?? NaN;
  return sorted.length % 2 === 1 ? upper : ((sorted[middle - 1] ?? NaN) + upper) / 2;
}

/** Mean and its standard error. */
export function meanOf(values: readonly number[]): { readonly mean: number; readonly error: number } {
  const mean = values.reduce((a, b) => a + b, 0) / values.length;
  const squares = values.reduce((sum, value) => sum + (value - mean) * (value - mean), 0);
  return { mean, error: Math.sqrt(squares / (values.length - 1) / values.length) };
}

/** Numbers of a seed in [0, 1) (linear congruential; Park & Miller 1988). */
export function stream(seed: number): () => number {
  let state = (seed % 2147483646) + 1;
  return () => (state = (state * 48271) % 2147483647) / 2147483647;
}
