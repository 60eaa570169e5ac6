// How a command ends: the exit codes, warnings that may fail, readers that go away, and a bug in the tool itself.
import { execFileSync, spawnSync } from 'node:child_process';
import { cpSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { folder, ponds, root, skein } from './skein.ts';

test('0: done', () => {
  expect(skein(['check', ponds]).code).toBe(0);
});

test('1: the model is wrong, even where only one number is', () => {
  const text = readFileSync(join(root, ponds), 'utf8').replace('adult: 0.65', 'adult: 1.65');
  const { code, err } = skein(['check', '-'], { input: text });
  expect(code).toBe(1);
  expect(err.trimEnd().endsWith('1 error')).toBe(true);
});

test('2: the command line is wrong, before the model is looked at', () => {
  expect(skein(['run', 'no-such-model.yaml', '--seed', 'x']).code).toBe(2);
});

test('3: the work failed', () => {
  expect(skein(['report', ponds, '--replicates', '1', '-o', '/proc/x']).code).toBe(3);
});

test('70: a bug in the tool asks for a report, and says nothing of the model', () => {
  const cwd = folder();
  for (const part of ['bin', 'build/cli']) cpSync(join(root, part), join(cwd, part), { recursive: true });
  // A kernel that is no program stands for any bug.
  const script = join(cwd, 'build/cli/everyday.js');
  writeFileSync(script, readFileSync(script, 'utf8').replace(/AGFzbQEAAAA[\w+/=]+/, 'AAAA'));
  const { status, stdout, stderr } = spawnSync(process.execPath, ['bin/skein.cjs', 'run', ponds], {
    cwd,
    encoding: 'utf8',
  });
  expect({ status, stdout }).toEqual({ status: 70, stdout: '' });
  expect(stderr).toMatch(/^This is a bug in skein \d+\.\d+\.\d+, not a mistake of yours\. Please report it/);
  expect(stderr).toMatch(/^Node v\d+/m);
  // Of the trace, functions by their names and short lines.
  expect(stderr).toMatch(/^ {4}at [\w.-]+ \(.*everyday\.js:\d+:\d{1,3}\)$/m);
  expect(stderr).not.toContain('Newts');
});

test('a reader that has enough is no failure', () => {
  const line = `'${process.execPath}' '${join(root, 'bin/skein.cjs')}' path models/reed-hare.yaml --years 5000 --json | head -c 100`;
  const out = execFileSync('bash', ['-c', `set -o pipefail; ${line}`], { cwd: folder(), encoding: 'utf8' });
  expect(out).toHaveLength(100);
});

test('mistakes that nobody reads still end with 1', () => {
  const line = `'${process.execPath}' '${join(root, 'bin/skein.cjs')}' check none.yaml 2>/dev/full`;
  const { status } = spawnSync('sh', ['-c', line], { cwd: folder() });
  expect(status).toBe(1);
});
