// One wrong spec for each kind of mistake, and exactly what is told of it.
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { diagnosticCodes } from '../../src/diagnostic/codes.ts';
import { renderDiagnostics } from '../../src/diagnostic/render.ts';
import type { DataFile, DataFiles } from '../../src/spec/data/files.ts';
import { checkText } from './check-text.ts';
import { madeTexts } from './made.ts';

const folder = new URL('.', import.meta.url);
const files = readdirSync(folder).filter((file) => file.endsWith('.yaml'));
const specimens = [...files.map((file) => file.replace('.yaml', '')), ...Object.keys(madeTexts)].sort();

/** Data files of the specimens stand in a folder of their own; one is not there. */
const dataFiles: DataFiles = new Map<string, DataFile>([
  ['fens.geojson', { ok: false, why: 'there is no such file or folder' }],
  ...readdirSync(new URL('data/', folder)).map((file): [string, DataFile] => {
    return [`data/${file}`, { ok: true, text: readFileSync(new URL(`data/${file}`, folder), 'utf8') }];
  }),
]);

function textOf(code: string): string {
  return madeTexts[code] ?? readFileSync(new URL(`${code}.yaml`, folder), 'utf8');
}

test('every kind of mistake has its specimen, and every specimen its text', () => {
  const codes = Object.keys(diagnosticCodes);
  expect(codes.filter((code) => !specimens.includes(code))).toEqual([]);
  expect(specimens.filter((code) => !codes.includes(code))).toEqual([]);
  expect(specimens.filter((code) => !existsSync(new URL(`${code}.txt`, folder)))).toEqual([]);
});

test.each(specimens)('%s', async (code) => {
  const told = checkText(textOf(code), `${code}.yaml`, dataFiles);
  expect(told.map((one) => one.code)).toContain(code);
  const rendered = renderDiagnostics(told, { colour: false, width: 100 });
  await expect(rendered).toMatchFileSnapshot(`${code}.txt`);
});
