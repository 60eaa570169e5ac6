// Collects the runs of an outer loop draw by draw: pooled for what is counted, apart for intervals over draws.
import type { BatchCounts } from '../../kernel/output.ts';
import type { Model } from '../../model/model.ts';
import type { Reduction } from '../reduction/reduction.ts';
import type { Chance, DrawRow, OutcomeResult, RunResults } from '../results.ts';
import { Entering } from './entering.ts';
import { bandOverDraws, fromUnknown, intervalFromRuns, intervalFromUnknown, type DrawCount } from './intervals.ts';
import type { DrawnValues } from './plan.ts';

/** Runs and hits of one draw that could be run, by outcome. */
interface FinishedDraw {
  readonly runs: number;
  /** By outcome: runs that had come to it by count t, and those in which it is so at the end. */
  readonly comeBy: readonly Float64Array[];
  readonly soAtEnd: readonly number[];
  /** Mean of the lowest counts. */
  readonly lowest: number;
}

export class DrawCollector {
  readonly #model: Model;
  readonly #reduction: Reduction;
  readonly #rows: DrawRow[] = [];
  readonly #finished: FinishedDraw[] = [];
  readonly #entering = new Entering();
  #offset = 0;
  #before: Counted;

  constructor(model: Model, reduction: Reduction) {
    this.#model = model;
    this.#reduction = reduction;
    this.#before = counted(reduction);
  }

  take(batch: BatchCounts): void {
    const stopped = batch.stopped.map((stop) => ({ ...stop, replicate: stop.replicate + this.#offset }));
    this.#reduction.take({ ...batch, first: batch.first + this.#offset, stopped });
  }

  /** All batches of a draw were taken, which ran this image. */
  finish(draw: number, values: DrawnValues, image: ArrayBuffer): void {
    this.#entering.see(image);
    const after = counted(this.#reduction);
    const less = (now: Float64Array, then: Float64Array | undefined) => now.map((value, t) => value - (then?.[t] ?? 0));
    const runs = after.runs - this.#before.runs;
    const comeBy = after.comeBy.map((now, k) => less(now, this.#before.comeBy[k]));
    const soAtEnd = after.soAtEnd.map((now, k) => now - (this.#before.soAtEnd[k] ?? 0));
    this.#before = after;
    const lowest = meanFrom(this.#reduction.lowest, this.#offset, this.#model.replicates);
    this.#offset += this.#model.replicates;
    this.#finished.push({ runs, comeBy, soAtEnd, lowest });
    const ever = comeBy.map((curve) => (runs === 0 ? null : (curve.at(-1) ?? 0) / runs));
    this.#rows.push({ draw: draw + 1, values, failure: null, ever });
  }

  /** A draw that no model can have. */
  fail(draw: number, values: DrawnValues, failure: string): void {
    this.#rows.push({ draw: draw + 1, values, failure, ever: this.#model.outcomes.map(() => null) });
  }

  /** Whether what is not known enters the model. */
  get enters(): boolean {
    return this.#entering.enters;
  }

  /** Draws that could be run. */
  get done(): number {
    return this.#finished.length;
  }

  /** Results of the pooled runs with the intervals of draws in the place of those of independent runs. */
  withDraws(pooled: RunResults): RunResults {
    const outcomes = pooled.outcomes.map((outcome, k) => this.#outcome(outcome, k));
    const failed = this.#rows.filter(({ failure }) => failure !== null).length;
    const draws = { number: this.#rows.length, failed, replicatesEach: this.#model.replicates, rows: this.#rows };
    const replicates = this.#model.replicates * this.#finished.length;
    const meanLowestCount = { ...pooled.meanLowestCount, standardError: this.#errorOfLowest() };
    return { ...pooled, replicates, outcomes, meanLowestCount, draws };
  }

  /** Of the mean over draws, with the draw as its unit; NaN for a single draw. */
  #errorOfLowest(): number {
    const means = this.#finished.map(({ lowest }) => lowest);
    const mean = means.reduce((a, b) => a + b, 0) / means.length;
    const squares = means.reduce((sum, one) => sum + (one - mean) * (one - mean), 0);
    return means.length < 2 ? NaN : Math.sqrt(squares / (means.length - 1) / means.length);
  }

  #outcome(outcome: OutcomeResult, k: number): OutcomeResult {
    const ever = this.#finished.map(({ runs, comeBy }): DrawCount => ({ hits: comeBy[k]?.at(-1) ?? 0, runs }));
    const atEnd = this.#finished.map(({ runs, soAtEnd }): DrawCount => ({ hits: soAtEnd[k] ?? 0, runs }));
    const curves = this.#finished.map(({ runs, comeBy }) => (comeBy[k] ?? new Float64Array(0)).map((n) => n / runs));
    const band = bandOverDraws(curves);
    return {
      ...outcome,
      ever: overDraws(outcome.ever, ever, this.enters),
      atEnd: overDraws(outcome.atEnd, atEnd, this.enters),
      byYear: outcome.byYear.map((year) => ({
        ...year,
        lower: Math.max(0, year.ever - band),
        upper: Math.min(1, year.ever + band),
      })),
    };
  }
}

function overDraws({ probability }: Chance, draws: readonly DrawCount[], enters: boolean): Chance {
  const unknown = fromUnknown(intervalFromUnknown(draws), { draws: draws.length, enters });
  return { probability, interval: intervalFromRuns(draws), ...unknown };
}

/** Of the replicates that came and were not stopped. */
function meanFrom(lowest: Int32Array, first: number, count: number): number {
  const own = lowest.subarray(first, first + count).filter((value) => value >= 0);
  return own.reduce((a, b) => a + b, 0) / Math.max(1, own.length);
}

interface Counted {
  readonly runs: number;
  readonly comeBy: readonly Float64Array[];
  readonly soAtEnd: readonly number[];
}

function counted({ runs, hits }: Reduction): Counted {
  return {
    runs,
    comeBy: hits.map(({ firstAt }) => {
      let sum = 0;
      return Float64Array.from(firstAt.subarray(1), (first) => (sum += first));
    }),
    soAtEnd: hits.map(({ nowAt }) => nowAt.at(-1) ?? 0),
  };
}
