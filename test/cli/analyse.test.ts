// skein analyse: the answer first, one JSON object of the published form, tables, and the state it is asked for.
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import Ajv from 'ajv/dist/2020.js';
import { describe, expect, test } from 'vitest';
import { analysisJsonSchema } from '../../src/analysis/schema.ts';
import { filesIn, folder, hare, ponds, skein } from './skein.ts';

const fits = new Ajv({ strict: false, allErrors: true }).compile(analysisJsonSchema);

function analysisOf(...words: readonly string[]) {
  const { code, out, err } = skein(['analyse', ponds, '--json', ...words]);
  expect({ code, err }).toEqual({ code: 0, err: '' });
  return JSON.parse(out);
}

test('text leads with the answer in words, below the title', () => {
  const { code, out, err } = skein(['analyse', hare]);
  expect({ code, err }).toEqual({ code: 0, err: '' });
  const [title, blank, answer] = out.split('\n');
  expect([title, blank]).toEqual(['Reed hare on the Harrow Levels', '']);
  expect(answer).toMatch(/^With almost nobody there and in mean years, the population grows by /);
  expect(out).toMatch(/\nSinks, whose animals leave less than one each: Crane pool and Saltmarsh\.\n/);
});

describe('--json', () => {
  const found = analysisOf();

  test('is one object of the published form', () => {
    expect(fits(found), JSON.stringify(fits.errors)).toBe(true);
    expect(found).toMatchObject({ format: 'skein-analysis/1', at: 'zero', model: 'Newts in two ponds' });
  });

  test('says why a field is empty, of those fields and no others', () => {
    const empty = Object.entries(found).flatMap(([field, value]) => (value === null ? [field] : []));
    expect(Object.keys(found.reasons)).toEqual(expect.arrayContaining(empty));
  });
});

describe('--at', () => {
  test('start and equilibrium are other matrices than zero', () => {
    const [zero, start, still] = ['zero', 'start', 'equilibrium'].map((at) => analysisOf('--at', at));
    expect(zero.growthRate).toBeGreaterThan(1.01);
    expect(start.growthRate).toBeLessThan(zero.growthRate);
    expect(still.growthRate).toBeCloseTo(1, 8);
    expect([zero.at, start.at, still.at]).toEqual(['zero', 'start', 'equilibrium']);
  });

  test('takes no other word', () => {
    const { code, out, err } = skein(['analyse', ponds, '--at', 'end']);
    expect({ code, out }).toEqual({ code: 2, out: '' });
    expect(err).toMatch(/zero, equilibrium, start/);
  });

  test('where numbers never stand still, that is the reason to fail', () => {
    const { code, out, err } = skein(['analyse', 'models/share-taken.yaml', '--at', 'equilibrium']);
    expect({ code, out }).toEqual({ code: 3, out: '' });
    expect(err).toBe('--at equilibrium: Numbers do not come to stand still from the start of this model.\n');
  });
});

test('--eigenvalues lists them all, the growth rate first', () => {
  const { eigenvalues, growthRate } = analysisOf('--eigenvalues');
  expect(eigenvalues).toHaveLength(4);
  expect(eigenvalues[0].re).toBeCloseTo(growthRate, 10);
  expect(analysisOf().eigenvalues).toBeNull();
});

test('--set moves the growth rate by the sensitivity', () => {
  const growth = (litter: number): number => {
    const { out } = skein(['analyse', hare, '--json', '--set', `litter=${litter}`]);
    return JSON.parse(out).growthRate;
  };
  const { parameters } = JSON.parse(skein(['analyse', hare, '--json']).out);
  const { sensitivity } = parameters.find((one: { name: string }) => one.name === 'litter');
  expect((growth(2.501) - growth(2.499)) / 0.002).toBeCloseTo(sensitivity, 6);
});

