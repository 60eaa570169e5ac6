// A crew of several threads. Tasks are begun in the order of the batches; one whose worker dies is told and begun again.
import { Worker } from 'node:worker_threads';
import { workerScript } from '../../build/worker-script.ts';
import * as layout from '../../assembly/layout.ts';
import { headerOf } from '../compile/image/read.ts';
import { lanes, type Batch } from '../kernel/batch.ts';
import type { Crew, Job, JobOptions } from '../kernel/crew.ts';
import type { BatchCounts } from '../kernel/output.ts';
import { kernelModule } from '../machine/machine.ts';
import { ThreadsFailure } from './failure.ts';
import type { FromWorker, ToWorker } from './message.ts';
import { tasksOf } from './tasks.ts';

/** A task that lost its worker so often is given up. */
const mostDeaths = 3;

export interface ThreadsOptions {
  readonly threads: number;
  /** Told when a worker died and its task is begun again. */
  readonly onDeath?: (reason: string) => void;
  /** The script of a worker; another one in tests. */
  readonly script?: string;
}

export function openThreads(options: ThreadsOptions): Crew {
  const idle: Worker[] = [];
  return {
    run: (job, take, jobOptions = {}) => new Crewed({ job, take, ...jobOptions }, options, idle).done,
    close: async () => {
      await Promise.all(idle.splice(0).map((worker) => worker.terminate()));
    },
  };
}

interface Task {
  readonly batches: readonly Batch[];
  deaths: number;
}

interface CrewedJob extends JobOptions {
  readonly job: Job;
  readonly take: (batch: BatchCounts, image: number) => void;
}

/** One job and the workers that are at it. */
class Crewed {
  /** Settles when no worker is at work any more. */
  readonly done: Promise<number>;
  readonly #work: CrewedJob;
  readonly #options: ThreadsOptions;
  readonly #idle: Worker[];
  readonly #images: readonly SharedArrayBuffer[];
  /** Not yet begun, and begun again. */
  readonly #waiting: Task[];
  readonly #again: Task[] = [];
  #working = 0;
  #finished = 0;
  #failure: Error | null = null;
  #settle: () => void = () => undefined;

  constructor(work: CrewedJob, options: ThreadsOptions, idle: Worker[]) {
    [this.#work, this.#options, this.#idle] = [work, options, idle];
    const { images, batches } = work.job;
    this.#images = images.map(sharedCopy);
    const size = { threads: options.threads, numbersInBatch: numbersIn(work.job) };
    this.#waiting = tasksOf(batches, size).map((task) => ({ batches: task, deaths: 0 }));
    this.done = new Promise((resolve, reject) => {
      this.#settle = () => {
        if (this.#failure === null) resolve(this.#finished);
        else reject(this.#failure);
      };
    });
    const workers = Math.min(options.threads, this.#waiting.length);
    for (let i = 0; i < workers; i++) this.#startWorker();
    if (this.#working === 0) this.#settle();
  }

  #startWorker(): void {
    const task = this.#next();
    if (task === null) return;
    const { script = workerScript } = this.#options;
    const worker = this.#idle.pop() ?? new Worker(script, { eval: true, workerData: { module: kernelModule } });
    this.#working++;
    tell(worker, { kind: 'open', images: this.#images, request: this.#work.job.request });
    this.#give(worker, task);
  }

  #next(): Task | null {
    if (this.#failure !== null) return null;
    const again = this.#again.shift();
    if (again !== undefined) return again;
    return this.#work.signal?.aborted === true ? null : (this.#waiting.shift() ?? null);
  }

  #give(worker: Worker, task: Task): void {
    const finished = (batches: FromWorker): void => {
      leave();
      // The worker goes on while this thread takes what it has done.
      const next = this.#next();
      if (next !== null) this.#give(worker, next);
      this.#take(batches);
      if (next !== null) return;
      this.#idle.push(worker);
      this.#rest();
    };
    const died = (reason: unknown): void => {
      leave();
      // The exit that follows an error is no news.
      worker.on('error', () => undefined);
      this.#mourn(task, reason instanceof Error ? reason.message : `it ended with code ${String(reason)}`);
    };
    const leave = (): void => {
      worker.off('message', finished).off('error', died).off('exit', died);
    };
    worker.on('message', finished).on('error', died).on('exit', died);
    tell(worker, { kind: 'run', batches: task.batches });
  }

  #take(batches: FromWorker): void {
    if (this.#failure !== null) return;
    this.#finished += batches.length;
    try {
      for (const counts of batches) counts.forEach(this.#work.take);
    } catch (error) {
      this.#failure = error instanceof Error ? error : new Error(String(error));
    }
  }

  #mourn(task: Task, reason: string): void {
    task.deaths++;
    if (task.deaths >= mostDeaths) {
      this.#failure ??= new ThreadsFailure(`A thread died ${String(mostDeaths)} times over the same work: ${reason}.`);
    } else {
      this.#again.push(task);
      this.#options.onDeath?.(reason);
      this.#startWorker();
    }
    this.#rest();
  }

  #rest(): void {
    this.#working--;
    if (this.#working === 0) this.#settle();
  }
}

function tell(worker: Worker, message: ToWorker): void {
  worker.postMessage(message);
}

function sharedCopy(image: ArrayBuffer): SharedArrayBuffer {
  const shared = new SharedArrayBuffer(image.byteLength);
  new Uint8Array(shared).set(new Uint8Array(image));
  return shared;
}

/** Of a batch of all images. */
function numbersIn({ images, request }: Job): number {
  const columns = images.reduce((sum, image) => {
    const header = headerOf(image);
    const ways = request.keepMoved === true ? (header[layout.headerWays] ?? 0) : 0;
    return sum + (header[layout.headerColumns] ?? 0) + ways;
  }, 0);
  return (request.steps + 1) * columns * lanes;
}
