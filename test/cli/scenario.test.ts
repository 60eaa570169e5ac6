// --scenario takes a plan with any command.
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, test } from 'vitest';
import { skein } from './skein.ts';

const folder = mkdtempSync(join(tmpdir(), 'skein-scenario-'));
afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});
const bags = 'models/three-bags.yaml';

test('a plan names itself, and its run.json repeats it', () => {
  const out = join(folder, 'out');
  const words = ['run', bags, '--scenario', 'a share', '--replicates', '32', '--json', '--quiet'];
  const first = skein([...words, '--out', out]);
  expect({ code: first.code, err: first.err }).toEqual({ code: 0, err: '' });
  expect(JSON.parse(first.out)).toMatchObject({
    model: 'Three rules for one deer stock, plan: a share',
    handled: [{ phase: 'every eighteenth' }],
  });
  expect(JSON.parse(readFileSync(join(out, 'run.json'), 'utf8'))).toMatchObject({
    spec: { run: { scenario: 'a share' } },
  });
  const again = skein(['run', '--again', join(out, 'run.json'), '--json', '--quiet']);
  expect(again.out).toBe(first.out);
});

test('as now is the model without its actions', () => {
  const plain = skein(['path', bags, '--json', '--quiet']);
  expect(plain.code).toBe(0);
  const now = skein(['path', bags, '--scenario', 'as now', '--json', '--quiet']);
  const abundance = (out: string): unknown => JSON.parse(out).abundance;
  expect(abundance(now.out)).toEqual(abundance(plain.out));
});

test('a mistake that only a plan makes names the plan where it is told at a place of the model', () => {
  const path = join(folder, 'drained.yaml');
  const hares = readFileSync('models/reed-hare.yaml', 'utf8');
  writeFileSync(path, hares.replace('capacity: { add: 70 }', 'capacity: { add: -200 }'));
  const { code, err } = skein(['check', path]);
  expect(code).toBe(1);
  expect(err).toMatch(
    /The capacity of Abbot's wash is -?\d.* in \d{4}\.[^]*because {3}So under the plan `rewet the wash`\./u,
  );
});

test('a wrong name gets the nearest', () => {
  const { code, err } = skein(['run', bags, '--scenario', 'a shar']);
  expect(code).toBe(2);
  expect(err).toContain('Did you mean `a share`?');
});
