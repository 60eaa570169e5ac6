// A sweep that is killed at any moment, again and again, ends as one that nobody disturbed: nothing lost, nothing twice.
import { spawn } from 'node:child_process';
import { readFileSync, readdirSync, rmSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { expect, test } from 'vitest';
import { isLong } from '../fuzz/length.ts';
import { filesIn, folder, root, skein } from './skein.ts';

const kills = isLong ? 200 : 20;
const points = isLong ? 6000 : 1600;
const over = ['--over', 'survival.adult=0.5:0.8', '--over', 'wandering.leaving=0.02:0.3'];
const runs = ['--measure', 'growth,chance', '--replicates', '100', '--years', '20', '--threads', '2', '--quiet'];
const words = ['sweep', 'models/two-ponds.yaml', ...over, '--design', 'sobol', '--points', String(points), ...runs];

const patience = 3_000_000;

function timeOf(action: () => unknown): number {
  const started = performance.now();
  action();
  return performance.now() - started;
}

function bytesOf(path: string): Readonly<Record<string, string>> {
  const files = filesIn(path).filter((file) => file.includes('.') && file !== 'log.json');
  return Object.fromEntries(files.map((file) => [file, readFileSync(join(path, file)).toString('base64')]));
}

/** Files of finished parts, by name. */
function partsIn(path: string): ReadonlyMap<string, number> {
  try {
    const names = readdirSync(join(path, 'parts')).filter((name) => name.endsWith('.parquet'));
    return new Map(names.map((name) => [name, statSync(join(path, 'parts', name)).ino]));
  } catch {
    return new Map();
  }
}

/** Dead by a kill that nothing can catch, unless it was done before. */
async function killedAfter(milliseconds: number, cwd: string): Promise<void> {
  const child = spawn(process.execPath, [join(root, 'bin/skein.cjs'), ...words, '--out', 'out'], {
    cwd,
    stdio: 'ignore',
  });
  const ended = new Promise((resolve) => child.on('exit', resolve));
  await Promise.race([wait(milliseconds), ended]);
  child.kill('SIGKILL');
  await ended;
}

test(`${kills} kills leave the bytes of an undisturbed sweep`, { timeout: 3_600_000 }, async () => {
  const cwd = folder();
  const start = timeOf(() => skein([...words, '--plan'], { cwd }));
  const whole = timeOf(() => {
    expect(skein([...words, '--out', 'clean'], { cwd, patience })).toMatchObject({ code: 0, err: '' });
  });
  const clean = bytesOf(join(cwd, 'clean'));
  const finish = (): void => {
    expect(skein([...words, '--out', 'out'], { cwd, patience })).toMatchObject({ code: 0, err: '' });
    expect(bytesOf(join(cwd, 'out'))).toEqual(clean);
  };
  let before = partsIn(join(cwd, 'out'));
  let cut = 0;
  for (let kill = 0; kill < kills; kill++) {
    // From just before the first part is begun to a quarter of the work, in a scattered order.
    await killedAfter(start * 0.9 + (whole - start) * 0.25 * ((kill * 0.618034) % 1), cwd);
    const now = partsIn(join(cwd, 'out'));
    for (const [name, file] of before) expect(now.get(name)).toBe(file);
    before = now;
    if (now.size < 16) cut++;
    // Killed in its table and its summary, too, and then begun again from nothing.
    else if (kill % 3 === 0) {
      finish();
      rmSync(join(cwd, 'out'), { recursive: true });
      before = new Map();
    }
  }
  expect(cut).toBeGreaterThan(kills / 8);
  finish();
});
