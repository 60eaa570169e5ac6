// Ctrl-C keeps what is finished and says so.
import { spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, test } from 'vitest';

const root = new URL('../..', import.meta.url).pathname;
const folder = mkdtempSync(join(tmpdir(), 'skein-stop-'));
afterAll(() => {
  rmSync(folder, { recursive: true });
});

interface Ended {
  readonly code: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

/** Sends the signal as soon as the first line of progress comes. */
function runUntilProgress(words: readonly string[], signal: NodeJS.Signals): Promise<Ended> {
  const child = spawn(process.execPath, ['bin/skein.cjs', ...words], { cwd: root });
  let [stdout, stderr, sent] = ['', '', false];
  child.stdout.on('data', (text: Buffer) => (stdout += text.toString()));
  child.stderr.on('data', (text: Buffer) => {
    stderr += text.toString();
    if (sent || !/(?:Replicates|Points): /u.test(stderr)) return;
    sent = true;
    child.kill(signal);
  });
  return new Promise((resolve) =>
    child.on('close', (code) => {
      resolve({ code, stdout, stderr });
    }),
  );
}

test.each([
  ['SIGINT', '1'],
  ['SIGTERM', '2'],
] as const)('%s ends a run in %s threads with what is finished', async (signal, threads) => {
  const out = join(folder, signal);
  const words = [
    'run',
    'models/two-ponds.yaml',
    '--replicates',
    '20000000',
    '--threads',
    threads,
    '--out',
    out,
    '--json',
  ];
  const { code, stdout, stderr } = await runUntilProgress(words, signal);
  expect(code).toBe(3);
  const { replicates } = JSON.parse(stdout) as { readonly replicates: number };
  expect(replicates).toBeGreaterThan(0);
  expect(replicates).toBeLessThan(20_000_000);
  const number = replicates.toLocaleString('en');
  expect(stderr).toContain(
    `Stopped after ${number} of 20,000,000 replicates; the results are those of \`--replicates ${String(replicates)}\`.`,
  );
  expect(readdirSync(out).filter((name) => name.endsWith('.tmp'))).toEqual([]);
  expect(readFileSync(join(out, 'results.json'), 'utf8')).toBe(stdout);
});

test.each([
  ['SIGINT', '1'],
  ['SIGTERM', '2'],
] as const)(
  '%s ends a sweep in %s threads with its finished parts and the command that goes on',
  async (signal, threads) => {
    const out = join(folder, `sweep-${threads}`);
    const over = ['--over', 'survival.adult=0.5:0.8', '--over', 'wandering.leaving=0.02:0.3'];
    const runs = ['--measure', 'lowest', '--replicates', '800', '--years', '50', '--threads', threads];
    const words = ['sweep', 'models/two-ponds.yaml', ...over, '--design', 'sobol', '--points', '400', ...runs];
    const { code, stdout, stderr } = await runUntilProgress([...words, '--out', out], signal);
    expect({ code, stdout }).toEqual({ code: 3, stdout: '' });
    expect(stderr).toMatch(
      /Stopped with \d+ of \d+ parts done\. What is finished is kept\. The same command goes on:\n {2}skein sweep /u,
    );
    const parts = readdirSync(join(out, 'parts'));
    expect(parts.length).toBeGreaterThan(0);
    expect(parts.filter((name) => !name.endsWith('.parquet'))).toEqual([]);
  },
);
