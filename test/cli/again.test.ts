// A run.json runs again to the same bytes, and not where it cannot.
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { specJson } from '../../src/cli/spec-json.ts';
import { compileSpec } from '../../src/pipeline.ts';
import { readSpec } from '../../src/spec/read.ts';
import { compileModel, modelNames } from '../golden/models.ts';
import { filesIn, folder, ponds, skein } from './skein.ts';

const words = ['run', ponds, '--replicates', '40', '--years', '6', '--seed', '3', '--quiet', '--out', 'out'];

describe('skein run --again', () => {
  test.each(['road', 'two-ponds'])('gives the same bytes of %s, in every file but the log', (name) => {
    const cwd = folder();
    const first = skein(['run', `models/${name}.yaml`, '--replicates', '24', '--quiet', '--out', 'out'], { cwd });
    expect(first.code).toBe(0);
    const again = skein(['run', '--again', 'out/run.json', '--quiet', '--out', 'again'], { cwd });
    expect(again).toEqual(first);
    const names = filesIn(join(cwd, 'out'));
    expect(filesIn(join(cwd, 'again'))).toEqual(names);
    for (const file of names.filter((one) => one !== 'log.json')) {
      expect(readFileSync(join(cwd, 'again', file)), file).toEqual(readFileSync(join(cwd, 'out', file)));
    }
  });

  test('goes on again to the precision that was asked for', () => {
    const cwd = folder();
    const run = ['run', ponds, '--years', '3', '--replicates', '50', '--precision', '2 %', '--quiet', '--json'];
    const first = skein([...run, '--out', 'out', '--threads', '1'], { cwd });
    expect(first.code).toBe(0);
    expect(JSON.parse(first.out)).toMatchObject({ precision: { asked: 0.02, reached: true } });
    const again = skein(['run', '--again', 'out/run.json', '--quiet', '--json', '--threads', '2'], { cwd });
    expect(again).toEqual(first);
  });

  test.each(modelNames)('can read %s back with the same hash', (name) => {
    const compiled = compileModel(name, { replicates: 24 });
    const { document } = readSpec(JSON.stringify(specJson(compiled.spec)), 'run.json');
    expect(compileSpec(document!.spec).compiled?.provenance.hash).toBe(compiled.provenance.hash);
  });

  /** Runs a run.json in which a text was replaced by another. */
  function changed(from: RegExp, to: string): { readonly code: number | null; readonly err: string } {
    const cwd = folder();
    expect(skein(words, { cwd }).code).toBe(0);
    const text = readFileSync(join(cwd, 'out/run.json'), 'utf8');
    expect(text).toMatch(from);
    writeFileSync(join(cwd, 'other.json'), text.replace(from, to));
    const { code, err } = skein(['run', '--again', 'other.json'], { cwd });
    return { code, err };
  }

  test('refuses another major version of the kernel', () => {
    const { code, err } = changed(/"kernel": "(\d+)\./, '"kernel": "9$1.');
    expect(code).toBe(1);
    expect(err).toMatch(
      /^Cannot run other\.json again: it was made by kernel 9\d+\.\d+, and kernel \d+\.\d+ of this skein/,
    );
    expect(err).toMatch(/gives other bytes\. Use skein 0\.1\.0\.\n$/);
  });

  test('runs what another minor version of the kernel made', () => {
    expect(changed(/"kernel": "(\d+)\.\d+"/, '"kernel": "$1.99"').code).toBe(0);
  });

  test.each([
    [/"seed": 3/, '"seed": 4', 'its hash stands for other inputs'],
    [/"replicates": 40/, '"replicates": "many"', 'its hash stands for other inputs'],
    [/"skein-inputs\/1"/, '"skein-run/1"', 'it is not the run.json of a run'],
    [/"command": "run"/, '"command": "path"', 'it belongs to `skein path`'],
    [/^\{/, '', 'it is not the run.json of a run'],
  ])('refuses a file in which %s became %s', (from, to, why) => {
    const { code, err } = changed(from, to);
    expect(code).toBe(1);
    expect(err).toContain(`Cannot run other.json again: ${why}`);
  });

  test.each([
    [[ponds, '--again', 'run.json']],
    [['--again', 'run.json', '--seed', '4']],
    [['--again', 'run.json', '--set', 'a=1']],
    [[]],
  ])('is refused beside what it holds, and a run needs one of both: %j', (more) => {
    expect(skein(['run', ...more], { cwd: folder() }).code).toBe(2);
  });
});
