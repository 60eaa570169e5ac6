// A diagnostic that a later stage found: it knows which key it is about, the document knows where that key stands.
import type { Diagnostic, Place, Severity } from '../diagnostic/diagnostic.ts';
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
  const place = document.locate(finding.path, finding.part ?? 'value');
  const details = { ...finding.details, place: finding.span ? within(place, finding.span) : place };
  return tell(finding.severity, finding.code, finding.message, details);
}

/** The stretch of an expression inside the place of its value. Quotes around the value push it one to the right. */
function within(place: Place, span: Span): Place {
  const quoted = /^["']/.test(place.text.slice(place.column - 1));
  const column = place.column + span.offset + (quoted ? 1 : 0);
  const length = span.length;
  return column - 1 + length <= place.text.length ? { ...place, column, length } : place;
}
