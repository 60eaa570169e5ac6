// skein new: a model to start from, never over something that is there.
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { filesIn, folder, hare, ponds, root, skein } from './skein.ts';

test('writes the small model, says what is next, and that works', () => {
  const cwd = folder();
  expect(skein(['new', 'my study'], { cwd })).toEqual({
    code: 0,
    out: '',
    err: 'Wrote my study/model.yaml\nNext: skein check my study/model.yaml\n',
  });
  const written = readFileSync(join(cwd, 'my study/model.yaml'), 'utf8');
  expect(written).toBe(readFileSync(join(root, ponds), 'utf8'));
  expect(skein(['check', 'my study/model.yaml', '--strict'], { cwd }).code).toBe(0);
});

test('--example writes another one, in folders of its own making', () => {
  const cwd = folder();
  expect(skein(['new', 'a/b/c', '--example', 'reed-hare'], { cwd }).code).toBe(0);
  expect(readFileSync(join(cwd, 'a/b/c/model.yaml'), 'utf8')).toBe(readFileSync(join(root, hare), 'utf8'));
});

test('--example list names them all, on standard output', () => {
  const cwd = folder();
  const { code, out, err } = skein(['new', 'nowhere', '--example', 'list'], { cwd });
  expect({ code, err }).toEqual({ code: 0, err: '' });
  expect(out.split('\n')).toEqual(expect.arrayContaining(['reed-hare', 'two-ponds']));
  expect(filesIn(cwd)).toEqual([]);
});

test('leaves a model that is there as it is', () => {
  const cwd = folder();
  mkdirSync(join(cwd, 'study'));
  writeFileSync(join(cwd, 'study/model.yaml'), 'mine');
  const { code, err } = skein(['new', 'study'], { cwd });
  expect(code).toBe(3);
  expect(err).toContain('study/model.yaml exists already; nothing was written.');
  expect(readFileSync(join(cwd, 'study/model.yaml'), 'utf8')).toBe('mine');
});

test('a folder with other things in it may be used', () => {
  const cwd = folder();
  writeFileSync(join(cwd, 'notes.txt'), 'x');
  expect(skein(['new', '.'], { cwd }).code).toBe(0);
  expect(filesIn(cwd)).toEqual(['model.yaml', 'notes.txt']);
});
