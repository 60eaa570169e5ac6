// Input of any kind that is no model: one clear error, exit code 1, quickly, and never a stack trace.
import { execFileSync } from 'node:child_process';
import {
  closeSync,
  ftruncateSync,
  mkdirSync,
  openSync,
  readFileSync,
  symlinkSync,
  writeFileSync,
  writeSync,
} from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { filesIn, folder, ponds, root, skein, type Call } from './skein.ts';

const model = readFileSync(join(root, ponds), 'utf8');

function refused(file: string, told: RegExp, call: Call): void {
  const { code, out, err } = skein(['run', file], call);
  expect({ code, out }).toEqual({ code: 1, out: '' });
  expect(err).toMatch(told);
  expect(err).not.toMatch(/^\s+at |bug/m);
  expect(err.length).toBeLessThan(20_000);
}

interface Text {
  readonly what: string;
  readonly text: string | Uint8Array;
  readonly told: RegExp;
}

const adult = (value: string): string => model.replace('adult: 0.65', `adult: ${value}`);
const deep = '['.repeat(10_000);

const texts: readonly Text[] = [
  { what: 'nothing', text: '', told: /error file-empty/ },
  { what: 'an alias that holds itself', text: 'a: &a [*a]\n', told: /error yaml-alias/ },
  {
    what: 'aliases that grow to a billion',
    text: `a: &a [x, x, x]\n${[...'bcdefghij'].map((key, i) => `${key}: &${key} [*${'abcdefghi'[i]}, *${'abcdefghi'[i]}]`).join('\n')}\n`,
    told: /error yaml-alias/,
  },
  { what: 'ten thousand levels of lists', text: `a: ${deep}${']'.repeat(10_000)}\n`, told: /error yaml-nesting/ },
  {
    what: 'a thousand levels of sections',
    text: Array.from({ length: 1000 }, (_, i) => `${' '.repeat(i)}a:`).join('\n'),
    told: /error yaml-nesting/,
  },
  { what: 'ten thousand brackets in an expression', text: adult(`"${'('.repeat(10_000)}1"`), told: /error expression/ },
  { what: 'not a number', text: adult('.nan'), told: /:\d+:\d+ error number-format/ },
  { what: 'infinity', text: adult('.inf'), told: /error number-format/ },
  { what: 'a number too large to hold', text: adult('1e400'), told: /error/ },
  { what: 'NaN from an expression', text: adult('log(-1)'), told: /error/ },
  { what: 'bytes that are not UTF-8', text: Uint8Array.of(0x73, 0xff, 0xfe), told: /it is not text in UTF-8/ },
  { what: 'UTF-16', text: Buffer.from(`\uFEFF${model}`, 'utf16le'), told: /it is not text in UTF-8/ },
  { what: 'a list', text: '- 1\n- 2\n', told: /error yaml-not-sections/ },
];

describe('a text that is no model', () => {
  test.each(texts)('$what', ({ text, told }) => {
    refused('-', told, { input: text });
  });

  test('a byte order mark before a good model is none of them', () => {
    expect(skein(['check', '-'], { input: `\uFEFF${model}` }).code).toBe(0);
  });

  test('Windows line ends change nothing', () => {
    const ends = model.replaceAll('\n', '\r\n');
    const words = ['run', '-', '--replicates', '20', '--json'];
    expect(skein(words, { input: ends })).toEqual(skein(words, { input: model }));
  });
});

describe('a file that cannot be read', () => {
  test('50 MB: in a file, a pipe, and a device without end', () => {
    const cwd = folder();
    const file = openSync(join(cwd, 'large.yaml'), 'w');
    ftruncateSync(file, 50 * 1024 * 1024);
    writeSync(file, 'skein: 1\n', 0);
    closeSync(file);
    refused('large.yaml', /larger than a model can be \(8 MB\)/, { cwd });
    refused('-', /larger than a model can be/, { cwd, input: new Uint8Array(50 * 1024 * 1024) });
    refused('/dev/zero', /larger than a model can be/, { cwd });
  });

  test('there is none, it is a folder, its path goes through a file, its links go in a circle', () => {
    const cwd = folder();
    mkdirSync(join(cwd, 'study'));
    writeFileSync(join(cwd, 'file'), 'x');
    symlinkSync('round.yaml', join(cwd, 'round.yaml'));
    refused('none.yaml', /^Cannot read none\.yaml: there is no such file or folder\.\n$/, { cwd });
    refused('study', /it is a folder; name the model file in it/, { cwd });
    refused('file/model.yaml', /a part of its path is not a folder/, { cwd });
    refused('round.yaml', /its links lead in a circle/, { cwd });
    refused('n'.repeat(300), /its name is too long/, { cwd });
    expect(filesIn(cwd)).toEqual(['file', 'round.yaml', 'study']);
  });

  test('a named pipe is read to its end', () => {
    const cwd = folder();
    execFileSync('mkfifo', [join(cwd, 'pipe')]);
    const line = `cat '${join(root, ponds)}' > pipe & '${process.execPath}' '${join(root, 'bin/skein.cjs')}' check pipe`;
    expect(execFileSync('sh', ['-c', line], { cwd, encoding: 'utf8' })).toContain('Newts in two ponds');
  });
});
