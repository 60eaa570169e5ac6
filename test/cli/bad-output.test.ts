// Output that cannot be written: told before the work where that can be known, exit code 3, nothing half-written.
import { closeSync, lstatSync, mkdirSync, openSync, readFileSync, statSync, symlinkSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { filesIn, folder, ponds, skein, type Ended } from './skein.ts';

const few = ['--replicates', '20'];

function failed({ code, out, err }: Ended, told: RegExp): void {
  expect({ code, out }).toEqual({ code: 3, out: '' });
  expect(err).toMatch(told);
  expect(err).not.toMatch(/^\s+at |bug/m);
}

describe('a file or folder that cannot be written', () => {
  test.each([
    { place: 'file/page.html', told: /^Cannot write file\/page\.html: a part of its path is not a folder\.\n$/ },
    { place: 'none/page.html', told: /there is no such file or folder/ },
    { place: 'study', told: /it is a folder/ },
    { place: '/proc/page.html', told: /^Cannot write \/proc\/page\.html: / },
    { place: 'full', told: /^Cannot write full: no space left on the disk\.\n$/ },
    { place: `${'n'.repeat(300)}.html`, told: /its name is too long/ },
  ])('report -o $place', ({ place, told }) => {
    const cwd = folder();
    writeFileSync(join(cwd, 'file'), 'mine');
    mkdirSync(join(cwd, 'study'));
    // Through a link, so that a mistake of the tool cannot take the device of this machine away.
    symlinkSync('/dev/full', join(cwd, 'full'));
    failed(skein(['report', ponds, ...few, '-o', place], { cwd }), told);
    expect(filesIn(cwd)).toEqual(['file', 'full', 'study']);
    expect(statSync(join(cwd, 'full')).isCharacterDevice()).toBe(true);
    expect(readFileSync(join(cwd, 'file'), 'utf8')).toBe('mine');
  });

  test.each(['file', 'file/out', '/proc/out', '/dev/full/out'])('run --out %s', (place) => {
    const cwd = folder();
    writeFileSync(join(cwd, 'file'), 'mine');
    failed(skein(['run', ponds, ...few, '--out', place], { cwd }), /^Cannot write /);
    expect(filesIn(cwd)).toEqual(['file']);
  });

  test('new in a folder that cannot be made', () => {
    const cwd = folder();
    writeFileSync(join(cwd, 'file'), 'mine');
    for (const place of ['file', 'file/study', '/proc/study']) failed(skein(['new', place], { cwd }), /^Cannot write /);
    expect(filesIn(cwd)).toEqual(['file']);
  });

  test('it is told before the work: a wrong place with a million replicates', () => {
    const started = performance.now();
    failed(skein(['report', ponds, '--replicates', '100000000', '-o', 'none/page.html']), /Cannot write/);
    failed(skein(['run', ponds, '--replicates', '100000000', '--out', '/proc/out']), /Cannot write/);
    expect(performance.now() - started).toBeLessThan(40_000);
  });
});

describe('a full disk', () => {
  const full = (words: readonly string[]): Ended => {
    const stdout = openSync('/dev/full', 'w');
    try {
      return skein(words, { stdout });
    } finally {
      closeSync(stdout);
    }
  };

  test.each([
    ['check', ponds],
    ['check', ponds, '--json'],
    ['show', ponds, 'matrix'],
    ['path', ponds],
    ['run', ponds, ...few, '--json'],
    ['report', ponds, ...few, '-o', '-'],
    ['--help'],
  ])('standard output of skein %s %s %s', (...words) => {
    const given = words.filter((word) => typeof word === 'string');
    failed(full(given), /^Cannot write standard output: no space left on the disk\.\n$/);
  });

  test('what --out asked for is kept', () => {
    const cwd = folder();
    const stdout = openSync('/dev/full', 'w');
    const { code } = skein(['run', ponds, ...few, '--out', 'out'], { cwd, stdout });
    closeSync(stdout);
    expect(code).toBe(3);
    expect(JSON.parse(readFileSync(join(cwd, 'out/results.json'), 'utf8'))).toMatchObject({ replicates: 20 });
  });
});

describe('what is already there', () => {
  test('an old report is replaced whole; a link to it stays a link', () => {
    const cwd = folder();
    writeFileSync(join(cwd, 'old.html'), 'old');
    symlinkSync('old.html', join(cwd, 'link.html'));
    expect(skein(['report', ponds, ...few, '-o', 'link.html'], { cwd }).code).toBe(0);
    expect(lstatSync(join(cwd, 'link.html')).isSymbolicLink()).toBe(true);
    expect(readFileSync(join(cwd, 'old.html'), 'utf8')).toMatch(/^<!doctype html>/i);
    expect(filesIn(cwd)).toEqual(['link.html', 'old.html']);
  });

  test('a device stays a device', () => {
    const cwd = folder();
    symlinkSync('/dev/null', join(cwd, 'null'));
    expect(skein(['report', ponds, ...few, '-o', 'null'], { cwd }).code).toBe(0);
    expect(lstatSync(join(cwd, 'null')).isSymbolicLink()).toBe(true);
    expect(statSync(join(cwd, 'null')).isCharacterDevice()).toBe(true);
  });

  test('an old report is left as it is where the model is wrong', () => {
    const cwd = folder();
    writeFileSync(join(cwd, 'page.html'), 'old');
    expect(skein(['report', '-', '-o', 'page.html'], { cwd, input: 'skein: 1\n' }).code).toBe(1);
    expect(readFileSync(join(cwd, 'page.html'), 'utf8')).toBe('old');
    expect(filesIn(cwd)).toEqual(['page.html']);
  });
});
