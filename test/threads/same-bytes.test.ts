// Any number of threads gives the same bytes, on every model that comes with the tool.
import { afterAll, describe, expect, test } from 'vitest';
import { runModel, runModelWith, type CompiledModel } from '../../src/pipeline.ts';
import type { Crew } from '../../src/kernel/crew.ts';
import { alone } from '../../src/threads/alone.ts';
import { openThreads } from '../../src/threads/threads.ts';
import { compileModel, modelNames } from '../golden/models.ts';

const crews: readonly (readonly [string, Crew])[] = [
  ['this thread', alone],
  ['2 threads', openThreads({ threads: 2 })],
  ['5 threads', openThreads({ threads: 5 })],
];

afterAll(() => Promise.all(crews.map(([, crew]) => crew.close())));

async function bytes(crew: Crew, compiled: CompiledModel): Promise<string> {
  const { results } = await runModelWith(crew, compiled);
  return JSON.stringify(results);
}

describe.each(modelNames)('%s', (name) => {
  test('gives the same bytes in one, two and five threads', async () => {
    const compiled = compileModel(name, { replicates: 23 * 16 + 5 });
    const expected = JSON.stringify(runModel(compiled));
    for (const [what, crew] of crews) expect(await bytes(crew, compiled), what).toBe(expected);
  });
});
