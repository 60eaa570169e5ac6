// The layers of src: a folder imports only from lower ranks, and no file is part of a circle of imports.
import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative } from 'node:path';
import { fileURLToPath } from 'node:url';
import { expect, test } from 'vitest';

const root = fileURLToPath(new URL('..', import.meta.url));
const src = join(root, 'src');

/** Folders and files directly below src. Equal ranks never import each other. */
const ranks: Readonly<Record<string, number>> = {
  diagnostic: 0,
  machine: 0,
  numeric: 1,
  spec: 2,
  model: 3,
  landscape: 4,
  compile: 5,
  kernel: 6,
  results: 7,
  threads: 7,
  'compilation.ts': 7.5,
  'pipeline.ts': 8,
  analysis: 9,
  compare: 10,
  export: 10,
  sweep: 11,
  view: 12,
  report: 13,
  page: 13,
  formats: 13,
  cli: 15,
  'index.ts': 16,
};

interface Import {
  readonly from: string;
  readonly to: string;
}

const files = readdirSync(src, { recursive: true, encoding: 'utf8' }).filter((file) => file.endsWith('.ts'));

function importsOf(file: string): readonly Import[] {
  const text = readFileSync(join(src, file), 'utf8');
  const names = [...text.matchAll(/(?:from|import)\s*\(?\s*'(\.[^']+)'/g)].map((match) => match[1] ?? '');
  return names.map((name) => ({ from: file, to: relative(src, join(src, dirname(file), name)) }));
}

const imports = files.flatMap(importsOf);
const placeOf = (file: string): string => file.split('/')[0] ?? '';

test('every folder of src has a rank', () => {
  expect(files.length).toBeGreaterThan(50);
  expect([...new Set(files.map(placeOf))].filter((place) => ranks[place] === undefined)).toEqual([]);
});

test('folders import only from lower ranks', () => {
  const wrong = imports.filter(({ from, to }) => {
    if (to.startsWith('..')) return !allowedOutside(from, to);
    const [own, other] = [placeOf(from), placeOf(to)];
    return own !== other && (ranks[own] ?? -1) <= (ranks[other] ?? 99);
  });
  expect(wrong).toEqual([]);
});

/** The one memory map is shared with the kernel; what the build makes from sources is read where it is used. */
function allowedOutside(from: string, to: string): boolean {
  if (to === '../assembly/layout.ts') return ['machine', 'compile', 'kernel', 'threads'].includes(placeOf(from));
  if (to === '../build/kernel.ts') return placeOf(from) === 'machine';
  if (to === '../build/worker-script.ts') return placeOf(from) === 'threads';
  if (to === '../build/sweep-worker-script.ts') return placeOf(from) === 'cli';
  if (to === '../build/page-script.ts') return placeOf(from) === 'cli';
  return false;
}

test('the view imports nothing but itself', () => {
  const outside = imports.filter(({ from, to }) => placeOf(from) === 'view' && placeOf(to) !== 'view');
  expect(outside).toEqual([]);
});

test('no file is part of a circle of imports', () => {
  const below = new Map<string, readonly string[]>();
  for (const file of files)
    below.set(
      file,
      imports.filter(({ from }) => from === file).map(({ to }) => to),
    );
  const done = new Set<string>();
  const circles: string[] = [];
  const visit = (file: string, open: readonly string[]): void => {
    if (open.includes(file)) circles.push([...open.slice(open.indexOf(file)), file].join(' > '));
    if (open.includes(file) || done.has(file)) return;
    for (const next of below.get(file) ?? []) visit(next, [...open, file]);
    done.add(file);
  };
  for (const file of files) visit(file, []);
  expect(circles).toEqual([]);
});
