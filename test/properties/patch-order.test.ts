// The order in which a file lists its patches changes no byte of what comes out but the order.
import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { compileSpec, followPath, runModel, type CompiledModel } from '../../src/pipeline.ts';
import { readSpec } from '../../src/spec/read.ts';
import type { Spec } from '../../src/spec/schema/spec.ts';

const file = new URL('../../models/reed-hare.yaml', import.meta.url);
const written = readSpec(readFileSync(file, 'utf8'), 'reed-hare.yaml').document!.spec;
const flagship: Spec = { ...written, years: 30, run: { replicates: 40, seed: 2026 } };

function compiledOf(spec: Spec): CompiledModel {
  return compileSpec(spec).compiled!;
}

/** The hash is of the file as it was written, the only other thing that knows its order. */
function pathText(spec: Spec): string {
  const { abundance, ...others } = { ...followPath(compiledOf(spec)), hash: '' };
  const byPatch = spec.patches.map(({ name }) => abundance.filter((row) => row.patch === name));
  return JSON.stringify({ ...others, byPatch: sorted(byPatch, ([row]) => row?.patch ?? '') });
}

function runText(spec: Spec): string {
  const { abundance, ...others } = { ...runModel(compiledOf(spec)), hash: '' };
  const patches = sorted(abundance.patches, ({ patch }) => patch);
  return JSON.stringify({ ...others, whole: abundance.whole, patches });
}

function sorted<T>(list: readonly T[], name: (one: T) => string): readonly T[] {
  return [...list].sort((a, b) => (name(a) < name(b) ? -1 : 1));
}

const shuffled = fc
  .shuffledSubarray([...flagship.patches], { minLength: flagship.patches.length })
  .map((patches): Spec => ({ ...flagship, patches }));

describe('patches in another order', () => {
  const [path, run] = [pathText(flagship), runText(flagship)];

  test('the same path and the same run, byte for byte', () => {
    fc.assert(
      fc.property(shuffled, (spec) => {
        expect(pathText(spec)).toBe(path);
        expect(runText(spec)).toBe(run);
      }),
      { seed: 8, numRuns: 12 },
    );
  });

  test('the same compiled bytes', () => {
    const image = new Uint8Array(compiledOf(flagship).image);
    const reversed = compiledOf({ ...flagship, patches: [...flagship.patches].reverse() });
    expect(new Uint8Array(reversed.image)).toEqual(image);
  });

  test('results list the patches as the file does', () => {
    const reversed = compiledOf({ ...flagship, patches: [...flagship.patches].reverse() });
    const names = flagship.patches.map(({ name }) => name).reverse();
    expect(runModel(reversed).abundance.patches.map(({ patch }) => patch)).toEqual(names);
    expect([...new Set(followPath(reversed).abundance.map(({ patch }) => patch))]).toEqual(names);
  });
});
