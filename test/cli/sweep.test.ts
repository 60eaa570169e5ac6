// skein sweep: a folder that goes on where it was cut, that refuses what it is not, and shards that join to the same bytes.
import { existsSync, mkdirSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { hostname } from 'node:os';
import { join } from 'node:path';
import { describe, expect, test, vi } from 'vitest';
import { parquetReadObjects } from 'hyparquet';
import { filesIn, folder, skein } from './skein.ts';

vi.setConfig({ testTimeout: 300_000 });

const ponds = 'models/two-ponds.yaml';
const over = ['--over', 'survival.adult=0.5:0.8', '--over', 'wandering.leaving=0.02:0.3'];
const quick = ['sweep', ponds, ...over, '--design', 'latin hypercube', '--points', '600', '--quiet'];
const withRuns = [
  'sweep',
  ponds,
  ...over,
  '--design',
  'sobol',
  '--points',
  '40',
  '--measure',
  'growth,chance,lowest',
  '--replicates',
  '40',
  '--years',
  '10',
  '--quiet',
];

/** Every file but the log, which tells of times. */
function bytesOf(path: string): Readonly<Record<string, string>> {
  const files = filesIn(path).filter((file) => file.includes('.') && file !== 'log.json');
  return Object.fromEntries(files.map((file) => [file, readFileSync(join(path, file)).toString('base64')]));
}

test('any number of threads, and shards that are joined, give the same bytes', () => {
  const cwd = folder();
  const at = (name: string) => bytesOf(join(cwd, name));
  expect(skein([...withRuns, '--out', 'one', '--threads', '1'], { cwd })).toMatchObject({ code: 0, err: '' });
  expect(skein([...withRuns, '--out', 'two', '--threads', '2'], { cwd })).toMatchObject({ code: 0, err: '' });
  for (const i of [1, 2, 3]) {
    expect(skein([...withRuns, '--out', `shard-${i}`, '--shard', `${i}/3`], { cwd })).toMatchObject({
      code: 0,
      out: '',
    });
  }
  const early = skein(['sweep', 'merge', 'shard-1', 'shard-3', '--out', 'whole'], { cwd });
  expect(early.code).toBe(3);
  expect(early.err).toContain('missing, which is shard 2/3');
  expect(
    skein(['sweep', 'merge', 'shard-1', 'shard-2', 'shard-3', '--out', 'whole', '--quiet'], { cwd }),
  ).toMatchObject({ code: 0, err: '' });
  expect(Object.keys(at('one')).length).toBeGreaterThan(10);
  expect(at('two')).toEqual(at('one'));
  expect(at('whole')).toEqual(at('one'));
  const summary = skein(['sweep', 'summary', 'whole', '--json'], { cwd });
  expect(summary.out).toBe(readFileSync(join(cwd, 'one', 'summary.json'), 'utf8'));
});

test('points as Parquet and CSV are the same numbers, with a dictionary', async () => {
  const cwd = folder();
  expect(skein([...quick, '--out', 'out'], { cwd }).code).toBe(0);
  const lines = readFileSync(join(cwd, 'out/points.csv'), 'utf8').trim().split('\n');
  expect(lines).toHaveLength(601);
  const parts = readdirSync(join(cwd, 'out/parts')).sort();
  const rows = await Promise.all(
    parts.map((name) => {
      const bytes = readFileSync(join(cwd, 'out/parts', name));
      return parquetReadObjects({
        file: bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.byteLength) as ArrayBuffer,
      });
    }),
  );
  expect(
    rows.flat().map((row) =>
      Object.values(row as object)
        .map((cell: unknown) => cell ?? '')
        .join(','),
    ),
  ).toEqual(lines.slice(1));
  const dictionary = readFileSync(join(cwd, 'out/dictionary.csv'), 'utf8');
  for (const name of lines[0]?.split(',') ?? []) expect(dictionary).toContain(`points,${name},`);
});

