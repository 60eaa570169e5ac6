// Every Node that the tool is for prints and writes the same bytes, on every model that comes with it. The other Nodes are
// installed from the npm package `node` into a folder of their own.
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { modelNames } from '../golden/models.ts';

const root = new URL('../..', import.meta.url).pathname;
const versions = ['20', '22', '24'];
const folder = mkdtempSync(join(tmpdir(), 'skein-nodes-'));
afterAll(() => {
  rmSync(folder, { recursive: true });
});

const nodes = new Map<string, string>();

beforeAll(() => {
  for (const version of versions) {
    const place = join(folder, version);
    const words = ['install', '--prefix', place, '--no-audit', '--no-fund', '--loglevel=error', `node@${version}`];
    const { status, stderr } = spawnSync('npm', words, { encoding: 'utf8', cwd: folder });
    expect(stderr.split('\n').filter((line) => line.startsWith('npm error'))).toEqual([]);
    expect(status).toBe(0);
    nodes.set(version, join(place, 'node_modules/node/bin/node'));
  }
}, 1_200_000);

/** What a command prints, as a hash: a page is too long to be told by a test. */
function printed(node: string, words: readonly string[]): string {
  const { status, stdout, stderr } = spawnSync(node, ['bin/skein.cjs', ...words], {
    cwd: root,
    maxBuffer: 512 * 1024 * 1024,
  });
  expect([words[0], status, String(stderr)]).toEqual([words[0], 0, expect.any(String)]);
  return `${stdout.length} ${createHash('sha256').update(stdout).digest('hex')}`;
}

test('the other Nodes are the ones that were asked for', () => {
  const said = versions.map(
    (version) => spawnSync(nodes.get(version) ?? '', ['--version'], { encoding: 'utf8' }).stdout,
  );
  expect(said.map((text) => /^v(\d+)\./.exec(text)?.[1])).toEqual(versions);
});

describe.each(modelNames)('%s', (name) => {
  const model = `models/${name}.yaml`;
  const calls = [
    ['run', model, '--replicates', '45', '--threads', '2', '--json', '--quiet'],
    ['path', model, '--json', '--quiet'],
    ['analyse', model, '--json', '--quiet'],
    ['report', model, '--replicates', '20', '-o', '-', '--quiet'],
  ];

  test.each(calls)('gives the same bytes of %s in each of them', (...words) => {
    const here = printed(process.execPath, words);
    for (const version of versions)
      expect([version, printed(nodes.get(version) ?? '', words)]).toEqual([version, here]);
  });
});
