// The threads of a sweep. Each works out a part at a time; a part whose thread dies is begun again in another.
import { Worker } from 'node:worker_threads';
import { sweepWorkerScript } from '../../../build/sweep-worker-script.ts';
import { ThreadsFailure } from '../../threads/failure.ts';
import type { MadePart, PartsStart } from './make-part.ts';

/** A part that lost its thread so often is given up. */
const mostDeaths = 3;

export interface PoolRequest {
  readonly start: PartsStart;
  readonly threads: number;
  /** In the order in which they are begun. */
  readonly parts: readonly number[];
  /** Once it is aborted no further part is begun. */
  readonly signal: AbortSignal;
  /** Told every part when it is done, in any order; what it throws ends the sweep. */
  readonly take: (part: number, made: MadePart) => void;
  readonly onDeath: (reason: string) => void;
}

/** Settles when no thread is at work any more: with the number of parts that were done. */
export async function runPool(request: PoolRequest): Promise<number> {
  const threads = Math.min(request.threads, request.parts.length);
  const pool = new Pool(request);
  try {
    await Promise.all(Array.from({ length: threads }, () => pool.work()));
  } finally {
    await pool.close();
  }
  return pool.done;
}

class Pool {
  done = 0;
  readonly #request: PoolRequest;
  readonly #waiting: number[];
  readonly #deaths = new Map<number, number>();
  readonly #workers = new Set<Worker>();
  #failed = false;

  constructor(request: PoolRequest) {
    this.#request = request;
    this.#waiting = [...request.parts];
  }

  /** One thread after the other, until nothing waits. */
  async work(): Promise<void> {
    let worker: Worker | null = null;
    for (let part = this.#next(); part !== undefined; part = this.#next()) {
      worker ??= this.#start();
      const made = await answer(worker, part).catch((error: unknown) =>
        String(error instanceof Error ? error.message : error),
      );
      if (typeof made !== 'string') {
        this.#take(part, made);
        continue;
      }
      this.#workers.delete(worker);
      worker = null;
      // Where all is over, it was ended on purpose.
      if (!this.#failed) this.#mourn(part, made);
    }
  }

  async close(): Promise<void> {
    await Promise.all([...this.#workers].map((worker) => worker.terminate()));
  }

  #next(): number | undefined {
    return this.#failed || this.#request.signal.aborted ? undefined : this.#waiting.shift();
  }

  #start(): Worker {
    const worker = new Worker(sweepWorkerScript, { eval: true, workerData: this.#request.start });
    // What it dies of is told where its answer is waited for.
    worker.on('error', () => undefined);
    this.#workers.add(worker);
    return worker;
  }

  #take(part: number, made: MadePart): void {
    if (this.#failed) return;
    try {
      this.#request.take(part, made);
      this.done++;
    } catch (error) {
      this.#failed = true;
      throw error;
    }
  }

  #mourn(part: number, reason: string): void {
    const deaths = (this.#deaths.get(part) ?? 0) + 1;
    this.#deaths.set(part, deaths);
    if (deaths >= mostDeaths) {
      this.#failed = true;
      throw new ThreadsFailure(`A thread died ${String(mostDeaths)} times over the same points: ${reason}.`);
    }
    this.#waiting.unshift(part);
    this.#request.onDeath(reason);
  }
}

/** Rejects where the thread dies over it. */
function answer(worker: Worker, part: number): Promise<MadePart> {
  return new Promise((resolve, reject) => {
    const leave = (): void => {
      worker.off('message', done).off('error', reject).off('exit', gone);
    };
    const done = (made: MadePart): void => {
      leave();
      resolve(made);
    };
    const gone = (code: number): void => {
      leave();
      reject(new Error(`it ended with code ${String(code)}`));
    };
    worker.on('message', done).on('error', reject).on('exit', gone);
    worker.postMessage(part);
  });
}
