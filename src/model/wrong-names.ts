// Wrong names in a spec whose shape has mistakes, so that both are told in one round.
import type { DiagnosticCode } from '../diagnostic/codes.ts';
import type { Diagnostic } from '../diagnostic/diagnostic.ts';
import { locateFinding } from '../spec/finding.ts';
import type { Readable } from '../spec/read.ts';
import { resolveModel } from './resolve.ts';

/** Mistakes that do not rest on what else is written. */
const ofNames: ReadonlySet<DiagnosticCode> = new Set([
  'unknown-class',
  'unknown-patch',
  'unknown-phase',
  'unknown-name',
  'repeated-patch',
  'repeated-phase',
  'parameter-cycle',
]);

/** Those that remain whatever is mended in the parts that could not be read. */
export function wrongNames({ document, lost }: Readable): readonly Diagnostic[] {
  return resolveModel(document.spec)
    .findings.filter(({ code, details }) => ofNames.has(code) && !lost.has(details?.found ?? ''))
    .map((finding) => locateFinding(document, finding));
}
