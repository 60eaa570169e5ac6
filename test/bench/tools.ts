// The other languages of the baselines, where this machine has them.
import { spawnSync } from 'node:child_process';
import { mkdirSync } from 'node:fs';
import { join } from 'node:path';

export const work = join(process.cwd(), 'build', 'bench');
const baselines = join(process.cwd(), 'test', 'bench', 'baselines');
const fair = ['-O3', '-fno-math-errno', '-fno-trapping-math'];
const packages: Readonly<Record<string, string>> = { gcc: 'gcc', python3: 'python3-numpy', Rscript: 'r-base-core' };
const missing = new Set<string>();

/** What was asked for and is not here, each with what to install on Debian. */
export function missingTools(): readonly string[] {
  return [...missing];
}

function has(command: string, words: readonly string[]): boolean {
  const found = spawnSync(command, words, { stdio: 'ignore' }).status === 0;
  if (!found)
    missing.add(
      `${command} is not here, so nothing is compared with it: apt-get install ${packages[command] ?? command}`,
    );
  return found;
}

/** Compiles a baseline in C twice: for this processor's widest vectors, and for SSE4.2, which is as wide as WebAssembly's. */
export function compileC(name: string): readonly (readonly [label: string, command: string])[] {
  if (!has('gcc', ['--version'])) return [];
  mkdirSync(work, { recursive: true });
  return (
    [
      ['C, same width', ['-msse4.2', '-mpopcnt'], 'sse'],
      ['C, widest', ['-march=native'], 'native'],
    ] as const
  ).map(([label, flags, suffix]) => {
    const target = join(work, `${name}-${suffix}`);
    const words = [...fair, ...flags, '-o', target, join(baselines, `${name}.c`), '-lm'];
    const done = spawnSync('gcc', words, { encoding: 'utf8' });
    if (done.status !== 0) throw new Error(`gcc did not compile ${name}.c:\n${done.stderr}`);
    return [label, target] as const;
  });
}

/** The command and first words for a script, or null. NumPy is Debian's, with one thread and whatever kernels suit the processor. */
export function script(name: string): readonly string[] | null {
  const path = join(baselines, name);
  if (name.endsWith('.py')) return has('python3', ['-c', 'import numpy']) ? [pythonWithNumpy(), path] : null;
  return has('Rscript', ['--version']) ? ['Rscript', path] : null;
}

function pythonWithNumpy(): string {
  return spawnSync('/usr/bin/python3', ['-c', 'import numpy'], { stdio: 'ignore' }).status === 0
    ? '/usr/bin/python3'
    : 'python3';
}

export interface Outcome {
  readonly numbers: readonly number[];
  readonly seconds: number;
}

/** Runs a baseline, which prints a number a line and then the seconds of processor time that its work took. */
export function runBaseline([command = '', ...words]: readonly string[]): Outcome {
  const env = { ...process.env, OPENBLAS_NUM_THREADS: '1', OMP_NUM_THREADS: '1' };
  Reflect.deleteProperty(env, 'OPENBLAS_CORETYPE');
  Reflect.deleteProperty(env, 'OPENBLAS_L2_SIZE');
  const done = spawnSync(command, words, { encoding: 'utf8', env, maxBuffer: 1 << 28 });
  if (done.status !== 0) throw new Error(`${command} ${words.join(' ')} failed:\n${done.stderr}`);
  const lines = done.stdout.trim().split('\n');
  const seconds = Number(lines.pop()?.replace('seconds ', ''));
  if (!(seconds >= 0)) throw new Error(`${command} told no time.`);
  return { numbers: lines.map(Number), seconds };
}
