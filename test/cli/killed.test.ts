// Killed at any moment, an output folder holds whole files or none of that name.
import { spawn } from 'node:child_process';
import { mkdirSync, readFileSync, rmSync, watch } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { filesIn, folder, root, skein } from './skein.ts';

const words = (seed: number) => [
  'run',
  'models/reed-hare.yaml',
  '--replicates',
  '16',
  '--years',
  '80',
  '--seed',
  String(seed),
];

/** Kills the command when the folder has changed so many times; false where it ended before. */
function killAfter(changes: number, cwd: string): Promise<boolean> {
  const child = spawn(process.execPath, [join(root, 'bin/skein.cjs'), ...words(2), '--quiet', '--out', 'out'], { cwd });
  let seen = 0;
  const watcher = watch(join(cwd, 'out'), () => {
    if (++seen === changes) child.kill('SIGKILL');
  });
  return new Promise((resolve) => {
    child.on('close', (_, signal) => {
      watcher.close();
      resolve(signal === 'SIGKILL');
    });
  });
}

test('killed at any moment, a new folder holds whole files or none of that name', async () => {
  const cwd = folder();
  expect(skein([...words(2), '--quiet', '--out', 'whole'], { cwd }).code).toBe(0);
  const names = filesIn(join(cwd, 'whole'));
  const held: number[] = [];
  for (const changes of [1, 6, 20, 32, 38, 44]) {
    rmSync(join(cwd, 'out'), { recursive: true, force: true });
    mkdirSync(join(cwd, 'out'));
    await killAfter(changes, cwd);
    const found = filesIn(join(cwd, 'out')).filter((name) => !name.endsWith('.tmp'));
    expect(names).toEqual(expect.arrayContaining(found));
    for (const name of found.filter((one) => one !== 'log.json')) {
      const [out, whole] = ['out', 'whole'].map((where) => readFileSync(join(cwd, where, name)));
      expect(out?.equals(whole ?? Buffer.of()), name).toBe(true);
    }
    held.push(found.length);
  }
  // Some were killed before the first name was given.
  expect(held.filter((count) => count === 0).length).toBeGreaterThan(1);
}, 180_000);

test('killed at any moment, every file is whole', async () => {
  const cwd = folder();
  const read = (where: string, name: string): Buffer => readFileSync(join(cwd, where, name));
  for (const [seed, where] of [
    [1, 'first'],
    [2, 'second'],
  ] as const) {
    expect(skein([...words(seed), '--quiet', '--out', where], { cwd }).code).toBe(0);
  }
  expect(skein([...words(1), '--quiet', '--out', 'out'], { cwd }).code).toBe(0);
  const names = filesIn(join(cwd, 'first'));
  let killed = 0;
  for (const changes of [2, 12, 36, 44, 52]) {
    if (await killAfter(changes, cwd)) killed++;
    const found = filesIn(join(cwd, 'out')).filter((name) => !name.endsWith('.tmp'));
    expect(found).toEqual(names);
    for (const name of names.filter((one) => one !== 'log.json')) {
      const bytes = read('out', name);
      expect(bytes.equals(read('first', name)) || bytes.equals(read('second', name)), name).toBe(true);
    }
    const log: unknown = JSON.parse(read('out', 'log.json').toString());
    expect(log).toMatchObject({ format: 'skein-log/1', command: 'run', threads: 1, version: '0.1.0' });
  }
  expect(killed).toBeGreaterThan(2);
}, 180_000);
