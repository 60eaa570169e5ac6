// Runs a model with chance for a command: in as many threads as pay, with progress, and with a clean end when told to stop.
import { availableParallelism } from 'node:os';
import type { Crew } from '../kernel/crew.ts';
import { runModelWith, type CompiledModel, type CrewOptions, type FinishedRun } from '../pipeline.ts';
import type { RunResults } from '../results/results.ts';
import { alone } from '../threads/alone.ts';
import { ThreadsFailure } from '../threads/failure.ts';
import { Ending, exitCodes } from './exit.ts';
import { writeError } from './output.ts';
import { showProgress } from './progress.ts';
import { stopSignal } from './stop.ts';

/** Animals of one class in one patch, year and replicate: below so many a run ends before a thread has started. */
const smallWork = 1e7;

export interface ReplicatesOptions {
  /** As many as pay where it is not said. */
  readonly threads?: number;
  readonly quiet?: boolean;
}

export interface DoneReplicates {
  /** With as many replicates as were finished. */
  readonly compiled: CompiledModel;
  readonly results: RunResults;
  readonly threads: number;
  /** To be thrown once what is finished is written; null where all is. */
  readonly cutShort: Ending | null;
}

export async function runReplicates(compiled: CompiledModel, options: ReplicatesOptions): Promise<DoneReplicates> {
  const threads = options.threads ?? threadsFor([compiled]);
  const done = await withCrew({ ...options, threads }, (crew, crewOptions) =>
    runModelWith(crew, compiled, crewOptions),
  );
  return { ...checked(done, compiled.model), threads };
}

/** As many as pay. */
export function threadsFor(plans: readonly CompiledModel[]): number {
  const work = plans.reduce(
    (sum, { model: { replicates, draws, steps, patches, classes } }) =>
      sum + replicates * Math.max(1, draws) * steps * patches.length * classes.length,
    0,
  );
  return work < smallWork ? 1 : availableParallelism();
}

type Work<Done> = (crew: Crew, options: Required<Pick<CrewOptions, 'onProgress' | 'signal'>>) => Promise<Done>;

/** Does the work with a crew of so many, with progress, and with a clean end when told to stop. */
export async function withCrew<Done>(
  { threads, quiet }: ReplicatesOptions & { readonly threads: number },
  work: Work<Done>,
): Promise<Done> {
  const progress = showProgress('Replicates', quiet === true);
  const stop = stopSignal();
  const crew = threads === 1 ? alone : await openedThreads(threads);
  try {
    const done = await work(crew, { onProgress: progress.update, signal: stop.signal });
    progress.finish();
    return done;
  } catch (error) {
    if (error instanceof ThreadsFailure) throw new Ending(exitCodes.work, error.message);
    throw error;
  } finally {
    stop.close();
    await crew.close();
  }
}

function checked({ compiled, results }: FinishedRun, model: CompiledModel['model']): Omit<DoneReplicates, 'threads'> {
  // Only where it is needed: the first number written so loads tables for a tenth of the start of a command.
  const asked = (): string => model.replicates.toLocaleString('en');
  if (results === null) {
    throw new Ending(exitCodes.work, `Stopped before the first of ${asked()} replicates was finished.`);
  }
  const cutShort = (done: number, of: string, what: string, option: string): Ending => {
    const early =
      model.precision === undefined ? `of ${of} ${what}` : `${what}, before the chances were known as well as asked`;
    const whole = model.rare === true && done >= model.replicates ? `${what}, before the outcomes were split` : early;
    return new Ending(
      exitCodes.work,
      `Stopped after ${done.toLocaleString('en')} ${whole}; the results are those of \`--${option} ${done}\`.`,
    );
  };
  // What is left of a run that was to be precise asks for no precision.
  const stopped = compiled.model.precision !== model.precision || compiled.model.rare !== model.rare;
  const draws = drawsAsked(model);
  if (results.draws !== undefined && (stopped || results.draws.number < draws)) {
    return { compiled, results, cutShort: cutShort(results.draws.number, String(draws), 'draws', 'draws') };
  }
  const done = compiled.model.replicates;
  if (done === model.replicates && !stopped) return { compiled, results, cutShort: null };
  return { compiled, results, cutShort: cutShort(done, asked(), 'replicates', 'replicates') };
}

function drawsAsked({ draws, uncertainty }: CompiledModel['model']): number {
  return Math.min(draws, uncertainty?.table?.length ?? draws);
}

/** Loaded where they are wanted: a small run needs none. */
async function openedThreads(threads: number): Promise<Crew> {
  return (await import('../threads/threads.ts')).openThreads({ threads, onDeath: tellDeath });
}

function tellDeath(reason: string): void {
  writeError(`A thread died (${reason}); its replicates are run again.\n`);
}
