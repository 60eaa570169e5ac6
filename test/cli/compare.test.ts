// skein compare as it is typed: its text, its JSON, its tables, and what it says where there is nothing to compare.
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import type { Comparison } from '../../src/compare/results.ts';
import { compareText } from '../../src/report/compare/compare-text.ts';
import { filesIn, folder, skein } from './skein.ts';

const text = `skein: 1
study: { title: Two ponds, invented: true }
years: 12
first-year: 2027
patches: [{ name: Pond, capacity: 30 }, { name: Marsh, capacity: 20 }]
counts: females
classes: [newborn, adult]
oldest: open-ended
survival: { newborn: 0.3, adult: 0.6 }
births: { adult: 2.4, female-share: 0.5 }
year: [count, breeding, survival, ageing]
crowding: { form: beverton-holt, changes: { survival: [newborn] }, counted: { adult: 1 }, capacity: capacity, where-declining: ceiling }
start: { table: { Pond: { adult: 12 }, Marsh: { adult: 9 } } }
outcomes: { few: { of: [adult], below: 6 } }
money: { currency: crowns, discount: 3 % }
actions:
  fence: { kind: change, in: Pond, rates: { survival: { newborn: { times: 1.2 } } }, cost: { once: 1000, yearly: 100 } }
  moves: { kind: move, from: Pond, to: Marsh, number: { adult: 2 }, after: survival, years: [2028], cost: { per-animal: 50 } }
  posters: { kind: change, rates: { survival: { adult: { times: 1 } } }, cost: { once: [400, 600] } }
  quota: { kind: take, share: 0.02, classes: [adult], counted: each patch, before: breeding }
scenarios:
  fence: [fence]
  fence and moves: [fence, moves]
  posters: [posters]
  quota: [quota]
run: { replicates: 400, seed: 5 }
`;

const place = mkdtempSync(join(tmpdir(), 'skein-plans-'));
const model = join(place, 'ponds.yaml');
writeFileSync(model, text);
afterAll(() => rmSync(place, { recursive: true, force: true }));

interface Compared {
  readonly scenarios: readonly {
    readonly name: string;
    readonly cost: {
      readonly presentValue: number;
      readonly undiscounted: number;
      readonly least: number;
      readonly most: number;
    };
    readonly notBeaten: boolean;
    readonly prices: readonly { readonly why: string }[];
  }[];
  readonly differences: readonly {
    readonly outcome: string;
    readonly from: string;
    readonly to: string;
    readonly estimate: number;
    readonly interval: { readonly lower: number; readonly upper: number };
  }[];
  readonly robustness: readonly {
    readonly variant: string;
    readonly notRun: string | null;
    readonly holds: boolean | null;
  }[];
  readonly sources: readonly { readonly source: string; readonly stopBelow: number }[];
  readonly precision?: { readonly halfWidth: number; readonly reached: boolean };
  readonly replicates: number;
}

function compared(...words: readonly string[]): Compared {
  const { code, out, err } = skein(['compare', model, '--json', '--quiet', ...words]);
  expect([code, err]).toEqual([0, '']);
  return JSON.parse(out) as Compared;
}

