// The annex says what comes from outside, what chance does and what is not known, of real models.
import { expect, test } from 'vitest';
import type { CompiledModel } from '../../src/pipeline.ts';
import { printSpec } from '../../src/spec/print.ts';
import { compileModel, modelText } from '../golden/models.ts';
import { reportOf } from '../page/report-of.ts';
import { withoutScripts } from '../page/without-scripts.ts';
import { compileText } from '../pipeline/compile-text.ts';

const few = { replicates: 8, years: 6 };

/** What a reader sees of the page, without the data and the script. */
function pageOf(compiled: CompiledModel, files: readonly string[] = []): string {
  const { spec } = compiled;
  const html = reportOf(compiled, { data: { files, drivers: spec.drivers, wholeText: printSpec(spec) } });
  const body = withoutScripts(html.slice(html.indexOf('<body>')));
  return body.replace(/<[^>]*>/g, ' ').replace(/\s+/g, ' ');
}

test('input data: files by name, with the text that holds them, and counts of the past', () => {
  const text = pageOf(compileModel('dune-toad', few), ['dune-toad/slacks.geojson', 'dune-toad/rates.csv']);
  expect(text).toContain('Beside its text the model reads the files dune-toad/slacks.geojson , dune-toad/rates.csv .');
  expect(text).toMatch(/\d+ counts of adult in \d patches, from 2021 to 2025, are drawn beside what the model says/);
  expect(text).toContain('Their standard error is 0.2 of a count.');
  expect(text).toContain('The same with what its files hold, which runs by itself skein: 1');
  expect(text).toContain('No series of outside data drives the model.');
});

test('input data: what drives the model, with its table', () => {
  const drivers = 'drivers: { values: { rain: { 2027: 0.8, 2028: 1.1 } }, future: repeat }';
  const driven = modelText('two-ponds').replace('{ adult: 1.6 }', '{ adult: 1.6 * rain }');
  const text = pageOf(compileText(`${driven}\n${drivers}\n`, few));
  expect(text).toContain('Rates are driven from outside by rain : the values come in their order, again and again.');
  expect(text).toContain('What drives the model from outside year rain 2027 0.8 2028 1.1');
  expect(text).toContain('All numbers of the model stand in its text');
});

test('years that differ, catastrophes, what people do, and what is not known', () => {
  const drought = pageOf(compileModel('drought', few));
  expect(drought).toContain('Before the first of them the rates of the year are drawn in each patch.');
  expect(drought).toContain('Beside the animals a run remembers the weather of the year before.');
  expect(drought).toContain('variation from year to year metamorphosis: 0.055 in the mean');
  const fire = pageOf(compileModel('heath-fire', few));
  expect(fire).toContain('it is drawn which catastrophes begin where');
  expect(fire).toContain('No catastrophe is on at the start.');
  const moves = pageOf(compileModel('moves', few));
  expect(moves).toMatch(/moves : 8 hen are moved from Chalk down to Restored down/);
  const uncertain = 'parameters: { adult: { value: 0.6, uncertainty: { standard-error: 0.05 } } }';
  const ponds = modelText('two-ponds').replace('adult: 0.65', 'adult: adult');
  const unknown = pageOf(compileText(`${ponds}\n${uncertain}\n`, { ...few, draws: 3 }));
  expect(unknown).toMatch(/what is not known adult: 0\.6, with 95 % between 0\.[45]\d* and 0\.[67]\d* \(beta/);
  expect(unknown).toContain('It was drawn 3 times, each once for a set of runs.');
});

test('how to run it again: the page, the run with the same hash, and its run.json', () => {
  const compiled = compileModel('two-ponds', few);
  const text = pageOf(compiled);
  expect(text).toContain('skein run model.yaml --out results writes the tables behind it');
  expect(text).toContain('skein run --again results/run.json gives the same bytes');
  expect(text).toContain(compiled.provenance.hash);
});
