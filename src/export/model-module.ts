// A compiled model as one self-contained WebAssembly module that says what it is.
import { isHandling } from '../compile/image/handling.ts';
import { lanes } from '../kernel/batch.ts';
import { kernelBytes, loadMachine } from '../machine/machine.ts';
import type { Model } from '../model/model.ts';
import { watchedCounts } from '../model/watched.ts';
import type { CompiledModel } from '../pipeline.ts';
import { writeModule } from './module.ts';

export const sectionName = 'skein-model';

export function modelModule(compiled: CompiledModel): Uint8Array<ArrayBuffer> {
  const image = new Uint8Array(compiled.image);
  // What the kernel gives away first in a fresh memory.
  const address = loadMachine().reserve(image.length);
  const text = JSON.stringify(describeModule(compiled, address));
  return writeModule({ kernel: kernelBytes, image, address, section: { name: sectionName, text } });
}

/** What the custom section holds. */
function describeModule({ model, provenance, image }: CompiledModel, address: number): unknown {
  const { seed, replicates, steps, firstYear, classes } = model;
  const patches = model.patches.map(({ name }) => name);
  const outcomes = model.outcomes.map(({ name, definition, event, counts }) => ({ name, definition, event, counts }));
  return {
    format: 'skein-module/1',
    ...provenance,
    seed,
    replicates,
    years: steps,
    firstYear,
    image: { address, size: image.byteLength },
    lanes,
    patches,
    classes,
    outcomes,
    columns: ['all', ...patches, ...outcomes.map(({ name }) => name), ...watchedNames(model), ...handledNames(model)],
  };
}

/** Animals of the classes that counts of the past hold. */
function watchedNames(model: Model): readonly string[] {
  return watchedCounts(model).map(
    ({ patch }) => `counted: ${patch === null ? 'all' : (model.patches[patch]?.name ?? '')}`,
  );
}

/** Animals taken, moved or released by each such phase, those of them that died, and what was wanted and not there. */
function handledNames({ phases }: Model): readonly string[] {
  return phases.filter(isHandling).flatMap(({ name }) => [name, `${name}: died`, `${name}: shortfall`]);
}
