// A diagnostic that a later stage found: it knows which key it is about, the document knows where that key stands.
import type { Diagnostic, Severity } from '../diagnostic/diagnostic.ts';
import type { DiagnosticCode } from '../diagnostic/codes.ts';
import { tell, type Details } from '../diagnostic/tell.ts';
import type { SpecDocument, SpecPath } from './document.ts';
import type { Span } from './expression/ast.ts';

export interface Finding {
  readonly severity: Severity;
  readonly code: DiagnosticCode;
  readonly message: string;
  readonly path: SpecPath;
  readonly part?: 'key' | 'value';
  /** A stretch inside the value, where the value is an expression. */
  readonly span?: Span;
  readonly details?: Omit<Details, 'place'>;
}

export function locateFinding(document: SpecDocument, finding: Finding): Diagnostic {
  const { part = 'value', span } = finding;
  const place = document.locate(finding.path, part, span);
  return tell(finding.severity, finding.code, finding.message, { ...finding.details, place });
}
