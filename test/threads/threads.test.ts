// Threads that die are told and their replicates run again; work that is cut short gives the first replicates.
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import { workerScript } from '../../build/worker-script.ts';
import { batchesOf } from '../../src/kernel/batch.ts';
import { runModel, runModelWith } from '../../src/pipeline.ts';
import { alone } from '../../src/threads/alone.ts';
import { tasksOf } from '../../src/threads/tasks.ts';
import { ThreadsFailure } from '../../src/threads/failure.ts';
import { openThreads } from '../../src/threads/threads.ts';
import { compileModel } from '../golden/models.ts';

const folder = mkdtempSync(join(tmpdir(), 'skein-threads-'));
afterAll(() => {
  rmSync(folder, { recursive: true });
});

/** A worker that ends when it is given the batch of replicate 32: each time, or once. */
function dying(how: 'always' | 'once'): string {
  const flag = JSON.stringify(join(folder, 'died'));
  const condition = how === 'always' ? 'true' : `!require('node:fs').existsSync(${flag})`;
  return `require('node:worker_threads').parentPort.on('message', (message) => {
    if (message.kind !== 'run' || !message.batches.some((batch) => batch.first === 32) || !(${condition})) return;
    require('node:fs').writeFileSync(${flag}, '');
    process.exit(9);
  });\n${workerScript}`;
}

const compiled = compileModel('two-ponds', { replicates: 400 });

describe('a thread that dies', () => {
  test('is told, and its replicates are run again', async () => {
    const deaths: string[] = [];
    const crew = openThreads({ threads: 2, script: dying('once'), onDeath: (reason) => deaths.push(reason) });
    const { results } = await runModelWith(crew, compiled);
    await crew.close();
    expect(deaths).toEqual(['it ended with code 9']);
    expect(results).toEqual(runModel(compiled));
  });

  test('again and again over the same work ends the work with the reason', async () => {
    const crew = openThreads({ threads: 2, script: dying('always') });
    const failure = runModelWith(crew, compiled);
    await expect(failure).rejects.toThrow(ThreadsFailure);
    await expect(failure).rejects.toThrow('A thread died 3 times over the same work: it ended with code 9.');
    await crew.close();
  });

  test('with an error in it tells the error', async () => {
    const script = `require('node:worker_threads').parentPort.on('message', () => { throw new Error('no memory'); });`;
    const deaths: string[] = [];
    const crew = openThreads({ threads: 1, script, onDeath: (reason) => deaths.push(reason) });
    await expect(runModelWith(crew, compiled)).rejects.toThrow('over the same work: no memory.');
    expect(deaths).toEqual(['no memory', 'no memory']);
    await crew.close();
  });
});

describe('a crew that is told to stop', () => {
  const crews = [
    ['in this thread', alone],
    ['in two threads', openThreads({ threads: 2 })],
  ] as const;
  afterAll(() => Promise.all(crews.map(([, crew]) => crew.close())));

  test.each(crews)('gives the first replicates, as if only they had been asked for: %s', async (_, crew) => {
    const stop = new AbortController();
    const onProgress = (done: number): void => {
      if (done >= 100) stop.abort();
    };
    const finished = await runModelWith(crew, compiled, { onProgress, signal: stop.signal });
    const { replicates } = finished.compiled.model;
    expect(replicates).toBeGreaterThanOrEqual(100);
    expect(replicates).toBeLessThan(400);
    expect(finished.results).toEqual(runModel(compileModel('two-ponds', { replicates })));
  });

  test.each(crews)('has no results where nothing was begun: %s', async (_, crew) => {
    const { results } = await runModelWith(crew, compiled, { signal: AbortSignal.abort() });
    expect(results).toBeNull();
  });
});

test('an error of the one who takes the batches is handed on, and the crew can work again', async () => {
  const crew = openThreads({ threads: 2 });
  const onProgress = (): void => {
    throw new Error('full disk');
  };
  await expect(runModelWith(crew, compiled, { onProgress })).rejects.toThrow('full disk');
  expect((await runModelWith(crew, compiled)).results).toEqual(runModel(compiled));
  await crew.close();
});

describe('tasks', () => {
  test('hold every batch once, in order', () => {
    const batches = batchesOf(1000);
    for (const [threads, numbersInBatch] of [
      [1, 10],
      [3, 5000],
      [7, 1e7],
    ] as const) {
      expect(tasksOf(batches, { threads, numbersInBatch }).flat()).toEqual(batches);
    }
  });

  test('are single batches where a batch is large, and enough for every thread where it is small', () => {
    expect(tasksOf(batchesOf(1000), { threads: 2, numbersInBatch: 1e6 })).toHaveLength(63);
    expect(tasksOf(batchesOf(160), { threads: 5, numbersInBatch: 10 }).length).toBeGreaterThanOrEqual(5);
  });
});
