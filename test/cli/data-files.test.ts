// Files that a model names are read inside its folder, or a folder that the user names, and nowhere else.
import { mkdirSync, mkdtempSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, test } from 'vitest';
import { readDataFiles } from '../../src/cli/data-files.ts';
import { skein } from './skein.ts';

const top = mkdtempSync(join(tmpdir(), 'skein-data-'));
afterAll(() => rmSync(top, { recursive: true, force: true }));

const geojson = JSON.stringify({
  type: 'FeatureCollection',
  features: [
    { type: 'Feature', properties: { name: 'Holm', capacity: 40 }, geometry: { type: 'Point', coordinates: [9, 54] } },
  ],
});

const model = (file: string): string => `skein: 1
study: { title: One holm }
years: 2
position: longitude-latitude
patches: ${file}
counts: females
classes: [adult]
oldest: open-ended
survival: { adult: 0.8 }
births: { adult: 0.4 }
year: [count, breeding, survival, ageing]
start: { total: 20 }
`;

const study = join(top, 'study');
mkdirSync(join(study, 'data'), { recursive: true });
mkdirSync(join(top, 'other'));
writeFileSync(join(study, 'data', 'holm.geojson'), geojson);
writeFileSync(join(top, 'other', 'holm.geojson'), geojson);
writeFileSync(join(top, 'secret.geojson'), geojson);
symlinkSync(join(top, 'secret.geojson'), join(study, 'link.geojson'));
symlinkSync(join(study, 'data', 'holm.geojson'), join(study, 'inner.geojson'));

function whyNot(name: string, allow: readonly string[] = []): string {
  const file = readDataFiles([name], { spec: join(study, 'model.yaml'), allow }).get(name);
  return file?.ok === true ? 'read' : (file?.why ?? 'not asked for');
}

test('inside the folder, by any way that leads there', () => {
  for (const name of ['data/holm.geojson', 'inner.geojson', './data/../data/holm.geojson'])
    expect(whyNot(name)).toBe('read');
  expect(whyNot(join(study, 'data', 'holm.geojson'))).toBe('read');
});

test('outside it is refused, whether it is there or not, by whatever way', () => {
  const outside = 'it lies outside the folder of the spec';
  const names = [
    '../secret.geojson',
    '../nothing.geojson',
    'data/../../secret.geojson',
    'link.geojson',
    '/etc/hostname',
  ];
  for (const name of [...names, '..', '../study', join(top, 'secret.geojson')])
    expect(whyNot(name), name).toBe(outside);
});

test('what cannot be read says why', () => {
  expect(whyNot('nothing.geojson')).toBe('there is no such file or folder');
  expect(whyNot('data')).toBe('it is a folder');
  writeFileSync(join(study, 'latin.geojson'), Buffer.from([0x7b, 0xe4, 0x7d]));
  expect(whyNot('latin.geojson')).toBe('it is not text in UTF-8');
});

test('a folder that the user names may be read, and only it', () => {
  expect(whyNot('../other/holm.geojson')).not.toBe('read');
  expect(whyNot('../other/holm.geojson', [join(top, 'other')])).toBe('read');
  expect(whyNot('../secret.geojson', [join(top, 'other')])).not.toBe('read');
});

test('the command reads the files of a model, and tells what stands in its way at the name', () => {
  writeFileSync(join(study, 'model.yaml'), model('data/holm.geojson'));
  const fine = skein(['path', join(study, 'model.yaml'), '--json']);
  expect(fine.code).toBe(0);
  writeFileSync(join(study, 'far.yaml'), model('../other/holm.geojson'));
  const refused = skein(['path', join(study, 'far.yaml')]);
  expect(refused.code).toBe(1);
  expect(refused.err).toContain('far.yaml:5:10 error data-missing');
  expect(refused.err).toContain('--allow FOLDER');
  const allowed = skein(['path', join(study, 'far.yaml'), '--json', '--allow', join(top, 'other')]);
  expect(allowed.code).toBe(0);
  expect(JSON.parse(allowed.out)).toEqual(JSON.parse(fine.out));
});

test('an example comes with its data files, and works where it was put', () => {
  const target = join(top, 'toads');
  expect(skein(['new', target, '--example', 'dune-toad']).code).toBe(0);
  expect(skein(['check', join(target, 'model.yaml')]).code).toBe(0);
});
