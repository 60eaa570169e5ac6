// Makes parts of a sweep, in whatever thread.
import type { Spec } from '../../spec/schema/spec.ts';
import { openDesign } from '../../sweep/design/design.ts';
import { placeOfPart, type Manifest } from '../../sweep/manifest.ts';
import { openEvaluator } from '../../sweep/point/evaluate.ts';
import { workPart, type PartColumns } from '../../sweep/point/part.ts';
import { partPieces } from './part-file.ts';

export interface PartsStart {
  readonly spec: Spec;
  readonly manifest: Manifest;
}

export interface MadePart {
  /** Of its file, which share the memory of the columns. */
  readonly pieces: readonly Uint8Array<ArrayBuffer>[];
  readonly columns: PartColumns;
}

export function openParts({ spec, manifest }: PartsStart): (part: number) => MadePart {
  const request = { design: openDesign(manifest.design), evaluator: openEvaluator(spec, manifest) };
  return (part) => {
    const columns = workPart(request, placeOfPart(manifest, part));
    return { pieces: partPieces(manifest, columns), columns };
  };
}
