// How the animals at count 0 are given.
import type { SpecPath } from '../spec/document.ts';
import { classIndex, classMask, fail, patchIndex, type Context } from './context.ts';
import type { StartRule } from './model.ts';

export function resolveStart(context: Context): StartRule {
  const { start } = context.spec;
  if ('table' in start) return { by: 'table', animals: readTable(context, start.table) };
  if ('total' in start) {
    if (start.total === 0) tellNobody(context, ['start', 'total']);
    if (start.spread === undefined) {
      context.defaults.push('The start is spread over the classes as is stable within each patch.');
    }
    return { by: 'total', total: start.total, spread: start.spread ?? 'stable within patch' };
  }
  const counted = new Float64Array(context.patches.length);
  for (const [patch, animals] of Object.entries(start.counted)) {
    const p = patchIndex(context, patch, ['start', 'counted', patch]);
    if (p >= 0) counted[p] = animals;
  }
  if (counted.every((animals) => animals === 0)) tellNobody(context, ['start', 'counted']);
  return { by: 'counted', counted, of: classMask(context, start.of, ['start', 'of']), rest: start.rest };
}

type Table = Readonly<Record<string, Readonly<Record<string, number>>>>;

function readTable(context: Context, table: Table): Float64Array {
  const classCount = context.classes.length;
  const animals = new Float64Array(context.patches.length * classCount);
  for (const [patch, row] of Object.entries(table)) {
    const p = patchIndex(context, patch, ['start', 'table', patch]);
    for (const [name, value] of Object.entries(row)) {
      const c = classIndex(context, name, ['start', 'table', patch, name]);
      if (p >= 0 && c >= 0) animals[p * classCount + c] = value;
    }
  }
  if (animals.every((value) => value === 0)) tellNobody(context, ['start', 'table']);
  return animals;
}

function tellNobody(context: Context, path: SpecPath): void {
  fail(context, 'start-nobody', path, {
    message: 'The start has no animals',
    part: 'key',
    details: { expected: 'at least one animal in one patch' },
  });
}
