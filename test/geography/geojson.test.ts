// Patches from GeoJSON: the same model as written inline, and the published case of three patches end to end.
import { expect, test } from 'vitest';
import { runYear } from '../../src/compile/year-map.ts';
import { distanceKm, neighboursWithin } from '../../src/landscape/distance.ts';
import { buildBlock } from '../../src/compile/block.ts';
import { leading } from '../../src/numeric/leading.ts';
import { geodesicAreaKm2, geodesicKm } from '../../src/numeric/geodesic.ts';
import { compileSpec } from '../../src/pipeline.ts';
import { printSpec } from '../../src/spec/print.ts';
import { readSpec } from '../../src/spec/read.ts';

type Position = readonly [number, number];

function compiled(text: string, geojson: unknown) {
  const read = readSpec(
    text,
    'model.yaml',
    new Map([['patches.geojson', { ok: true, text: JSON.stringify(geojson) }]]),
  );
  if (read.document === undefined) throw new Error(read.diagnostics.map((one) => one.message).join('\n'));
  const compilation = compileSpec(read.document.spec);
  if (compilation.compiled === null) throw new Error(compilation.findings.map((one) => one.message).join('\n'));
  return { ...read, ...compilation.compiled, findings: compilation.findings };
}

function square([x, y]: Position, side: number): readonly Position[] {
  const h = side / 2;
  return [
    [x - h, y - h],
    [x + h, y - h],
    [x + h, y + h],
    [x - h, y + h],
    [x - h, y - h],
  ];
}

function feature(name: string, geometry: unknown, properties: object = {}) {
  return { type: 'Feature', properties: { name, ...properties }, geometry };
}

function collection(...features: readonly unknown[]) {
  return { type: 'FeatureCollection', features };
}

const threePatches = `skein: 1
study: { title: Three patches }
years: 1
position: plane
unit: km
patches: patches.geojson
counts: females
classes: [newborn, adult]
oldest: open-ended
demography: { fates: [[0, 0], [first, later]], births: [[0, young], [0, 0]] }
year: [count, demography, natal]
natal:
  kind: dispersal
  classes: [newborn]
  leaving: 0.2
  kernel: { shape: exponential, scale: 5 km }
  attraction: area
  leavers: all arrive
  survival-on-the-way: 0.9
start: { table: { a: { newborn: 10, adult: 20 }, b: { newborn: 5, adult: 10 } } }
`;

// Derived by hand and by two independent programs: three patches at (0,0), (10,0), (0,20) km with areas 4, 9, 1 km²; weights
// A exp(−d / 5) over the other patches; demography (young, survival of newborn, of adults) as below, counted after breeding.
test('three patches as squares on a plane give the matrix that was worked out for them', () => {
  const rates = [
    { young: 1.2, first: 0.3, later: 0.8 },
    { young: 0.9, first: 0.25, later: 0.75 },
    { young: 1.5, first: 0.3, later: 0.8 },
  ];
  const places: readonly Position[] = [
    [0, 0],
    [10, 0],
    [0, 20],
  ];
  const features = ['a', 'b', 'c'].map((name, i) => {
    const ring = square(places[i] ?? [NaN, NaN], [2, 3, 1][i] ?? NaN);
    return feature(name, { type: 'Polygon', coordinates: [ring] }, rates[i]);
  });
  const model = compiled(threePatches, collection(...features));
  expect(model.model.patches.map((patch) => [patch.at, patch.areaKm2])).toEqual([
    [[0, 0], 4],
    [[10, 0], 9],
    [[0, 20], 1],
  ]);
  const after = runYear(model, model.startAnimals).after;
  const expected = [20.78652263, 19, 11.45600143, 8.75, 0.09747594, 0];
  expected.forEach((animals, i) => expect(after[i]).toBeCloseTo(animals, 7));
  expect(leading(buildBlock(model, 'zero').matrix).growthRate).toBeCloseTo(1.1217749866, 9);
  let animals = model.startAnimals;
  for (let year = 0; year < 20; year++) animals = runYear(model, animals).after;
  expect(animals.reduce((sum, one) => sum + one, 0)).toBeCloseTo(238.99057032, 6);
});