describe('a folder', () => {
  test('goes on with what is there, and never writes a finished part again', () => {
    const cwd = folder();
    const out = join(cwd, 'out');
    expect(skein([...quick, '--out', 'out'], { cwd }).code).toBe(0);
    const whole = bytesOf(out);
    const gone = readdirSync(join(out, 'parts')).filter((_, i) => i % 2 === 0);
    for (const name of gone) rmSync(join(out, 'parts', name));
    rmSync(join(out, 'summary.json'));
    const cut = readdirSync(join(out, 'parts'))[0] ?? '';
    writeFileSync(join(out, 'parts', cut), readFileSync(join(out, 'parts', cut)).subarray(0, 100));
    writeFileSync(join(out, 'parts', '.skein-1-1.tmp'), 'left by a process that was killed');
    expect(skein([...quick, '--out', 'out'], { cwd })).toMatchObject({ code: 0, err: '' });
    expect(bytesOf(out)).toEqual(whole);
  });

  test.each([
    [['--seed', '8', '--measure', 'chance'], 'its seed is'],
    [['--points', '500'], 'it has another design'],
    [['--set', 'x=1'], 'no parameter'],
    [['--measure', 'damping'], 'it has other measures'],
  ] as const)('of another sweep is refused: %s', (more, why) => {
    const cwd = folder();
    const first = why === 'its seed is' ? [...withRuns, '--measure', 'chance'] : quick;
    expect(skein([...first, '--out', 'out'], { cwd }).code).toBe(0);
    const before = bytesOf(join(cwd, 'out'));
    const { code, err } = skein([...first, ...more, '--out', 'out'], { cwd });
    expect(code).toBe(why === 'no parameter' ? 2 : 3);
    expect(err).toContain(why);
    expect(bytesOf(join(cwd, 'out'))).toEqual(before);
  });

  test('of another version, or with other things in it, is refused and left as it is', () => {
    const cwd = folder();
    mkdirSync(join(cwd, 'other'));
    writeFileSync(join(cwd, 'other/thesis.txt'), 'all I have');
    expect(skein([...quick, '--out', 'other'], { cwd })).toMatchObject({
      code: 3,
      err: expect.stringContaining('holds other things than a sweep'),
    });
    expect(readdirSync(join(cwd, 'other'))).toEqual(['thesis.txt']);
    expect(skein([...quick, '--out', 'out'], { cwd }).code).toBe(0);
    const manifest = join(cwd, 'out/manifest.json');
    writeFileSync(manifest, readFileSync(manifest, 'utf8').replace(/"kernel": "[^"]*"/, '"kernel": "0.1"'));
    expect(skein([...quick, '--out', 'out'], { cwd })).toMatchObject({
      code: 3,
      err: expect.stringContaining('with kernel 0.1'),
    });
    expect(skein(['sweep', 'summary', 'out'], { cwd })).toMatchObject({
      code: 3,
      err: expect.stringContaining('with kernel 0.1'),
    });
  });

  test('that a living process holds is refused; one that a dead process held is not', () => {
    const cwd = folder();
    mkdirSync(join(cwd, 'out'));
    const lock = join(cwd, 'out/.lock');
    const hold = (process: number, host: string) => {
      writeFileSync(lock, JSON.stringify({ host, process, began: null }));
    };
    hold(process.pid, hostname());
    expect(skein([...quick, '--out', 'out'], { cwd })).toMatchObject({
      code: 3,
      err: expect.stringContaining('Another sweep is at work'),
    });
    hold(1, 'another machine');
    expect(skein([...quick, '--out', 'out'], { cwd }).code).toBe(3);
    hold(4_000_000, hostname());
    expect(skein([...quick, '--out', 'out'], { cwd })).toMatchObject({ code: 0, err: '' });
    expect(existsSync(lock)).toBe(false);
  });

  // At the manifest, at a part, and at the table of all points.
  test.each([1024, 4608, 8192])(
    'on a disk that takes no more than %i bytes keeps what is finished, and goes on later',
    (mostBytes) => {
      const cwd = folder();
      const words = [...quick, '--points', '1200', '--out', 'out'];
      const full = skein(words, { cwd, mostBytes });
      expect(full.code).toBe(3);
      expect(full.err).toMatch(/^Cannot write .*: a file may not be as large here\./);
      if (mostBytes > 1024)
        expect(full.err).toContain('What is finished is kept. The same command goes on:\n  skein sweep ');
      expect(filesIn(cwd).filter((name) => name.endsWith('.tmp') || name.endsWith('.lock'))).toEqual([]);
      expect(skein(words, { cwd })).toMatchObject({ code: 0, err: '' });
      expect(skein([...words.slice(0, -1), 'clean'], { cwd }).code).toBe(0);
      expect(bytesOf(join(cwd, 'out'))).toEqual(bytesOf(join(cwd, 'clean')));
    },
  );
});

test('what is asked wrongly is told with how to mend it', () => {
  const cwd = folder();
  const told = (...words: string[]) => skein(['sweep', ponds, ...words, '--quiet', '--out', 'out'], { cwd });
  expect(told('--over', 'survival.adlt=0.1,0.2')).toMatchObject({
    code: 2,
    err: expect.stringContaining('did you mean `survival.adult`?'),
  });
  expect(told('--over', 'survival.adult')).toMatchObject({ code: 2, err: expect.stringContaining('name=from:to') });
  expect(told('--over', 'survival.adult=0.1:0.9:900000', '--over', 'wandering.leaving=0:1:900000')).toMatchObject({
    code: 2,
    err: expect.stringContaining('This sweep has 810,000,000,000 points'),
  });
  expect(told(...over, '--measure', 'groth').code).toBe(2);
  expect(told(...over, '--shard', '4/3').code).toBe(2);
  expect(told()).toMatchObject({ code: 2, err: expect.stringContaining('over which numbers') });
  expect(existsSync(join(cwd, 'out'))).toBe(false);
});

test('--points is refused where the design has no use for it', () => {
  const { code, err } = skein(['sweep', ponds, ...over, '--points', '500', '--plan']);
  expect(code).toBe(2);
  expect(err).toContain('--points says nothing of the design `grid`: give each number its steps');
});

test('a list of points is read from a table, and a point that cannot be is a row with its reason', () => {
  const cwd = folder();
  writeFileSync(join(cwd, 'points.csv'), 'survival.adult,wandering.leaving\n0.5,0.1\n1.5,\n0.6,0.2\n');
  const { code, out } = skein(['sweep', ponds, '--list', 'points.csv', '--out', 'out', '--quiet'], { cwd });
  expect(code).toBe(0);
  expect(out).toContain('1 of 3 points are models that cannot be');
  const lines = readFileSync(join(cwd, 'out/points.csv'), 'utf8').split('\n');
  expect(lines[2]).toBe('1,1.5,0.08,,The survival of adult in Lower pond is 1.5');
  expect(lines[3]).toMatch(/^2,0\.6,0\.2,[\d.]+,$/);
});

test('a list of points in the model may stand in a table, whose mistakes are told at their place in it', () => {
  const cwd = folder();
  const model = readFileSync(join(cwd, ponds), 'utf8');
  writeFileSync(join(cwd, 'pond.yaml'), `${model}\nsweep: { list: points.csv, measures: [growth] }\n`);
  writeFileSync(join(cwd, 'points.csv'), 'survival.adult,wandering.leaving\n0.5,0.1\n0.7,\n');
  expect(skein(['sweep', 'pond.yaml', '--out', 'out', '--quiet'], { cwd }).code).toBe(0);
  const words = ['sweep', ponds, '--list', 'points.csv', '--measure', 'growth', '--out', 'same', '--quiet'];
  expect(skein(words, { cwd }).code).toBe(0);
  const points = (name: string) => readFileSync(join(cwd, name, 'points.csv'), 'utf8');
  expect(points('out')).toBe(points('same'));
  expect(points('out').split('\n')[2]).toMatch(/^1,0\.7,0\.08,[\d.]+,$/u);
  writeFileSync(join(cwd, 'points.csv'), 'survival.adlt\n0.5\n');
  const wrong = skein(['sweep', 'pond.yaml', '--out', 'wrong', '--quiet'], { cwd });
  expect(wrong.code).toBe(1);
  expect(wrong.err).toContain('points.csv:1:1');
  expect(wrong.err).toMatch(/nearest +survival\.adult/u);
  writeFileSync(join(cwd, 'points.csv'), 'survival.adult,wandering.leaving\n0.5\n');
  expect(skein(['sweep', 'pond.yaml', '--out', 'wrong', '--quiet'], { cwd })).toMatchObject({
    code: 1,
    err: expect.stringContaining('points.csv:2:1'),
  });
  expect(existsSync(join(cwd, 'wrong'))).toBe(false);
});

test('the plan says what would be done and what it costs, and writes nothing', () => {
  const cwd = folder();
  const { code, out, err } = skein(['sweep', ponds, ...over, '--plan'], { cwd });
  expect({ code, out }).toEqual({ code: 0, out: '' });
  expect(err).toContain('121 points (grid)');
  expect(err).toMatch(/cost .* a point/);
  expect(filesIn(cwd)).toEqual([]);
});

test('scenarios are set beside each other in the same futures, and which is best where is said', () => {
  const cwd = folder();
  const words = ['sweep', 'models/which-plan-where.yaml', '--replicates', '60', '--quiet', '--json', '--out', 'out'];
  const { code, out } = skein(words, { cwd });
  expect(code).toBe(0);
  const { rankings } = JSON.parse(out) as {
    readonly rankings: readonly {
      readonly quantity: string;
      readonly scenarios: readonly { readonly name: string; readonly best: number }[];
      readonly factors: readonly {
        readonly name: string;
        readonly switches: readonly { readonly from: string; readonly to: string }[];
      }[];
    }[];
  };
  const animals = rankings.find(({ quantity }) => quantity === 'animals');
  expect(animals?.scenarios.map(({ name }) => name)).toEqual(['as now', 'larger bank', 'safe ford']);
  expect(animals?.scenarios.reduce((sum, { best }) => sum + best, 0)).toBeCloseTo(1, 12);
  const page = skein(['sweep', 'summary', 'out', '--page', 'page.html'], { cwd });
  expect(page).toMatchObject({ code: 0, err: '' });
  const html = readFileSync(join(cwd, 'page.html'), 'utf8');
  expect(html).toContain('<h2>Which plan is best by animals</h2><figure class="steady">');
  expect(html).toContain('>B: larger bank</text>');
  expect(html).not.toContain('<script');
  const drowned = animals?.factors.find(({ name }) => name === 'drowned');
  expect(drowned?.switches).toEqual([expect.objectContaining({ from: 'larger bank', to: 'safe ford' })]);
});
