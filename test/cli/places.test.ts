// Hidden places stand nowhere in what is written: not in a page, its data, its pictures or its text, nor in a table or a run.json.
import { appendFileSync, cpSync, readFileSync, readdirSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { csvParse } from 'd3';
import { describe, expect, test } from 'vitest';
import { compileModel } from '../golden/models.ts';
import { filesIn, folder, root, skein } from './skein.ts';

const few = ['--replicates', '32', '--years', '4'];

/** A folder with a model and its data, whose places stand in a file with a comment and more columns. */
function study(): string {
  const cwd = folder();
  for (const name of ['dune-toad.yaml', 'dune-toad', 'road.yaml', 'drought.yaml'])
    cpSync(join(root, 'models', name), join(cwd, name), { recursive: true });
  const map = join(cwd, 'dune-toad/slacks.geojson');
  writeFileSync(map, readFileSync(map, 'utf8').replaceAll('"properties": {', '"properties": { "easting": 431277.25,'));
  // A secret of its own, so that no digits of a moved place are those of a true one by chance.
  writeFileSync(join(cwd, 'dune-toad.places-key'), `${'0123456789abcdef'.repeat(4)}\n`);
  appendFileSync(join(cwd, 'dune-toad.yaml'), '# The den lies at 431277.25, under the third dune.\n');
  return cwd;
}

/** Every coordinate and measured area of a model, as anything could have written it, and what the author said of places. */
function tellTales(name: string): readonly string[] {
  const { patches } = compileModel(name).model;
  const numbers = patches.flatMap(({ at, degrees, outline, degreesOutline, areaKm2 }) => [
    ...[at ?? [], degrees ?? [], outline?.flat(3) ?? [], degreesOutline?.flat(3) ?? []].flat(),
    ...(areaKm2 === null ? [] : [areaKm2]),
  ]);
  const texts = new Set(numbers.flatMap((one) => [String(one), String(Number(one.toPrecision(4)))]));
  // Shorter ones stand anywhere by chance.
  return [...[...texts].filter((text) => text.replace(/[-.]/g, '').length >= 4), '431277', 'third dune'];
}

function written(cwd: string, path: string): string {
  const whole = join(cwd, path);
  if (!statSync(whole).isDirectory()) return readFileSync(whole, 'latin1');
  const texts = readdirSync(whole).map((file) => readFileSync(join(whole, file), 'latin1'));
  // The clock of log.json can show any digits.
  return texts.join('\n').replace(/"(started|seconds)": [^\n]+/gu, '');
}

/** A link with a length of its own, and a plan that tells another one, an area, and what a kilometre costs. */
const dens = `skein: 1
study: { title: Two dens, invented: true }
first-year: 2027
years: 4
position: plane
unit: km
patches: [{ name: Low bank, at: [0, 0], capacity: 40, area: 51 ha }, { name: High bank, at: [3, 2], capacity: 50, area: 61 ha }]
counts: females
classes: [young, adult]
oldest: open-ended
survival: { young: 0.5, adult: 0.7 }
births: { adult: 1.2 }
year: [count, breeding, survival, roaming, ageing]
roaming:
  kind: dispersal
  classes: [young]
  leaving: 0.2
  kernel: { shape: exponential, mean: 3 km }
  leavers: all arrive
  links: [{ between: [Low bank, High bank], crossing-death: 0.1, distance: 6.487 km }]
start: { total: 60 }
outcomes: { few: { of: [adult], below: 10 } }
money: { currency: crowns }
actions:
  way: { kind: link, between: [Low bank, High bank], distance: { set: 4.771 km }, from: 2027, cost: { once: 150, per-km: 1000 } }
  land: { kind: habitat, in: Low bank, area: { set: 7.3119 ha }, from: 2027 }
scenarios: { plan: [way, land] }
run: { replicates: 32, seed: 1 }
`;

interface View {
  readonly places?: string;
  readonly patches: readonly {
    readonly name: string;
    readonly at: readonly [number, number] | null;
    readonly outline: null;
  }[];
  readonly links: readonly { readonly animals: readonly number[] }[];
}

function viewIn(page: string): View {
  const json = /<script type="application\/json" id="view">(.*?)<\/script>/s.exec(page)?.[1] ?? '';
  return JSON.parse(json) as View;
}

describe.each(['shifted', 'schematic'])('--places %s', (places) => {
  test('leaves no place, outline, exact area or comment in anything that is written', () => {
    const cwd = study();
    const told = tellTales('dune-toad');
    expect(told.length).toBeGreaterThan(50);
    const exact = skein(['report', 'dune-toad.yaml', ...few, '-o', 'exact.html', '--quiet'], { cwd });
    expect(exact).toMatchObject({ code: 0, err: '' });
    const page = written(cwd, 'exact.html');
    expect(told.filter((one) => page.includes(one)).length).toBeGreaterThan(20);

    const out = ['--places', places, '--quiet'];
    expect(skein(['report', 'dune-toad.yaml', ...few, '-o', 'page.html', ...out], { cwd })).toMatchObject({
      code: 0,
      err: '',
    });
    expect(skein(['run', 'dune-toad.yaml', ...few, '--out', 'run', ...out], { cwd })).toMatchObject({
      code: 0,
      err: '',
    });
    expect(skein(['path', 'dune-toad.yaml', '--years', '4', '--out', 'path', ...out], { cwd })).toMatchObject({
      code: 0,
      err: '',
    });
    for (const path of ['page.html', 'run', 'path']) {
      const text = written(cwd, path);
      expect(
        told.filter((one) => text.includes(one)),
        path,
      ).toEqual([]);
    }
    const view = viewIn(written(cwd, 'page.html'));
    expect(view.places).toBe(places);
    expect(view.patches.every(({ outline }) => outline === null)).toBe(true);
    expect(view.patches.every(({ at }) => (at === null) === (places === 'schematic'))).toBe(true);
    // One number for all years, in steps that no distance can be worked back from.
    const flows = view.links.map(({ animals: [, ...years] }) => [...new Set(years)]);
    expect(flows.length).toBeGreaterThan(3);
    for (const flow of flows) expect(String(flow)).toMatch(/^0?\.?[125]0*$/);
  });

  test('its run.json says so, has the hash of the page and refuses to be run without the places', () => {
    const cwd = study();
    const words = ['dune-toad.yaml', ...few, '--places', places, '--quiet'];
    skein(['report', ...words, '-o', 'page.html'], { cwd });
    skein(['run', ...words, '--out', 'run'], { cwd });
    const inputs = JSON.parse(written(cwd, 'run/run.json')) as { readonly places: string; readonly hash: string };
    expect(inputs.places).toBe(places);
    expect(written(cwd, 'page.html')).toContain(inputs.hash);
    expect(inputs.hash).not.toBe(compileModel('dune-toad', { replicates: 32, years: 4 }).provenance.hash);
    const again = skein(['run', '--again', 'run/run.json'], { cwd });
    expect(again.code).toBe(1);
    expect(again.err).toContain('the places of its patches are hidden');
  });

  test('hides the lengths of ways, too', () => {
    const cwd = study();
    skein(['report', 'road.yaml', ...few, '-o', 'exact.html', '--quiet'], { cwd });
    expect(written(cwd, 'exact.html')).toMatch(/the way is [\d.]+ km long/);
    skein(['report', 'road.yaml', ...few, '-o', 'page.html', '--places', places, '--quiet'], { cwd });
    const page = written(cwd, 'page.html');
    expect(page).not.toMatch(/the way is|distance: /);
    expect(page).toMatch(/a share of [\d.]+ turns back/);
    const plan = `actions:
  larger copse: { kind: habitat, in: Mill copse, capacity: { add: 20 } }
scenarios: { larger: [larger copse] }
`;
    appendFileSync(join(cwd, 'road.yaml'), plan);
    skein(['report', 'road.yaml', ...few, '-o', 'plans.html', '--places', places, '--quiet'], { cwd });
    const plans = written(cwd, 'plans.html');
    expect(plans).toContain('larger copse');
    expect(plans).not.toMatch(/the way is|distance: /);
    expect(plans).toMatch(/a share of [\d.]+ turns back/);
  });

  test('and those that plans lay, with exact areas and the price of a kilometre, wherever plans are compared', () => {
    const cwd = folder();
    writeFileSync(join(cwd, 'dens.yaml'), dens);
    const secret = /6\.487|4\.771|7\.3119|per-km/u;
    const hide = ['--places', places, '--quiet'];
    expect(skein(['compare', 'dens.yaml', '--quiet'], { cwd }).out).toMatch(secret);
    const told = skein(['compare', 'dens.yaml', '--out', 'compared', ...hide], { cwd });
    const json = skein(['compare', 'dens.yaml', '--json', ...hide], { cwd });
    skein(['report', 'dens.yaml', '-o', 'page.html', ...hide], { cwd });
    const { hash } = JSON.parse(written(cwd, 'compared/run.json')) as { readonly hash: string };
    for (const text of [told.out, json.out, written(cwd, 'compared'), written(cwd, 'page.html')]) {
      expect(text).not.toMatch(secret);
      expect(text).toContain(hash.slice(0, 16));
    }
    expect(told.out).toContain('the way between Low bank and High bank changes, from 2027');
  });
});

describe('--places shifted', () => {
  const words = ['run', 'drought.yaml', ...few, '--places', 'shifted'];
  const places = (cwd: string, out: string) =>
    csvParse(readFileSync(join(cwd, out, 'patches.csv'), 'utf8')).map(({ patch, x, y }) => ({
      patch,
      x: Number(x),
      y: Number(y),
    }));

  test('moves each patch by a secret beside the model, whatever the seed, and alike each time', () => {
    const cwd = study();
    const { code, err } = skein([...words, '--out', 'one'], { cwd });
    expect(code).toBe(0);
    expect(err).toContain('Made drought.places-key, the secret by which places are moved.');
    const key = readFileSync(join(cwd, 'drought.places-key'), 'utf8');
    expect(key).toMatch(/^[0-9a-f]{64}\n$/);
    expect(statSync(join(cwd, 'drought.places-key')).mode & 0o077).toBe(0);
    expect(skein([...words, '--seed', '99', '--out', 'two'], { cwd }).err).toBe('');
    expect(places(cwd, 'two')).toEqual(places(cwd, 'one'));
    for (const file of filesIn(join(cwd, 'one'))) expect(written(cwd, `one/${file}`)).not.toContain(key.trim());

    writeFileSync(join(cwd, 'drought.places-key'), `${'0123456789abcdef'.repeat(4)}\n`);
    skein([...words, '--out', 'three'], { cwd });
    expect(places(cwd, 'three')).not.toEqual(places(cwd, 'one'));
  });

  test('moves each by no less and no more than it says, once the middles are laid on each other', () => {
    const cwd = study();
    skein([...words, '--out', 'out'], { cwd });
    const exact = compileModel('drought').model.patches;
    const moved = places(cwd, 'out').map(({ patch, x, y }) => {
      const [x0 = 0, y0 = 0] = exact.find(({ name }) => name === patch)?.at ?? [];
      return [x - x0, y - y0] as const;
    });
    // All share one unknown displacement of the whole; differences between patches are those of two moves of at most 2 km.
    const apart = moved.flatMap(([x, y]) => moved.map(([u, v]) => Math.hypot(x - u, y - v)));
    expect(Math.max(...apart)).toBeGreaterThan(0.1);
    expect(Math.max(...apart)).toBeLessThanOrEqual(4.02);
  });

  test('a secret that is none is told with its file', () => {
    const cwd = study();
    writeFileSync(join(cwd, 'drought.places-key'), 'secret\n');
    const { code, err } = skein(words, { cwd });
    expect(code).toBe(1);
    expect(err).toContain(
      'Cannot read drought.places-key, the secret that moves places: it does not hold 64 hexadecimal digits.',
    );
  });
});

describe('exact places', () => {
  test('warn where something is written, unless the case is invented', () => {
    const cwd = study();
    const text = readFileSync(join(cwd, 'drought.yaml'), 'utf8');
    expect(skein(['run', 'drought.yaml', ...few, '--out', 'out'], { cwd }).err).not.toContain('exactly where');
    writeFileSync(join(cwd, 'drought.yaml'), text.replace('invented: true', 'invented: false'));
    expect(skein(['run', 'drought.yaml', ...few, '--out', 'out'], { cwd }).err).toContain(
      'tells exactly where the patches are',
    );
    expect(skein(['run', 'drought.yaml', ...few], { cwd }).err).not.toContain('exactly where');
    const page = skein(['report', 'drought.yaml', ...few, '-o', '-'], { cwd });
    expect(page.err).toContain('--places shifted or --places schematic');
    expect(page.out).toContain('This page tells exactly where the patches are');
  });
});
