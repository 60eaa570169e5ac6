// Tables in CSV files: the same spec as written inline, and every mistake at its row and column.
import { expect, test } from 'vitest';
import { renderDiagnostics } from '../../src/diagnostic/render.ts';
import type { DataFiles } from '../../src/spec/data/files.ts';
import { printSpec } from '../../src/spec/print.ts';
import { readSpec } from '../../src/spec/read.ts';
import { tryText } from '../pipeline/compile-text.ts';

function filesOf(texts: Readonly<Record<string, string>>): DataFiles {
  return new Map(Object.entries(texts).map(([name, text]) => [name, { ok: true, text }]));
}

function model(lines: Readonly<Record<string, string>>): string {
  const all = {
    study: '{ title: Two fens }',
    'first-year': '2027',
    years: '3',
    patches: '[{ name: Holm }, { name: "Fen, north" }]',
    counts: 'females',
    classes: '[newborn, adult]',
    oldest: 'open-ended',
    survival: '{ newborn: 0.4, adult: 0.7 }',
    births: '{ adult: 1.2 }',
    year: '[count, breeding, survival, ageing]',
    start: '{ total: 80 }',
    ...lines,
  };
  const written = Object.entries(all).filter(([, value]) => value !== '');
  return `skein: 1\n${written.map(([key, value]) => `${key}: ${value}\n`).join('')}`;
}

function specOf(text: string, files: DataFiles = new Map()) {
  const { document, diagnostics } = readSpec(text, 'model.yaml', files);
  if (document === undefined) throw new Error(renderDiagnostics(diagnostics, { colour: false, width: 100 }));
  return document.spec;
}

function told(text: string, files: DataFiles): readonly string[] {
  return readSpec(text, 'model.yaml', files).diagnostics.map(
    ({ code, place }) => `${place?.file ?? ''}:${String(place?.line)}:${String(place?.column)} ${code}`,
  );
}

test('rates by patch and class stand beside what is different in one patch', () => {
  const csv = 'patch,class,survival,births\r\nHolm,adult,0.75,\r\n"Fen, north",adult,min(0.7; 1),1.4\r\n';
  const files = filesOf({ 'rates.csv': csv.replace('min(0.7; 1)', '"min(0.7, 1)"') });
  const joined = specOf(model({ rates: 'rates.csv', in: '{ Holm: { births: { adult: 1.1 } } }' }), files);
  const inline = model({
    in: '{ Holm: { births: { adult: 1.1 }, survival: { adult: 0.75 } }, "Fen, north": { survival: { adult: "min(0.7, 1)" }, births: { adult: 1.4 } } }',
  });
  expect(joined).toEqual(specOf(inline));
  expect(printSpec(joined)).not.toContain('rates.csv');
});

test('rates for every patch need none for all of them, and say which patch lacks one', () => {
  const rates = (last: string): DataFiles =>
    filesOf({
      'rates.csv': `patch,class,survival\nHolm,newborn,0.4\nHolm,adult,0.7\n"Fen, north",newborn,0.5\n${last}`,
    });
  const text = model({ survival: '', rates: 'rates.csv' });
  expect(tryText(text, {}, rates('"Fen, north",adult,0.6\n')).compiled?.model.phases[1]).toMatchObject({
    survival: { epochs: [Float64Array.of(0.5, 0.6, 0.4, 0.7)] },
  });
  const { diagnostics } = tryText(text, {}, rates(''));
  expect(diagnostics.map((one) => one.message)).toEqual(['The class `adult` has no survival in Fen, north']);
});

