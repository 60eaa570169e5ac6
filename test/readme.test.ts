// The README: its tour works as it is typed, and its reference is that of the language.
import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, describe, expect, test } from 'vitest';
import { writeReference } from '../src/spec/reference.ts';
import { accepting } from './golden/golden.ts';

const root = fileURLToPath(new URL('..', import.meta.url));
const file = join(root, 'README.md');
const readme = readFileSync(file, 'utf8');

/** What the tour writes, all of which is there at its end. */
const written = ['my-study/model.yaml', 'my-study/report.html', 'my-study/results/run.json'];

describe('the five-minute tour', () => {
  const folder = mkdtempSync(join(tmpdir(), 'skein-tour-'));
  for (const name of ['bin', 'build', 'models']) symlinkSync(join(root, name), join(folder, name));
  afterAll(() => {
    rmSync(folder, { recursive: true, force: true });
  });

  const blocks = blocksUnder('Five-minute tour');

  test('has commands', () => {
    expect(blocks.join('\n').match(/\bskein /g)?.length).toBeGreaterThan(4);
  });

  test.each(blocks)('%s', (block) => {
    // `skein` and `npx skein` stand for the command that was built; the tour begins after installing.
    const names = `skein() { node '${join(root, 'bin/skein.cjs')}' "$@"; }\nnpx() { "$@"; }\n`;
    const { status, stderr } = spawnSync('sh', ['-euc', names + withoutInstalling(block)], {
      cwd: folder,
      encoding: 'utf8',
    });
    expect({ status, stderr }).toEqual({ status: 0, stderr: expect.not.stringMatching(/error|bug/) });
  });

  test('leaves what it speaks of', () => {
    expect(written.filter((name) => !existsSync(join(folder, name)))).toEqual([]);
  });
});

describe('the reference', () => {
  const [start, end] = ['<!-- reference:start -->\n', '<!-- reference:end -->'];

  test('is made from the language', () => {
    const [before = '', after] = readme.split(start);
    const [found, rest] = after?.split(end) ?? [];
    if (accepting && rest !== undefined) writeFileSync(file, before + start + writeReference() + end + rest);
    else expect(found, 'UPDATE_GOLDEN=1 writes it').toBe(writeReference());
  });
});

describe('what it names', () => {
  test('files that it links to are there', () => {
    const links = [...readme.matchAll(/\]\((?!https?:|#)([^)#]+)/g)].map((match) => match[1] ?? '');
    expect(links.length).toBeGreaterThan(3);
    expect(links.filter((link) => !existsSync(join(root, link)))).toEqual([]);
  });

  test('headings that it links to are there', () => {
    const headings = [...readme.matchAll(/^#+ (.+)$/gm)].map((match) => anchorOf(match[1] ?? ''));
    const links = [...readme.matchAll(/\]\(#([^)]+)\)/g)].map((match) => match[1] ?? '');
    expect(links.filter((link) => !headings.includes(link))).toEqual([]);
  });
});

/** The shell blocks between a heading and the next of its rank. */
function blocksUnder(heading: string): readonly string[] {
  const section = readme.split(`## ${heading}\n`)[1]?.split(/^## /m)[0] ?? '';
  return [...section.matchAll(/^```sh\n([^]*?)^```/gm)].map((match) => match[1]?.trim() ?? '');
}

function withoutInstalling(block: string): string {
  return block.replace(/^(?:npm|git|cd|alias) .*$/gm, '');
}

function anchorOf(heading: string): string {
  return heading
    .toLowerCase()
    .replace(/[^\w\s-]/g, '')
    .replaceAll(' ', '-');
}
