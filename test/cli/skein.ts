// Calls the real command, as a shell does, in a folder of its own.
import { spawnSync } from 'node:child_process';
import { mkdtempSync, readdirSync, rmSync, symlinkSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { onTestFinished } from 'vitest';

export const root = fileURLToPath(new URL('../..', import.meta.url));
const command = join(root, 'bin/skein.cjs');

export interface Call {
  readonly cwd?: string;
  readonly input?: string | Uint8Array;
  readonly env?: Readonly<Record<string, string>>;
  /** File descriptor of standard output, instead of a pipe that is read. */
  readonly stdout?: number;
  /** No file can grow beyond so many bytes, as if the disk were full. */
  readonly mostBytes?: number;
  /** Milliseconds after which it is taken to hang. */
  readonly patience?: number;
}

export interface Ended {
  readonly code: number | null;
  readonly out: string;
  readonly err: string;
}

export function skein(
  words: readonly string[],
  { cwd = root, input = '', env = {}, stdout, mostBytes, patience = 50_000 }: Call = {},
): Ended {
  const {
    status,
    stdout: out,
    stderr,
  } = spawnSync(...limited([command, ...words], mostBytes), {
    cwd,
    input,
    env: { PATH: process.env['PATH'], HOME: process.env['HOME'], ...env },
    encoding: 'utf8',
    stdio: ['pipe', stdout ?? 'pipe', 'pipe'],
    timeout: patience,
    maxBuffer: 256 * 1024 * 1024,
  });
  return { code: status, out: out ?? '', err: stderr };
}

/** The shell counts in blocks of 512 bytes. */
function limited(words: readonly string[], mostBytes: number | undefined): [string, readonly string[]] {
  if (mostBytes === undefined) return [process.execPath, words];
  const blocks = String(Math.floor(mostBytes / 512));
  return ['/bin/sh', ['-c', 'ulimit -f "$0" && exec "$@"', blocks, process.execPath, ...words]];
}

/** An empty folder with the examples beside it as `models`, gone after the test. */
export function folder(): string {
  const path = mkdtempSync(join(tmpdir(), 'skein-test-'));
  symlinkSync(join(root, 'models'), join(path, 'models'));
  onTestFinished(() => {
    rmSync(path, { recursive: true, force: true });
  });
  return path;
}

/** Everything in a folder but the examples, in the order of names. */
export function filesIn(path: string): readonly string[] {
  const found = readdirSync(path, { recursive: true, encoding: 'utf8' });
  return found.filter((file) => file !== 'models' && !file.startsWith('models/')).sort();
}

export const ponds = 'models/two-ponds.yaml';
export const hare = 'models/reed-hare.yaml';
