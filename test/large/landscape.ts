// Invented models as large as one likes: patches strewn over a plane, a life of so many classes, young that move by a kernel.
import type { DataFiles } from '../../src/spec/data/files.ts';

export interface Size {
  readonly patches: number;
  readonly classes: number;
  readonly seed?: number;
  /** Patches within the reach of the kernel, on average; 20 where it is not said. */
  readonly neighbours?: number;
  /** Without crowding numbers grow or decline for ever. */
  readonly crowded?: boolean;
}

const reachKm = 10;

export interface LargeModel {
  /** Of the spec, which names the file `patches.geojson`. */
  readonly text: string;
  readonly patches: string;
  /** The same, as a spec is read with its files. */
  readonly files: DataFiles;
}

/** The same size and seed give the same texts. */
export function largeModel({ patches, classes, seed = 1, neighbours = 20, crowded = true }: Size): LargeModel {
  const next = numbers(seed);
  const side = Math.sqrt((patches * Math.PI * reachKm * reachKm) / neighbours);
  const width = String(patches).length;
  const features = Array.from({ length: patches }, (_, p) => {
    const coordinates = [next() * side, next() * side].map((km) => Number(km.toFixed(3)));
    const [area, quality] = [Number((0.2 + 3 * next()).toFixed(2)), Number((0.7 + 0.6 * next()).toFixed(3))];
    const name = `patch ${String(p + 1).padStart(width, '0')}`;
    const properties = { name, size: area, room: Math.round(40 + 60 * area), quality };
    return { type: 'Feature', geometry: { type: 'Point', coordinates }, properties };
  });
  const map = `${JSON.stringify({ type: 'FeatureCollection', features })}\n`;
  const ages = Array.from({ length: classes }, (_, c) => `age${c}`);
  const rate = (value: (c: number) => string, from: number): string =>
    `{ ${ages
      .map((age, c) => (c < from ? '' : `${age}: ${value(c)}`))
      .filter((text) => text !== '')
      .join(', ')} }`;
  const text = `# ${patches} patches of ${classes} classes, made by a program. Everything in it is invented.
skein: 1
study: { title: A large landscape, invented: true, question: How likely is it that fewer than ${patches} animals are left in 20 years? }
first-year: 2027
years: 20
position: plane
unit: km
patches: patches.geojson
counts: females
classes: [${ages.join(', ')}]
oldest: open-ended
parameters: { daughters: 1.1, first_year: 0.42, leaving: 0.3 }
survival: ${rate((c) => (c === 0 ? 'first_year' : (0.6 + (0.25 * c) / classes).toFixed(3)), 0)}
births: ${rate(() => 'daughters * quality', 1)}
year: [count, breeding, survival, roaming, ageing]
roaming:
  kind: dispersal
  classes: [age0]
  leaving: leaving
  kernel: { shape: exponential, mean: 5 km, reach: ${reachKm} km }
  attraction: size ^ 0.5
  leavers: all arrive
  survival-on-the-way: 0.8
${crowded ? 'crowding: { form: beverton-holt, changes: { survival: [age0] }, counted: all, capacity: room, where-declining: ceiling }\n' : ''}start: { total: ${patches * 40} }
outcomes: { few: { of: all, below: ${patches} } }
run: { replicates: 100, seed: ${seed} }
`;
  return { text, patches: map, files: new Map([['patches.geojson', { ok: true, text: map }]]) };
}

/** Shares in [0, 1): a small generator, so that a text does not change with the machine. */
function numbers(seed: number): () => number {
  let state = (seed * 2654435761) >>> 0;
  return () => {
    state = (Math.imul(state ^ (state >>> 15), 2246822519) + 374761393) >>> 0;
    return ((state ^ (state >>> 13)) >>> 0) / 4294967296;
  };
}
