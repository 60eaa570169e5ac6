// What a sweep will do, in words, before it begins.
import { counted, runsWords } from '../../report/sweep/words.ts';
import { openDesign } from '../../sweep/design/design.ts';
import type { Value } from '../../sweep/design/factor.ts';
import { ownUnit, type Manifest } from '../../sweep/manifest.ts';

export function planText({ model, design, measures, points, parts, runs, columns }: Manifest): string {
  const names = design.factors.map(({ name }) => name);
  const first = openDesign(design).at(0);
  const asked = runs === null ? '' : `, from ${runsWords(runs, names)} (seed ${runs.seed})`;
  return [
    `${model}: ${counted(points, 'point')} (${design.design}) in ${counted(parts, 'part')}`,
    `  over      ${names.map((name) => name + unitIn(columns, name)).join(', ')}`,
    `  begins    ${names.map((name, k) => `${name} ${shown(first[k])}`).join(', ')}`,
    `  measures  ${measures.join(', ')}${asked}`,
  ].join('\n');
}

function shown(value: Value | undefined): string {
  return typeof value === 'number' ? String(Number(value.toPrecision(4))) : String(value);
}

function unitIn(columns: Manifest['columns'], name: string): string {
  const unit = columns.find((one) => one.name === name)?.unit ?? '';
  return unit === '' || unit === ownUnit ? '' : ` (${unit})`;
}

export function costText(
  msAPoint: number,
  { left, threads }: { readonly left: number; readonly threads: number },
): string {
  const seconds = Math.ceil((msAPoint * left) / 1000 / threads);
  const each =
    msAPoint < 1
      ? `${(msAPoint * 1000).toFixed(0)} µs`
      : `${msAPoint < 10 ? msAPoint.toFixed(1) : msAPoint.toFixed(0)} ms`;
  return `  cost      ${each} a point, tried at some: about ${timeWords(seconds)} in ${counted(threads, 'thread')}`;
}

function timeWords(seconds: number): string {
  if (seconds < 90) return `${seconds} s`;
  if (seconds < 5400) return `${Math.round(seconds / 60)} min`;
  return seconds < 172_800
    ? `${(seconds / 3600).toFixed(1)} h`
    : `${Math.round(seconds / 86_400).toLocaleString('en')} days`;
}