const twoFens = `skein: 1
study: { title: Two fens }
years: 1
position: longitude-latitude
patches: patches.geojson
counts: females
classes: [newborn, adult]
oldest: open-ended
survival: { newborn: 0.4, adult: 0.5 + cover }
births: { adult: 1.2 }
year: [count, breeding, survival, ageing]
start: { total: 80 }
`;

const holm = square([9.1, 54.2], 0.02);
const saltmarsh = square([9.2, 54.25], 0.04);
const twoFeatures = collection(
  feature(
    'Saltmarsh',
    { type: 'MultiPolygon', coordinates: [[saltmarsh, square([9.2, 54.25], 0.01)]] },
    { cover: 0.2 },
  ),
  feature(
    'Holm',
    { type: 'Polygon', coordinates: [holm.map((place) => [...place, 12])] },
    { cover: 0.1, capacity: 60 },
  ),
  feature('Pond', { type: 'Point', coordinates: [9.3, 54.2] }, { cover: 0.1, area: '3 ha', owner: 'parish' }),
);

test('degrees: areas with holes, middles, distances and attributes', () => {
  const { model, findings, diagnostics } = compiled(twoFens, twoFeatures);
  expect(findings).toEqual([]);
  expect(diagnostics.map((one) => one.code)).toEqual(['left-out-property']);
  const [a, b, c] = model.patches;
  if (a === undefined || b === undefined || c === undefined) throw new Error('Three patches were expected.');
  expect([a.name, b.name, c.name]).toEqual(['Holm', 'Pond', 'Saltmarsh']);
  const hole = geodesicAreaKm2(square([9.2, 54.25], 0.01));
  expect(c.areaKm2).toBeCloseTo(geodesicAreaKm2(saltmarsh) - hole, 9);
  expect(b.areaKm2).toBe(0.03);
  expect(a.degrees?.[0]).toBeCloseTo(9.1, 9);
  expect(a.degrees?.[1]).toBeCloseTo(54.2, 6);
  expect(distanceKm(a, b)).toBe(geodesicKm(a.degrees ?? [0, 0], [9.3, 54.2]));
  expect(distanceKm(a, c)).toBeCloseTo(8.574, 3);
});

test('nearest edges: between squares along one parallel, to a point, and within reach only', () => {
  const { model } = compiled(twoFens, twoFeatures);
  const request = { patches: model.patches, between: 'nearest edges' as const };
  const all = neighboursWithin({ ...request, reachKm: null });
  const km = (from: number, to: number): number => all[from]?.find((one) => one.patch === to)?.km ?? NaN;
  expect(km(0, 1)).toBeCloseTo(geodesicKm([9.11, 54.2], [9.3, 54.2]), 3);
  expect(km(0, 2)).toBe(geodesicKm([9.11, 54.21], [9.18, 54.23]));
  expect(km(2, 0)).toBe(km(0, 2));
  const reachKm = km(0, 2) + 1e-6;
  const near = neighboursWithin({ ...request, reachKm });
  expect(near.map((list) => list.map((one) => one.patch))).toEqual([[2], [], [0]]);
});

test('what files hold, printed, reads back without them to the same spec and the same hash', () => {
  const { document, provenance } = compiled(twoFens, twoFeatures);
  if (document === undefined) throw new Error('The spec was not read.');
  const again = readSpec(printSpec(document.spec), 'printed.yaml');
  expect(again.wants).toEqual([]);
  expect(again.document?.spec).toEqual(document.spec);
  if (again.document === undefined) throw new Error('The print was not read.');
  expect(compileSpec(again.document.spec).compiled?.provenance.hash).toBe(provenance.hash);
});

test('the order of features changes nothing, their contents change the hash', () => {
  const { features } = twoFeatures;
  const turned = compiled(twoFens, collection(...features.toReversed()));
  const first = compiled(twoFens, twoFeatures);
  const bare = (model: typeof first.model) => model.patches.map((patch) => ({ ...patch, fileOrder: 0 }));
  expect(bare(turned.model)).toEqual(bare(first.model));
  const moved = JSON.parse(JSON.stringify(twoFeatures).replace('9.3', '9.31')) as unknown;
  expect(compiled(twoFens, moved).provenance.hash).not.toBe(first.provenance.hash);
});
