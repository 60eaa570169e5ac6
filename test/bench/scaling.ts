// Whether a cell costs the same whatever the size: whole animals and weather over patches, classes, replicates and years.
import { kernelRunner } from './animals.ts';
import { median, processorSeconds } from './measure.ts';
import type { Options } from './options.ts';
import { workloadOf } from './workload.ts';

export interface Scaling {
  readonly over: 'patches' | 'classes' | 'replicates' | 'years';
  readonly points: readonly { readonly at: number; readonly nanosecondsACell: number }[];
}

interface Size {
  readonly patches: number;
  readonly classes: number;
  readonly replicates: number;
  readonly years: number;
}

const middle: Size = { patches: 50, classes: 8, replicates: 64, years: 50 };

export function measureScaling({ quick, rounds }: Options): readonly Scaling[] {
  const most = quick ? 0.1 : 1;
  const lists: Readonly<Record<Scaling['over'], readonly number[]>> = {
    patches: [10, 30, 100, 300, 1000, 3000, 10_000].filter((at) => at <= 10_000 * most),
    classes: [3, 5, 8, 13, 20, 30],
    replicates: [100, 1000, 10_000, 100_000].filter((at) => at <= 100_000 * most),
    years: [10, 30, 100, 300, 1000],
  };
  return (['patches', 'classes', 'replicates', 'years'] as const).map((over) => ({
    over,
    points: lists[over].map((at) => {
      const size = { ...middle, ...(over === 'replicates' ? { patches: 4, classes: 3, years: 20 } : {}), [over]: at };
      return {
        at,
        nanosecondsACell: costOf(over === 'patches' ? { ...size, replicates: 16, years: 10 } : size, rounds),
      };
    }),
  }));
}

const fewestCells = 2e6;

function costOf(size: Size, rounds: number): number {
  const workload = workloadOf('scaling', modelText(size), { files: new Map([[mapFile, mapOf(size)]]) });
  const run = kernelRunner(workload);
  const cells = size.patches * size.classes * size.replicates * size.years;
  // Small ones again and again: until the kernel is compiled for speed, and for longer than the clock ticks.
  const turns = Math.ceil(fewestCells / cells);
  const work = (): void => {
    for (let turn = 0; turn < turns; turn++) run(size.replicates);
  };
  if (turns === 1) run(16);
  else work();
  const times = Array.from({ length: rounds }, () => processorSeconds(work));
  return (median(times) / (cells * turns)) * 1e9;
}

const mapFile = 'patches.geojson';

/** Patches in a square, in a file of their own: a spec holds no ten thousand. */
function mapOf({ patches }: Size) {
  const width = Math.ceil(Math.sqrt(patches));
  const features = Array.from({ length: patches }, (_, p) => ({
    type: 'Feature',
    geometry: { type: 'Point', coordinates: [p % width, Math.floor(p / width)] },
    properties: { name: `P${p}` },
  }));
  return { ok: true as const, text: JSON.stringify({ type: 'FeatureCollection', features }) };
}

/** Ways to the patches next to each, weather the same everywhere, about 20 animals a patch and class. */
function modelText({ patches, classes, years, replicates }: Size): string {
  const names = Array.from({ length: classes }, (_, c) => `age ${c}`);
  const all = (value: (name: string, c: number) => string): string =>
    names.map((name, c) => `${name}: ${value(name, c)}`).join(', ');
  const young = Math.max(1, classes - 2);
  return `skein: 1
study: { title: Sizes, invented: true }
first-year: 1
years: ${years}
position: plane
unit: km
patches: ${mapFile}
counts: females
classes: [${names.join(', ')}]
oldest: open-ended
survival: { ${all((_, c) => (c === 0 ? '0.6' : '0.8'))} }
births: { ${names
    .slice(-young)
    .map((name) => `${name}: 0.45`)
    .join(', ')} }
year: [breeding, count, survival, moving, ageing]
moving: { kind: dispersal, classes: [${names.join(', ')}], leaving: 0.1, kernel: { shape: exponential, mean: 1 km, reach: 1.5 km }, leavers: all arrive }
crowding: { form: beverton-holt, changes: { survival: [age 0] }, counted: { ${all(() => '1')} }, capacity: ${20 * classes}, where-declining: ceiling }
variation: { survival: { ${all(() => '{ sd: 0.05, shape: logit-normal }')} }, between-rates: 1, between-patches: 1 }
start: { total: ${patches * classes * 20} }
outcomes: { few: { of: all, below: ${patches} } }
run: { replicates: ${replicates}, seed: 1 }
`;
}
