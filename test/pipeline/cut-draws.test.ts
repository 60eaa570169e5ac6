// Told to stop among the draws of what is not known, a run is the run with as many draws as were finished, hash and all.
import { expect, test } from 'vitest';
import { runModel, runModelWith } from '../../src/pipeline.ts';
import { alone } from '../../src/threads/alone.ts';
import { modelText } from '../golden/models.ts';
import { compileText } from './compile-text.ts';

const text = `${modelText('two-ponds')}\nparameters: { adult: { value: 0.6, uncertainty: { standard-error: 0.05 } } }\n`;

test('what is left of a run that was stopped is the run with fewer draws', async () => {
  const stop = new AbortController();
  const onProgress = (done: number): void => {
    if (done >= 3 * 40) stop.abort();
  };
  const asked = compileText(text, { replicates: 40, draws: 8 });
  const { compiled, results } = await runModelWith(alone, asked, { signal: stop.signal, onProgress });
  expect(results).toEqual(runModel(compileText(text, { replicates: 40, draws: 3 })));
  expect(compiled.provenance.hash).toBe(results?.hash);
  expect(asked.provenance.hash).not.toBe(results?.hash);
});