test('--out writes a table for each list, with a dictionary of every column', () => {
  const cwd = folder();
  expect(skein(['analyse', ponds, '--out', 'here', '--quiet'], { cwd }).code).toBe(0);
  const tables = ['entries', 'growth', 'invasion', 'links', 'patches', 'states'];
  expect(filesIn(join(cwd, 'here'))).toEqual(
    [
      ...['dictionary.csv', 'log.json', 'results.json', 'run.json'],
      ...tables.flatMap((name) => [`${name}.csv`, `${name}.parquet`]),
    ].sort(),
  );
  const dictionary = readFileSync(join(cwd, 'here/dictionary.csv'), 'utf8');
  for (const name of tables) {
    const [head = ''] = readFileSync(join(cwd, `here/${name}.csv`), 'utf8').split('\n');
    for (const column of head.split(',')) expect(dictionary).toContain(`\n${name},${column},`);
  }
  const results = JSON.parse(readFileSync(join(cwd, 'here/results.json'), 'utf8'));
  expect(fits(results)).toBe(true);
});

test('the curve of falls and its simulated shares are a table of --out', () => {
  const cwd = folder();
  const drifting = `${process.cwd()}/models/drifting.yaml`;
  expect(skein(['analyse', drifting, '--out', 'here', '--quiet'], { cwd }).code).toBe(0);
  const rows = readFileSync(join(cwd, 'here/falling-below.csv'), 'utf8').trim().split('\n');
  expect(rows[0]).toBe('outcome,year,diffusion,simulated,lower,upper');
  expect(rows).toHaveLength(1 + 2 * 40);
  const { fallingBelow } = JSON.parse(readFileSync(join(cwd, 'here/results.json'), 'utf8'));
  const [outcome, year, diffusion, simulated] = rows[40]!.split(',');
  const last = fallingBelow[0].years.at(-1);
  expect([outcome, Number(year), Number(diffusion), Number(simulated)]).toEqual([
    'few nannies',
    ...[last.year, last.diffusion, last.simulated],
  ]);
});

describe('--against', () => {
  const text = readFileSync('models/drought.yaml', 'utf8');

  function dryAndWet(): string {
    const cwd = folder();
    writeFileSync(join(cwd, 'dry.yaml'), text);
    writeFileSync(join(cwd, 'wet.yaml'), text.replace('metamorphosis: 0.055', 'metamorphosis: 0.06'));
    return cwd;
  }

  function wetFound(...words: readonly string[]) {
    const { code, out, err } = skein(['analyse', 'wet.yaml', '--json', ...words], { cwd: dryAndWet() });
    expect({ code, err }).toEqual({ code: 0, err: '' });
    return JSON.parse(out);
  }

  test('another file is told apart by its numbers and by the entries', () => {
    const { ltre, growthRate } = wetFound('--against', 'dry.yaml');
    const { growthRate: before } = wetFound('--set', 'metamorphosis=0.055');
    expect(ltre.difference).toBeCloseTo(growthRate - before, 12);
    expect(ltre.difference).toBeGreaterThan(0.001);
    expect(ltre.parameters).toMatchObject([{ name: 'metamorphosis', value: 0.06, reference: 0.055 }]);
    const parts: number[] = ltre.contributions.map((one: { contribution: number }) => one.contribution);
    expect(parts.reduce((sum, part) => sum + part, ltre.unexplained)).toBeCloseTo(ltre.difference, 12);
    expect(Math.abs(ltre.unexplained)).toBeLessThan(0.01 * ltre.difference);
  });

  test('its parts are tables of --out', () => {
    const cwd = dryAndWet();
    const { code } = skein(['analyse', 'wet.yaml', '--against', 'dry.yaml', '--out', 'here', '--quiet'], { cwd });
    expect(code).toBe(0);
    const rowsOf = (name: string) =>
      readFileSync(join(cwd, `here/${name}.csv`), 'utf8')
        .trimEnd()
        .split('\n');
    const { ltre } = JSON.parse(readFileSync(join(cwd, 'here/results.json'), 'utf8'));
    const [number] = ltre.parameters;
    expect(rowsOf('number-differences')).toEqual([
      'parameter,value,reference,contribution',
      `metamorphosis,0.06,0.055,${number.contribution}`,
    ]);
    const [head, ...rows] = rowsOf('entry-differences');
    expect(head).toBe('from_patch,from_class,to_patch,to_class,difference,contribution');
    expect(rows).toHaveLength(ltre.contributions.length);
  });

  test('a file that is not there is the reason to fail', () => {
    const { code, out, err } = skein(['analyse', 'wet.yaml', '--against', 'gone.yaml'], { cwd: dryAndWet() });
    expect(code).not.toBe(0);
    expect(out).toBe('');
    expect(err).toContain('gone.yaml');
  });
});
