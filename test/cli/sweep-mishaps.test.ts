// What befalls a sweep beside kills: a disk that is full, threads that die, another process on the same folder. Whatever it is, the
// folder ends as that of a sweep that nobody disturbed.
import { spawn, spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { describe, expect, test, vi } from 'vitest';
import { filesIn, folder, root, skein } from './skein.ts';

vi.setConfig({ testTimeout: 300_000 });

const over = ['--over', 'survival.adult=0.5:0.8', '--over', 'wandering.leaving=0.02:0.3'];
const runs = ['--measure', 'growth,chance', '--replicates', '60', '--years', '20', '--threads', '2', '--quiet'];
const words = ['sweep', 'models/two-ponds.yaml', ...over, '--design', 'sobol', '--points', '400', ...runs];

function bytesOf(path: string): Readonly<Record<string, string>> {
  const files = filesIn(path).filter((file) => file.includes('.') && file !== 'log.json');
  return Object.fromEntries(files.map((file) => [file, readFileSync(join(path, file)).toString('base64')]));
}

function undisturbed(cwd: string): Readonly<Record<string, string>> {
  expect(skein([...words, '--out', 'clean'], { cwd })).toMatchObject({ code: 0, err: '' });
  return bytesOf(join(cwd, 'clean'));
}

describe('a disk of so many KB that fills', () => {
  // Linux lets everybody make a disk in a space of names of their own, unless that is forbidden: then files are kept small instead.
  const own = spawnSync('unshare', ['-rm', 'mount', '-t', 'tmpfs', 'tmpfs', '/tmp']).status === 0;
  const script = own
    ? `mount -t tmpfs -o size="$1"k tmpfs disk
       shift; "$@" 2> told; echo $? > code; ls -A disk/out/parts > parts
       mount -o remount,size=64m tmpfs disk; "$@"; echo $? > later; cp -r disk/out after`
    : `limit=$(($1 / 4)); shift
       (ulimit -f "$limit"; "$@" 2> told; echo $? > code); ls -A disk/out/parts > parts
       "$@"; echo $? > later; cp -r disk/out after`;

  test.each([8, 32, 44, 64, 84])('%i', (kilobytes) => {
    const cwd = folder();
    mkdirSync(join(cwd, 'disk'));
    const clean = undisturbed(cwd);
    const command = [process.execPath, join(root, 'bin/skein.cjs'), ...words, '--out', 'disk/out'];
    const shell = ['sh', '-c', script, 'sh', String(kilobytes), ...command];
    const [program = 'sh', ...rest] = own ? ['unshare', '-rm', ...shell] : shell;
    spawnSync(program, rest, { cwd, encoding: 'utf8' });
    const told = readFileSync(join(cwd, 'told'), 'utf8');
    expect(readFileSync(join(cwd, 'code'), 'utf8').trim(), told).toBe('3');
    expect(told).toMatch(/^Cannot (write|make) .*: (no space left|a file may not be as large here)/u);
    const parts = readFileSync(join(cwd, 'parts'), 'utf8').split('\n');
    expect(parts.filter((name) => name.endsWith('.tmp'))).toEqual([]);
    expect(readFileSync(join(cwd, 'later'), 'utf8').trim()).toBe('0');
    expect(bytesOf(join(cwd, 'after'))).toEqual(clean);
  });
});

describe('threads that die', () => {
  /** Preloaded in every thread: those whose number is at most so much die over the first part that they are given. */
  const dying = (upTo: number, cwd: string): Readonly<Record<string, string>> => {
    const file = join(cwd, 'dying.cjs');
    writeFileSync(
      file,
      `const { isMainThread, parentPort, threadId } = require('node:worker_threads');
if (!isMainThread && threadId <= ${upTo}) parentPort.on('message', () => process.exit(9));`,
    );
    return { NODE_OPTIONS: `--require=${file}` };
  };

  test('once cost no more than the part in hand', () => {
    const cwd = folder();
    const clean = undisturbed(cwd);
    const { code, err } = skein([...words, '--out', 'out'], { cwd, env: dying(2, cwd) });
    expect({ code, err }).toEqual({
      code: 0,
      err: 'A thread died (it ended with code 9); its points are run again.\n'.repeat(2),
    });
    expect(bytesOf(join(cwd, 'out'))).toEqual(clean);
  });

  test('again and again end the sweep, which goes on later', () => {
    const cwd = folder();
    const clean = undisturbed(cwd);
    const { code, err } = skein([...words, '--out', 'out'], { cwd, env: dying(1000, cwd) });
    expect(code).toBe(3);
    expect(err).toContain('A thread died 3 times over the same points: it ended with code 9.');
    expect(err).toContain('The same command goes on:\n  skein sweep models/two-ponds.yaml');
    expect(skein([...words, '--out', 'out'], { cwd })).toMatchObject({ code: 0, err: '' });
    expect(bytesOf(join(cwd, 'out'))).toEqual(clean);
  });
});

describe('two processes on one folder', () => {
  interface Begun {
    readonly ended: Promise<{ readonly code: number | null; readonly err: string }>;
  }

  function begin(cwd: string): Begun {
    const child = spawn(process.execPath, [join(root, 'bin/skein.cjs'), ...words, '--out', 'out'], { cwd });
    let err = '';
    child.stderr.on('data', (chunk: Buffer) => (err += chunk.toString()));
    return {
      ended: new Promise((resolve) =>
        child.on('close', (code) => {
          resolve({ code, err });
        }),
      ),
    };
  }

  async function until(so: () => boolean): Promise<void> {
    while (!so()) await wait(2);
  }

  test('begun together: one does the work, the other is told', async () => {
    const cwd = folder();
    const clean = undisturbed(cwd);
    const both = await Promise.all([begin(cwd), begin(cwd)].map(({ ended }) => ended));
    const codes = both.map(({ code }) => code).toSorted();
    // Where the first was done before the second came, both are.
    if (codes[1] !== 0) {
      expect(codes).toEqual([0, 3]);
      expect(both.find(({ code }) => code === 3)?.err).toContain('Another sweep is at work in out');
    }
    expect(bytesOf(join(cwd, 'out'))).toEqual(clean);
  });

  test('with the lock taken away between them: whatever becomes of either, no part is harmed', async () => {
    const cwd = folder();
    const clean = undisturbed(cwd);
    const lock = join(cwd, 'out/.lock');
    const first = begin(cwd);
    await until(() => existsSync(lock) && existsSync(join(cwd, 'out/parts')));
    rmSync(lock, { force: true });
    const ends = await Promise.all([first.ended, begin(cwd).ended]);
    for (const { code } of ends) expect([0, 3]).toContain(code);
    for (const name of readdirSync(join(cwd, 'out/parts')).filter((one) => one.endsWith('.parquet'))) {
      expect(readFileSync(join(cwd, 'out/parts', name)).toString('base64')).toBe(clean[join('parts', name)]);
    }
    expect(skein([...words, '--out', 'out'], { cwd })).toMatchObject({ code: 0, err: '' });
    expect(bytesOf(join(cwd, 'out'))).toEqual(clean);
  });
});
