// Texts changed at random never crash any stage that looks for mistakes, and whatever is told has a place inside its file.
import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { expect, test } from 'vitest';
import type { Diagnostic } from '../../src/diagnostic/diagnostic.ts';
import { renderDiagnostics } from '../../src/diagnostic/render.ts';
import type { DataFile, DataFiles } from '../../src/spec/data/files.ts';
import { printSpec } from '../../src/spec/print.ts';
import { checkText } from '../mistakes/check-text.ts';
import { wholeText } from '../spec/whole.ts';
import { runsOf } from './length.ts';
import { anyCut, changeDigit, marks, mutate } from './mutate.ts';
import { anyValidSpec } from './valid-specs.ts';

/** CPU seconds that one text may take; waiting for others on the machine is not counted. */
const mostSeconds = 2;

function check(text: string, files: Readonly<Record<string, string>> = {}): readonly Diagnostic[] {
  const contents: DataFiles = new Map(
    Object.entries(files).map(([name, own]): [string, DataFile] => [name, { ok: true, text: own }]),
  );
  const before = process.cpuUsage();
  const told = checkText(text, 'fuzz.yaml', contents);
  const { user, system } = process.cpuUsage(before);
  expect((user + system) / 1e6).toBeLessThan(mostSeconds);
  const texts = new Map([['fuzz.yaml', text], ...Object.entries(files)]);
  for (const { place } of told) expectInside(place, texts);
  expect(renderDiagnostics(told, { colour: false, width: 80 })).not.toMatch(/[^\P{C}\n\u200C\u200D]/u);
  return told;
}

function expectInside(place: Diagnostic['place'], texts: ReadonlyMap<string, string>): void {
  const text = texts.get(place?.file ?? '');
  if (place === undefined || text === undefined) throw new Error('A mistake has no place.');
  const line = (text.startsWith('\uFEFF') ? text.slice(1) : text).split('\n')[place.line - 1];
  expect(line?.replace(/\r$/u, '')).toBe(place.text);
  expect(place.column).toBeGreaterThanOrEqual(1);
  expect(place.column).toBeLessThanOrEqual(place.text.length + 1);
}

const fewCuts = fc.array(anyCut, { minLength: 1, maxLength: 4 });

test('a spec with every key, with pieces cut out and put in', () => {
  fc.assert(
    fc.property(fewCuts, (cuts) => {
      check(mutate(wholeText, cuts));
    }),
    { seed: 4206, numRuns: runsOf(400) },
  );
});

const small = wholeText
  .split('\n')
  .filter((line) => /^(?:skein|years|counts|survival|births|start|room)/u.test(line))
  .join('\n');

test('a few lines with many pieces cut out and put in', () => {
  fc.assert(
    fc.property(fc.array(anyCut, { minLength: 1, maxLength: 8 }), (cuts) => {
      check(mutate(small, cuts));
    }),
    { seed: 4207, numRuns: runsOf(1200) },
  );
});

test('texts made of marks alone', () => {
  fc.assert(
    fc.property(fc.array(fc.constantFrom(...marks, 'a', '1', ' ', 'skein: 1'), { maxLength: 40 }), (pieces) => {
      check(pieces.join(''));
    }),
    { seed: 4208, numRuns: runsOf(1500) },
  );
});

const anyDigits = fc.array(fc.record({ at: fc.double({ min: 0, max: 1, noNaN: true }), digit: fc.nat(9) }), {
  minLength: 1,
  maxLength: 3,
});

test('specs without a mistake, with digits changed or a piece cut out and put in', () => {
  let sound = 0;
  fc.assert(
    fc.property(anyValidSpec, anyDigits, fc.option(anyCut, { freq: 1 }), (spec, digits, cut) => {
      const printed = digits.reduce((text, { at, digit }) => changeDigit(text, at, digit), printSpec(spec));
      const told = check(cut === null ? printed : mutate(printed, [cut]));
      if (!told.some((one) => one.severity === 'error')) sound++;
    }),
    { seed: 4209, numRuns: runsOf(1000) },
  );
  // Some changes leave a spec that compiles, so all stages are reached.
  expect(sound).toBeGreaterThan(100);
});

const models = new URL('../../models/', import.meta.url);
const toad = readFileSync(new URL('dune-toad.yaml', models), 'utf8');
const toadFiles = ['slacks.geojson', 'rates.csv', 'counts-2026.csv', 'counts.csv'].map((name): [string, string] => {
  return [`dune-toad/${name}`, readFileSync(new URL(`dune-toad/${name}`, models), 'utf8')];
});

test('data files with pieces cut out and put in', () => {
  fc.assert(
    fc.property(fc.nat(toadFiles.length - 1), fewCuts, (which, cuts) => {
      const files = toadFiles.map(([name, text], i): [string, string] => [
        name,
        i === which ? mutate(text, cuts) : text,
      ]);
      check(toad, Object.fromEntries(files));
    }),
    { seed: 4210, numRuns: runsOf(900) },
  );
});
