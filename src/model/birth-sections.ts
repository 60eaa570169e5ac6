// The sections of a spec that make up one breeding, plain or under a name of its own.
import type { SpecPath } from '../spec/document.ts';
import type { BreedingSpec } from '../spec/schema/spec.ts';

/** What the sections of a breeding are and where they stand. */
export interface BirthSections {
  readonly name: string;
  readonly births: BreedingSpec['births'];
  readonly offspring: BreedingSpec['offspring'];
  readonly mating: BreedingSpec['mating'];
  readonly birthsPath: SpecPath;
  /** Of `offspring` and `mating`. */
  readonly path: SpecPath;
  /** The key under `in` and a patch. */
  readonly key: string;
}