test('start counts, start tables, shares, matrices and counts of the past', () => {
  const files = filesOf({
    'counts.csv': 'patch;animals\nHolm;31\n"Fen, north";12\n',
    'table.csv': 'patch\tnewborn\tadult\nHolm\t\t31\nFen, north\t4\t12\n',
    'shares.csv': 'from,to,share\nHolm,"Fen, north",10 %\n',
    'fates.csv': ',newborn,adult\nnewborn,,\nadult,0.4,0.7\n',
    'past.csv': 'patch,year,animals\nHolm,2024,40\nHolm,2025,36.5\n',
  });
  const same = (file: Readonly<Record<string, string>>, inline: Readonly<Record<string, string>>): void => {
    expect(specOf(model(file), files)).toEqual(specOf(model(inline)));
  };
  same(
    { start: '{ counted: counts.csv, of: [adult], rest: none }' },
    { start: '{ counted: { Holm: 31, "Fen, north": 12 }, of: [adult], rest: none }' },
  );
  same(
    { start: '{ table: table.csv }' },
    { start: '{ table: { Holm: { adult: 31 }, "Fen, north": { newborn: 4, adult: 12 } } }' },
  );
  same(
    { roam: '{ kind: dispersal, classes: all, shares: shares.csv }' },
    { roam: '{ kind: dispersal, classes: all, shares: { Holm: { "Fen, north": 10 % } } }' },
  );
  same({ demography: '{ fates: fates.csv }' }, { demography: '{ fates: [[0, 0], [0.4, 0.7]] }' });
  same({ observed: '{ counts: past.csv }' }, { observed: '{ counts: { Holm: { 2024: 40, 2025: 36.5 } } }' });
});

test('counts of the past reach the model in the order of patches and years', () => {
  const { compiled } = tryText(
    model({
      observed: '{ counts: { Holm: { 2025: 36.5, 2024: 40 }, "Fen, north": { 2025: 9 } }, of: [adult], error: 15 % }',
    }),
  );
  expect(compiled?.model.observed).toEqual({
    counts: [
      { patch: 0, year: 2025, animals: 9 },
      { patch: 1, year: 2024, animals: 40 },
      { patch: 1, year: 2025, animals: 36.5 },
    ],
    of: Uint8Array.of(0, 1),
    error: 0.15,
  });
});

const rates = model({ rates: 'rates.csv' });

test.each([
  ['a missing column', rates, 'patch,survival\nHolm,0.4\n', ['rates.csv:1:1 csv-column']],
  [
    'a column that stands twice',
    rates,
    'patch,class,survival,survival\nHolm,adult,0.4,0.4\n',
    ['rates.csv:1:22 csv-column', 'rates.csv:2:16 csv-repeated'],
  ],
  ['a decimal comma', rates, 'patch,class,survival\nHolm,adult,0,4\n', ['rates.csv:2:14 csv-row']],
  ['a number that is none', rates, 'patch,class,survival\nHolm,adult,0.4.1\n', ['rates.csv:2:12 expression-character']],
  ['a missing cell', rates, 'patch,class,survival\nHolm,adult\n', ['rates.csv:2:6 csv-row']],
  ['an empty patch', rates, 'patch,class,survival\n,adult,0.4\n', ['rates.csv:2:8 csv-row']],
  ['a quote that is not closed', rates, 'patch,class,survival\n"Holm,adult,0.4\n', ['rates.csv:2:1 data-syntax']],
  ['text after quotes', rates, 'patch,class,survival\n"Holm" x,adult,0.4\n', ['rates.csv:2:8 data-syntax']],
  ['nothing', rates, '\n\n', ['rates.csv:1:1 data-syntax']],
  [
    'a number given in the spec, too',
    `${rates}in: { Holm: { survival: { adult: 0.5 } } }\n`,
    'patch,class,survival\nHolm,adult,0.4\n',
    ['rates.csv:2:12 csv-repeated'],
  ],
])('%s', (_, text, csv, expected) => {
  expect(told(text, filesOf({ 'rates.csv': csv }))).toEqual(expected);
});

test('what only the model knows is told at the cell, too', () => {
  const text = model({ start: '{ counted: counts.csv, of: [adult], rest: none }' });
  const { diagnostics } = tryText(text, {}, filesOf({ 'counts.csv': 'patch,animals\nHolm,31\nFen north,12\n' }));
  expect(diagnostics).toMatchObject([
    { code: 'unknown-patch', nearest: 'Fen, north', place: { file: 'counts.csv', line: 3, column: 1 } },
  ]);
});

test('a matrix whose classes stand in another order is refused', () => {
  const text = model({ survival: '', births: '', demography: '{ fates: fates.csv }', year: '[count, demography]' });
  expect(told(text, filesOf({ 'fates.csv': ',adult,newborn\nadult,0.7,0.4\nnewborn,,\n' }))).toEqual([
    'fates.csv:1:2 csv-column',
  ]);
});
