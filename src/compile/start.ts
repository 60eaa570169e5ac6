// The animals at count 0, whole: from a table, or spread as is stable within each patch or over the whole system.
import type { Finding } from '../spec/finding.ts';
import type { Model } from '../model/model.ts';
import { leading, type Leading } from '../numeric/leading.ts';
import { sparseFromDense } from '../numeric/sparse.ts';
import { buildBlock } from './block.ts';
import { multipliersAtRest } from './multipliers.ts';
import { patchYear } from './patch-year.ts';
import { presentClasses } from './present-classes.ts';
import { wholeAnimals } from './whole-animals.ts';
import type { Compiled } from './year-map.ts';

export interface Started {
  /** P·C whole animals. */
  readonly animals: Float64Array;
  readonly findings: readonly Finding[];
}

export function startAnimals(compiled: Compiled): Started {
  const findings: Finding[] = [];
  const animals = wholeAnimals(spread(compiled, findings));
  if (findings.length === 0) refuseEmptyClasses(compiled.model, animals, findings);
  return { animals, findings };
}

function spread(compiled: Compiled, findings: Finding[]): Float64Array {
  const { model } = compiled;
  const { start } = model;
  switch (start.by) {
    case 'table':
      return start.animals;
    case 'total':
      return start.spread === 'stable over all'
        ? stableOverAll(compiled, start.total, findings)
        : fromPatchTotals(compiled.model, sharedByCapacity(model, start.total), { findings, of: null, rest: true });
    case 'counted':
      return fromPatchTotals(model, start.counted, { findings, of: start.of, rest: start.rest !== 'none' });
  }
}

/** By capacity where every patch has one, else equally; in whole animals. */
function sharedByCapacity(model: Model, total: number): Float64Array {
  const own = model.patches.map((patch) => patch.capacity);
  const known = own.every((capacity) => capacity !== null && capacity > 0);
  const weights = Float64Array.from(own, (capacity) => (known ? (capacity ?? 0) : 1));
  const sum = weights.reduce((a, b) => a + b, 0);
  return wholeAnimals(weights.map((weight) => (total * weight) / sum));
}

interface Spreading {
  readonly findings: Finding[];
  /** Classes that the totals count; null for all. */
  readonly of: Uint8Array | null;
  /** True where the other classes are added as is stable. */
  readonly rest: boolean;
}

function fromPatchTotals(model: Model, totals: Float64Array, { findings, of, rest }: Spreading): Float64Array {
  const n = model.classes.length;
  const animals = new Float64Array(model.patches.length * n);
  const stableOf = stableIn(model);
  for (let p = 0; p < model.patches.length; p++) {
    const total = totals[p] ?? 0;
    if (total === 0) continue;
    const stable = stableOf(p);
    if (stable.right === null) {
      tellNoSpread(
        findings,
        `${model.patches[p]?.name ?? 'A patch'} alone has no stable spread: ${stable.reason ?? ''}`,
      );
      return animals;
    }
    const counted = (c: number): boolean => of === null || of[c] === 1;
    const share = stable.right.reduce((sum, value, c) => sum + (counted(c) ? value : 0), 0);
    if (share === 0) {
      tellNoSpread(findings, 'The counted classes are empty in the stable spread');
      return animals;
    }
    const own = stable.right.map((value, c) => (counted(c) || rest ? (total * value) / share : 0));
    animals.set(wholeAnimals(own), p * n);
  }
  return animals;
}

type Stable = Pick<Leading, 'right' | 'reason'>;

/** By patch, near zero and without dispersal; once for patches that are alike. */
function stableIn(model: Model): (patch: number) => Stable {
  const n = model.classes.length;
  const multipliers = multipliersAtRest(model);
  const present = presentClasses(model);
  const known = new Map<string, Stable>();
  return (patch) => {
    const values = patchYear({ model, patch, multipliers });
    const key = values.join();
    const before = known.get(key);
    if (before !== undefined) return before;
    const { right, reason } = leading(sparseFromDense({ rows: n, columns: n, values }));
    const shares = right?.map((value, c) => (present[c] === 1 ? value : 0)) ?? null;
    const found = { right: shares, ...(reason === undefined ? {} : { reason }) };
    known.set(key, found);
    return found;
  };
}

function stableOverAll(compiled: Compiled, total: number, findings: Finding[]): Float64Array {
  const n = compiled.model.classes.length;
  const block = buildBlock(compiled, 'zero');
  const { right, reason } = leading(block.matrix);
  const animals = new Float64Array(compiled.model.patches.length * n);
  if (right === null) tellNoSpread(findings, `The whole system has no stable spread: ${reason ?? ''}`);
  else block.states.forEach((state, i) => (animals[state.patch * n + state.class] = total * (right[i] ?? 0)));
  return animals;
}

function tellNoSpread(findings: Finding[], message: string): void {
  findings.push({
    severity: 'error',
    code: 'start-needs-spread',
    message,
    path: ['start'],
    part: 'key',
    details: { fix: 'Give the animals of every patch and class: `start: { table: { PATCH: { CLASS: animals } } }`.' },
  });
}

function refuseEmptyClasses(model: Model, animals: Float64Array, findings: Finding[]): void {
  const present = presentClasses(model);
  const n = model.classes.length;
  const i = animals.findIndex((value, index) => value > 0 && present[index % n] === 0);
  if (i < 0) return;
  const [patch, name] = [model.patches[Math.floor(i / n)]?.name ?? '', model.classes[i % n] ?? ''];
  findings.push({
    severity: 'error',
    code: 'start-empty-class',
    message: `The start has ${name} in ${patch}, but nobody is ${name} at the count`,
    path: ['start', 'table', patch, name],
    details: {
      fix: `Count the class that they have become, or move \`count\` in \`year\` to where ${name} are there.`,
    },
  });
}
