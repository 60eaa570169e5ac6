// Where the checks of shape put what they find.
import type { DiagnosticCode } from '../../diagnostic/codes.ts';
import { Collector } from '../../diagnostic/collector.ts';
import type { Severity } from '../../diagnostic/diagnostic.ts';
import { tell, type Details } from '../../diagnostic/tell.ts';
import type { Span } from '../expression/ast.ts';
import { placeAt, type SourceText } from '../text/source.ts';

export interface Report {
  readonly source: SourceText;
  readonly found: Collector;
}

/** The value being checked: its key (empty for the whole spec), and where it is shown when it has no text of its own. */
export interface Subject {
  readonly label: string;
  readonly span: Span;
}

export interface Mistake {
  readonly severity?: Severity;
  readonly code: DiagnosticCode;
  readonly message: string;
  readonly span: Span;
}

export function put(report: Report, mistake: Mistake, details: Omit<Details, 'place'> = {}): void {
  const { severity = 'error', code, message, span } = mistake;
  report.found.add(tell(severity, code, message, { ...details, place: placeAt(report.source, span) }));
}

/** A report of its own for a branch that is only tried. */
export function trial(report: Report): Report {
  return { source: report.source, found: new Collector() };
}
