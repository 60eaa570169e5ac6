// Runs that go on until their chances are known as well as asked.
import { afterAll, expect, test } from 'vitest';
import { runModel, runModelWith } from '../../src/pipeline.ts';
import { alone } from '../../src/threads/alone.ts';
import { openThreads } from '../../src/threads/threads.ts';
import { compileText, errorsOf } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';

const crews = [alone, openThreads({ threads: 2 }), openThreads({ threads: 5 })];
afterAll(() => Promise.all(crews.map((crew) => crew.close())));

function text(run: string, { outcomes = 'few: { of: all, below: 8 }', more = '' } = {}): string {
  return framed(
    `classes: [animal]
oldest: open-ended
parameters: { live: { value: 0.9, uncertainty: { standard-error: 0.03 } } }
survival: { animal: live }
year: [count, survival]
start: { table: { Meadow: { animal: 20 } } }
${more}outcomes: { ${outcomes} }
run: { seed: 4, ${run} }
`,
    { years: 9 },
  );
}

const widths = (results: ReturnType<typeof runModel>): readonly number[] =>
  results.outcomes.flatMap(({ ever, atEnd }) =>
    [ever, atEnd].map(({ interval }) => (interval.upper - interval.lower) / 2),
  );

test('goes on in blocks of 1024 after the first replicates, and no further than needed', () => {
  const results = runModel(compileText(text('replicates: 100, precision: 0.015')));
  const { precision, replicates } = results;
  expect((replicates - 100) % 1024).toBe(0);
  expect(replicates).toBeGreaterThan(1124);
  expect(Math.max(...widths(results))).toBe(precision!.halfWidth);
  expect(precision).toMatchObject({ asked: 0.015, reached: true, atMost: 100_000 });
  // One block less would not have been enough.
  const before = runModel(compileText(text(`replicates: ${replicates - 1024}`)));
  expect(Math.max(...widths(before))).toBeGreaterThan(0.015);
});

test('is the run of as many replicates, with the same bytes in any number of threads', async () => {
  const compiled = compileText(text('replicates: 100, precision: 0.015'));
  const results = runModel(compiled);
  const plain = runModel(compileText(text(`replicates: ${results.replicates}`)));
  expect(results.outcomes).toEqual(plain.outcomes);
  expect(results.abundance.whole.map(({ mean, sd }) => [mean, sd])).toEqual(
    plain.abundance.whole.map(({ mean, sd }) => [mean, sd]),
  );
  for (const crew of crews) {
    const finished = await runModelWith(crew, compiled);
    expect(JSON.stringify(finished.results)).toBe(JSON.stringify(results));
    expect(finished.compiled.spec.run).toMatchObject({ replicates: 100, precision: 0.015 });
  }
});

test('the most uncertain of several outcomes decides', () => {
  const both = runModel(
    compileText(
      text('replicates: 100, precision: 0.015', {
        outcomes: 'never: { of: all, below: 1 }, few: { of: all, below: 8 }',
      }),
    ),
  );
  const rare = runModel(
    compileText(text('replicates: 100, precision: 0.015', { outcomes: 'never: { of: all, below: 1 }' })),
  );
  expect(rare.replicates).toBeLessThan(both.replicates);
  expect(Math.max(...widths(both))).toBeLessThanOrEqual(0.015);
});

test('ends at the limit, and says that it is not precise', () => {
  const results = runModel(compileText(text('replicates: 50, precision: 0.001, at-most: 2500')));
  expect(results.replicates).toBe(2500);
  expect(results.precision).toMatchObject({ reached: false, atMost: 2500 });
});

test('with draws whole draws are added, ten at a time, until the interval over draws is as narrow', async () => {
  const compiled = compileText(text('replicates: 40, draws: 15, precision: 0.05, at-most: 20000'));
  const results = runModel(compiled);
  expect((results.draws!.number - 15) % 10).toBe(0);
  expect(results.draws!.number).toBeGreaterThan(15);
  expect(results.replicates).toBe(40 * results.draws!.number);
  expect(results.precision!.reached).toBe(true);
  expect(Math.max(...widths(results))).toBe(results.precision!.halfWidth);
  for (const crew of crews) {
    expect(JSON.stringify((await runModelWith(crew, compiled)).results)).toBe(JSON.stringify(results));
  }
});

test('what cannot be is refused', () => {
  expect(errorsOf(text('replicates: 3000, precision: 0.01, at-most: 2000'))).toEqual(['precision-shape']);
  expect(errorsOf(text('precision: 0.01').replace(/outcomes: .*\n/u, ''))).toEqual(['precision-shape']);
});