describe('skein compare', () => {
  test('begins with what the results support, and warns where animals are moved or taken', () => {
    const { code, out } = skein(['compare', model, '--quiet']);
    expect(code).toBe(0);
    const words = out.replace(/\s+/g, ' ');
    expect(words).toMatch(/^Two ponds The results support “fence”: a chance of “few” of/);
    expect(words).toContain('Strength: limited');
    expect(words).toMatch(/posters none 0\.0 to 0\.0 the same no reliable gain/);
    expect(words).toContain('takes animals from Pond (“moves”)');
    expect(words).toMatch(/“[^”]+”, moves: \d+\.\d \w+ moved over \d+ years in the mean/);
    expect(words).toContain('An exit rule to start from: stop catching when fewer than');
    expect(words).toContain('after IUCN/SSC 2013');
    expect(words).toContain('is decided by the wildlife authority');
    expect(words).toContain('Nothing is counted after 2038');
  });

  test('tells pairs, other outcomes and patches only where they are asked for', () => {
    const [short, long] = [[], ['--details']].map((more) => skein(['compare', model, '--quiet', ...more]).out);
    const kept = short!.split('\n').filter((line) => !line.startsWith('With `--details`'));
    expect(long!.split('\n')).toEqual(expect.arrayContaining(kept));
    for (const told of [
      'quota against posters',
      'fence against as now',
      'how often best in',
      'Patches that gain or lose',
      'lowest count',
    ]) {
      expect(short).not.toContain(told);
      expect(long).toContain(told);
    }
  });

  test.each([80, 100])('no line of it is wider than %i', (width) => {
    const { out } = skein([
      'compare',
      'models/reed-hare.yaml',
      '--json',
      '--quiet',
      '--replicates',
      '60',
      '--draws',
      '3',
    ]);
    for (const details of [true, false]) {
      const told = compareText(JSON.parse(out) as Comparison, { colour: false, animals: 'females', width, details });
      expect(Math.max(...told.split('\n').map((line) => line.length))).toBeLessThanOrEqual(width);
    }
  });

  test('--only takes some of the plans, which differ as they do among all', () => {
    const few = compared('--only', 'quota', '--only', 'fence');
    expect(few.scenarios.map(({ name }) => name)).toEqual(['as now', 'fence', 'quota']);
    const all = compared().differences.filter(({ from, to }) => ![from, to].some((one) => /posters|moves/.test(one)));
    expect(few.differences).toEqual(all);
    const { code, err } = skein(['compare', model, '--only', 'fance']);
    expect([code, err]).toEqual([2, '--only fance: the model has no plan `fance`. Did you mean `fence`?\n']);
  });

  test('--again gives the same bytes in every file but the log', () => {
    const cwd = folder();
    const few = ['--only', 'fence', '--only', 'posters', '--replicates', '60', '--seed', '8', '--robust'];
    const first = skein(['compare', model, ...few, '--quiet', '--out', 'out'], { cwd });
    expect(first.code).toBe(0);
    expect(first.out).toContain('Would another sound model reverse the order?');
    expect(skein(['compare', '--again', 'out/run.json', '--quiet', '--out', 'again'], { cwd })).toEqual(first);
    for (const file of filesIn(join(cwd, 'out')).filter((one) => one !== 'log.json')) {
      expect(readFileSync(join(cwd, 'again', file)), file).toEqual(readFileSync(join(cwd, 'out', file)));
    }
    for (const words of [[model], ['--only', 'fence'], ['--robust']])
      expect(skein(['compare', '--again', 'out/run.json', ...words], { cwd }).code).toBe(2);
    expect(skein(['run', '--again', 'out/run.json'], { cwd }).err).toContain('it belongs to `skein compare`');
  });

  // By hand: 1000 + 100 Σ 1.03^-t for t from 0 to 11.
  test('tells money now and undiscounted, with the range of prices', () => {
    const { scenarios } = compared();
    const [now, fence, , posters] = scenarios;
    expect(now!.cost).toMatchObject({ presentValue: 0, undiscounted: 0 });
    expect(fence!.cost.undiscounted).toBeCloseTo(2200, 9);
    expect(fence!.cost.presentValue).toBeCloseTo((100 * (1 - 1.03 ** -12)) / (1 - 1 / 1.03) + 1000, 6);
    expect(posters!.cost).toMatchObject({ presentValue: 500, least: 400, most: 600 });
    expect(posters!.notBeaten).toBe(false);
  });

  test('a plan without effect differs by exactly zero', () => {
    const found = compared().differences.filter(({ from, to }) => from === 'as now' && to === 'posters');
    expect(found.map(({ outcome, estimate }) => [outcome, outcome === 'cost' || estimate === 0])).toEqual(
      ['few', 'animals at the end', 'lowest count', 'animals taken', 'cost'].map((outcome) => [outcome, true]),
    );
    expect(found.find(({ outcome }) => outcome === 'few')!.interval).toMatchObject({ lower: 0, upper: 0 });
  });

  test('says what a move does to its source', () => {
    const { sources } = compared();
    expect(sources).toHaveLength(1);
    expect(sources[0]!.source).toBe('Pond');
    expect(sources[0]!.stopBelow).toBeGreaterThan(0);
  });

  test('gives the same bytes for any number of threads', () => {
    const run = (threads: string) => skein(['compare', model, '--json', '--quiet', '--threads', threads]).out;
    expect(run('2')).toBe(run('1'));
  });

  test('--precision goes on until differences are that sharp', () => {
    const { precision, replicates, differences } = compared('--precision', '0.02');
    expect(precision).toMatchObject({ reached: true });
    expect(replicates).toBeGreaterThan(400);
    const few = differences.filter(({ outcome }) => outcome === 'few');
    expect(few).toHaveLength(10);
    for (const { interval } of few) expect((interval.upper - interval.lower) / 2).toBeLessThanOrEqual(0.02);
    const short = compared('--precision', '0.001', '--at-most', '1000');
    expect(short.precision).toMatchObject({ reached: false });
    expect(short.replicates).toBe(1000);
  });

  test('--robust asks other models, and names those that do not apply', () => {
    const { robustness } = compared('--robust');
    expect(robustness.map(({ variant, holds }) => [variant, holds !== null])).toEqual([
      ['the other answer to where leavers end', false],
      ['half the correlation between patches', false],
      ['double the correlation between patches', false],
      ['another form of crowding', true],
      ['a second threshold', true],
      ['plans with half their effect', true],
      ['plans without any effect', true],
    ]);
    expect(robustness.at(-1)!.holds).toBe(false);
    for (const { notRun, holds } of robustness) expect(notRun === null).toBe(holds !== null);
  });

  test('--out writes tables with a dictionary', () => {
    const cwd = folder();
    expect(skein(['compare', model, '--quiet', '--out', 'out'], { cwd }).code).toBe(0);
    const files = readdirSync(join(cwd, 'out'));
    expect(files).toEqual(
      expect.arrayContaining(['plans.csv', 'plan_differences.parquet', 'dictionary.csv', 'run.json']),
    );
    const [head, ...rows] = readFileSync(join(cwd, 'out/plan_differences.csv'), 'utf8').trim().split('\n');
    expect(head).toMatch(/^outcome,from,to,difference,lower,upper/);
    expect(rows.length).toBe(10 * 5);
  });

  test('a model without plans is told what to write', () => {
    const { code, err } = skein(['compare', 'models/two-ponds.yaml', '--quiet']);
    expect(code).toBe(1);
    expect(err).toContain('name some under `scenarios`');
  });
});

