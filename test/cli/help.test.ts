// Every command explains itself with an example that works as it is typed.
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { folder, skein } from './skein.ts';

const overview = skein(['--help']);
const list = overview.out.slice(overview.out.indexOf('Commands:'));
const commands = [...list.matchAll(/^ {2}(\w+) /gm)].map((match) => match[1] ?? '');

test('the overview lists the commands', () => {
  expect(overview).toMatchObject({ code: 0, err: '' });
  expect(commands).toEqual(expect.arrayContaining(['new', 'check', 'show', 'path', 'run', 'report']));
});

test('the version is that of the package', () => {
  expect(skein(['--version'])).toMatchObject({ code: 0, out: expect.stringMatching(/^\d+\.\d+\.\d+\n$/), err: '' });
});

test('without a command the overview goes to standard error, as a mistake', () => {
  expect(skein([])).toMatchObject({ code: 2, out: '', err: expect.stringContaining('Commands:') });
});

describe.each(commands)('skein %s', (command) => {
  const { code, out, err } = skein([command, '--help']);
  const examples = out.split('\nExample:\n')[1]?.trim().split('\n') ?? [];

  test('has a help text with an example', () => {
    expect({ code, err }).toEqual({ code: 0, err: '' });
    expect(out).toMatch(new RegExp(`^Usage: skein ${command} `));
    expect(examples.length).toBeGreaterThan(0);
  });

  test.each(examples)('%s', (line) => {
    const cwd = folder();
    const [name, ...words] = line.trim().split(/\s+/);
    expect(name).toBe('skein');
    expect(words[0]).toBe(command);
    expect(skein(words, { cwd })).toMatchObject({ code: 0, err: expect.not.stringContaining('error') });
    const written = words.indexOf('-o');
    if (written >= 0) expect(existsSync(join(cwd, words[written + 1] ?? ''))).toBe(true);
  });
});
