// What V8 compiled of the command line when it was built: taken where it is of these scripts, and never missed where it is not.
import { spawnSync } from 'node:child_process';
import {
  cpSync,
  mkdtempSync,
  readFileSync,
  readdirSync,
  rmSync,
  statSync,
  truncateSync,
  utimesSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, onTestFinished, test } from 'vitest';
import { ponds, root } from './skein.ts';

/** A copy of the built command, with the times of its files; gone after the test. */
function copied(): string {
  const folder = mkdtempSync(join(tmpdir(), 'skein-compiled-'));
  onTestFinished(() => {
    rmSync(folder, { recursive: true, force: true });
  });
  for (const part of ['bin', 'build/cli'])
    cpSync(join(root, part), join(folder, part), { recursive: true, preserveTimestamps: true });
  return folder;
}

function node(folder: string, words: readonly string[]): string {
  const { status, stdout, stderr } = spawnSync(process.execPath, words, { cwd: folder, encoding: 'utf8' });
  expect({ status, stderr }).toEqual({ status: 0, stderr: '' });
  return stdout;
}

const run = (folder: string): string =>
  node(folder, ['bin/skein.cjs', 'run', join(root, ponds), '--replicates', '3', '--json', '--quiet']);

/** By script: false where what was compiled is taken, true where V8 refuses it, and nothing where it is not offered. */
function refusals(folder: string): Readonly<Record<string, boolean | null>> {
  const told = `const { built, first, openScripts } = require('./bin/skein.cjs');
    const { load, scripts } = openScripts(built);
    load(first);
    load('${moduleOfRuns(folder)}');
    const rows = [...scripts].map(([name, { script }]) => [name, script.cachedDataRejected ?? null]);
    console.log(JSON.stringify(Object.fromEntries(rows)));`;
  return JSON.parse(node(folder, ['-e', told])) as Readonly<Record<string, boolean | null>>;
}

function moduleOfRuns(folder: string): string {
  return /"(run-\w+\.js)"/.exec(readFileSync(join(folder, 'build/cli/skein.js'), 'latin1'))?.[1] ?? '';
}

function compiledFiles(folder: string): readonly string[] {
  const compiled = join(folder, 'build/cli/compiled');
  return readdirSync(compiled, { recursive: true, encoding: 'utf8' })
    .filter((name) => name.endsWith('.js'))
    .map((name) => join(compiled, name));
}

/** Names and times of everything in a folder. */
function state(folder: string): readonly string[] {
  return readdirSync(folder, { recursive: true, encoding: 'utf8' })
    .map((name) => `${name} ${statSync(join(folder, name)).mtimeMs.toString()}`)
    .sort();
}

test('it is taken, in a folder that was moved as well, and nothing is written', () => {
  const folder = copied();
  const before = state(folder);
  expect(refusals(folder)).toEqual({ 'skein.js': false, 'everyday.js': false });
  expect(run(folder)).toBe(run(root));
  expect(state(folder)).toEqual(before);
});

test('without it the same is printed', () => {
  const folder = copied();
  rmSync(join(folder, 'build/cli/compiled'), { recursive: true });
  expect(refusals(folder)).toEqual({ 'skein.js': null, 'everyday.js': null });
  expect(run(folder)).toBe(run(root));
});

test('a script that was changed is run as it stands, though it is as long as before', () => {
  const folder = copied();
  const script = join(folder, 'build/cli/skein.js');
  writeFileSync(script, readFileSync(script, 'latin1').replace('Animals in several', 'Creatures in many.'), 'latin1');
  expect(refusals(folder)).toEqual({ 'skein.js': null, 'everyday.js': false });
  expect(node(folder, ['bin/skein.cjs', '--help'])).toContain('Creatures in many.');
});

test('half of it is refused', () => {
  const folder = copied();
  for (const path of compiledFiles(folder)) {
    const { size, mtimeMs } = statSync(path);
    truncateSync(path, Math.floor(size / 2));
    utimesSync(path, mtimeMs / 1000, mtimeMs / 1000);
  }
  expect(refusals(folder)).toEqual({ 'skein.js': true, 'everyday.js': true });
  expect(run(folder)).toBe(run(root));
});

test('V8 refuses it under other flags', () => {
  const folder = copied();
  const words = ['--no-opt', 'bin/skein.cjs', 'run', join(root, ponds), '--replicates', '3', '--json', '--quiet'];
  expect(node(folder, words)).toBe(run(root));
});

test('what is not ASCII comes through the scripts: signs that are read, and signs that are written', () => {
  const folder = copied();
  const model = readFileSync(join(root, ponds), 'utf8');
  const written = model.replace(/^survival:.*$/m, 'survival: { juvenile: 0.1 × 3, adult: 0.7 − 0.1 }');
  expect(written).not.toBe(model);
  writeFileSync(join(folder, 'model.yaml'), written);
  node(folder, ['bin/skein.cjs', 'report', 'model.yaml', '-o', 'page.html', '--quiet']);
  const page = readFileSync(join(folder, 'page.html'), 'utf8');
  expect(page).toMatch(/skein [\d.]+ · [0-9a-f]+/);
  expect(page).not.toMatch(/[\u0080-\u009f]/);
});