test('skein report of a model with plans writes the page of their comparison', () => {
  const cwd = folder();
  const { code } = skein(['report', model, '-o', 'page.html', '--replicates', '100', '--quiet'], { cwd });
  expect(code).toBe(0);
  const page = readFileSync(join(cwd, 'page.html'), 'utf8');
  expect(page).toContain('Who signs');
  expect(page).toContain('What handling animals comes to');
  expect(page).toContain('Would another sound model reverse it?');
  expect(
    skein(['report', model, '-o', 'one.html', '--scenario', 'fence', '--replicates', '50', '--quiet'], { cwd }).code,
  ).toBe(0);
  expect(readFileSync(join(cwd, 'one.html'), 'utf8')).not.toContain('Who signs');
  expect(page).not.toContain('Windows of criterion E');
  const gone = text
    .replace('outcomes: {', 'outcomes: { gone: { of: [newborn, adult], below: 1 },')
    .replace('years: 12', 'years: 40');
  writeFileSync(join(cwd, 'gone.yaml'), gone);
  expect(skein(['report', 'gone.yaml', '-o', 'gone.html', '--replicates', '60', '--quiet'], { cwd }).code).toBe(0);
  const told = /<section[^>]*id="criterion-e".*?<\/section>/su.exec(readFileSync(join(cwd, 'gone.html'), 'utf8'))?.[0];
  // Elsewhere two patches without dispersal are alike, so that neither leads.
  expect([...(told ?? '').matchAll(/<h3><bdi>(.*?)<\/bdi>/gu)].map(([, name]) => name)).toEqual([
    'fence',
    'fence and moves',
  ]);
  expect(told?.match(/the threshold of Endangered/gu)).toHaveLength(2);
  expect(told).toContain('there are no windows: “as now”, “posters”, “quota”.');
});

describe('what is said of outcomes and of animals that are handled', () => {
  const [replicates, gone] = [
    'replicates: 400',
    'outcomes: { few: { of: [adult], below: 6 }, gone: { of: all, below: 1 } }',
  ];
  const two = ['--only', 'as now', '--only', 'fence'];
  const written = text.replace(/^outcomes: .*$/mu, gone).replace(replicates, 'replicates: 20');

  test('with --details the windows of criterion E, of each plan', () => {
    const printed = skein(['compare', '-', ...two, '--details', '--quiet'], { input: written }).out;
    const out = printed.replaceAll(/\s+/gu, ' ');
    const leads = [...out.matchAll(/“([^”]+)”: Windows of criterion E of the IUCN Red List/gu)].map(([, name]) => name);
    expect(leads).toEqual(['fence']);
    // Two ponds alike that nobody leaves have no one stable distribution, so no one generation length.
    expect(out).toContain('Without a single generation length there are no windows: “as now”.');
    expect(out.match(/looks less far ahead than the threshold of Vulnerable/gu)).toHaveLength(1);
    expect(out.match(/is for assessors to say/gu)).toHaveLength(1);
    const { scenarios } = JSON.parse(
      skein(['compare', '-', ...two, '--json', '--quiet'], { input: written }).out,
    ) as Comparison;
    expect(scenarios.map(({ criterionE }) => criterionE?.windows.length)).toEqual([undefined, 3]);
  });

  test('one caution for all plans on what people do with animals', () => {
    const { out } = skein(['compare', '-', '--json', '--quiet'], { input: written });
    const { cautions } = JSON.parse(out) as Comparison;
    const said = cautions.filter((one) => /IUCN\/SSC/u.test(one));
    expect(said).toHaveLength(1);
    expect(said[0]).toContain('(“moves”, “quota”)');
  });

  test('that a comparison and a sweep split no futures, unless quiet', () => {
    const rare = written.replace('replicates: 20', 'replicates: 100, rare: true');
    const compare = ['compare', '-', ...two];
    expect(skein(compare, { input: rare }).err).toContain(
      'A comparison goes by plain runs, so `rare` has no part in it',
    );
    expect(skein([...compare, '--quiet'], { input: rare }).err).toBe('');
    const sweep = ['sweep', '-', '--over', 'share=0.1:0.2', '--plan'];
    const input = rare.replace('survival: { newborn: 0.3', 'parameters: { share: 0.3 }\nsurvival: { newborn: share');
    expect(skein(sweep, { input }).err).toContain('A sweep goes by plain runs, so `rare` has no part in it');
  });
});
