// Animals that move between patches each year: the mean abundance of all futures, spread over the classes as on the path
// without chance, taken through one mean year. A mean of movements would differ a little where crowding bends.
import { runYear, type Compiled } from '../compile/year-map.ts';
import { forEachEntry, type SparseMatrix } from '../numeric/sparse.ts';
import type { PathResults } from '../results/results.ts';
import type { ReportInput } from './input.ts';

export interface LinkFlow {
  readonly from: number;
  readonly to: number;
  /** By count; 0 at the start. */
  readonly animals: Float64Array;
}

/** Every link that a leaver could take, the unused too. Null where movement cannot be worked out. */
export function estimateMovement(input: ReportInput): readonly LinkFlow[] | null {
  const { model, landscape, path, results } = input;
  const coefficients = input.coefficients ?? [];
  if (path === undefined || coefficients.length < model.crowding.length) return null;
  const shares = classShares(path, input);
  const counts = results.abundance.whole.length;
  const links = new Map<number, LinkFlow>();
  for (let count = 1; count < counts; count++) {
    const state = meanState(input, shares, count - 1);
    forEachArrival({ model, landscape, coefficients }, state, count, (from, to, arrive) => {
      const link = links.get(from * model.patches.length + to) ?? { from, to, animals: new Float64Array(counts) };
      link.animals[count] = (link.animals[count] ?? 0) + arrive;
      links.set(from * model.patches.length + to, link);
    });
  }
  return [...links.values()];
}

type Arrival = (from: number, to: number, animals: number) => void;

function forEachArrival(compiled: Compiled, before: Float64Array, step: number, arrival: Arrival): void {
  const { phases, classes } = compiled.model;
  const year = runYear(compiled, before, step);
  year.maps.forEach((map, index) => {
    const state = year.before[index];
    if (phases[index]?.kind === 'dispersal' && state !== undefined) tellMoves(map, state, classes.length, arrival);
  });
}

function tellMoves(map: SparseMatrix, state: Float64Array, classes: number, arrival: Arrival): void {
  forEachEntry(map, (row, column, share) => {
    const [to, from] = [Math.floor(row / classes), Math.floor(column / classes)];
    if (to !== from) arrival(from, to, share * (state[column] ?? 0));
  });
}

function meanState({ model, results }: ReportInput, shares: Float64Array, count: number): Float64Array {
  const classes = model.classes.length;
  const block = model.patches.length * classes;
  const byName = new Map(results.abundance.patches.map((patch) => [patch.patch, patch.byYear]));
  const state = new Float64Array(block);
  model.patches.forEach((patch, p) => {
    const mean = byName.get(patch.name)?.[count]?.mean ?? 0;
    for (let c = 0; c < classes; c++) state[p * classes + c] = mean * (shares[count * block + p * classes + c] ?? 0);
  });
  return state;
}

/** Share of each class in its patch at each count, at (count * P + p) * C + c; of the whole where the patch is empty. */
function classShares(path: PathResults, { model, results }: ReportInput): Float64Array {
  const [patches, classes] = [model.patches.length, model.classes.length];
  const count = new Map(results.abundance.whole.map((summary, i) => [summary.year, i]));
  const patch = new Map(model.patches.map((one, p) => [one.name, p]));
  const class_ = new Map(model.classes.map((name, c) => [name, c]));
  const shares = new Float64Array(count.size * patches * classes);
  for (const row of path.abundance) {
    const [t, p, c] = [count.get(row.year), patch.get(row.patch), class_.get(row.class)];
    if (t !== undefined && p !== undefined && c !== undefined) shares[(t * patches + p) * classes + c] = row.animals;
  }
  for (let t = 0; t < count.size; t++)
    share(shares.subarray(t * patches * classes, (t + 1) * patches * classes), classes);
  return shares;
}

function share(animals: Float64Array, classes: number): void {
  const all = new Float64Array(classes);
  animals.forEach((number, i) => {
    all[i % classes] = (all[i % classes] ?? 0) + number;
  });
  const total = all.reduce((sum, number) => sum + number, 0);
  for (let at = 0; at < animals.length; at += classes) {
    const inPatch = animals.subarray(at, at + classes);
    const sum = inPatch.reduce((a, b) => a + b, 0);
    for (let c = 0; c < classes; c++) {
      const ofAll = total > 0 ? (all[c] ?? 0) / total : 1 / classes;
      inPatch[c] = sum > 0 ? (inPatch[c] ?? 0) / sum : ofAll;
    }
  }
}
