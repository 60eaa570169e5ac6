// Everything that is told of a text, through all stages that look for mistakes.
import { constructionFindings } from '../../src/analysis/construction/construction.ts';
import type { Diagnostic } from '../../src/diagnostic/diagnostic.ts';
import { inFileOrder } from '../../src/diagnostic/tell.ts';
import { wrongNames } from '../../src/model/wrong-names.ts';
import { compileSpec } from '../../src/pipeline.ts';
import type { DataFiles } from '../../src/spec/data/files.ts';
import { locateFinding } from '../../src/spec/finding.ts';
import { sweepFindings } from '../../src/sweep/findings.ts';
import { readSpec } from '../../src/spec/read.ts';

export function checkText(text: string, file: string, files: DataFiles = new Map()): readonly Diagnostic[] {
  const { document, readable, diagnostics } = readSpec(text, file, files);
  if (document === undefined) {
    return inFileOrder([...diagnostics, ...(readable === undefined ? [] : wrongNames(readable))]);
  }
  const { compiled, findings } = compileSpec(document.spec);
  const made = compiled === null ? [] : [...sweepFindings(compiled), ...constructionFindings(compiled)];
  const all = [...findings, ...made];
  return inFileOrder([...diagnostics, ...all.map((finding) => locateFinding(document, finding))]);
}
