// Makes a diagnostic, leaving out the details that there are none of.
import type { DiagnosticCode } from './codes.ts';
import type { Diagnostic, Severity } from './diagnostic.ts';

type Detail = 'place' | 'found' | 'expected' | 'nearest' | 'fix' | 'reason';

export type Details = { readonly [key in Detail]?: Diagnostic[key] | undefined };

export function tell(severity: Severity, code: DiagnosticCode, message: string, details: Details): Diagnostic {
  const { place, found, expected, nearest, fix, reason } = details;
  return {
    severity,
    code,
    message,
    ...(place === undefined ? {} : { place }),
    ...(found === undefined ? {} : { found }),
    ...(expected === undefined ? {} : { expected }),
    ...(nearest === undefined ? {} : { nearest }),
    ...(fix === undefined ? {} : { fix }),
    ...(reason === undefined ? {} : { reason }),
  };
}

/** In the order of the file; what has no place comes first. */
export function inFileOrder(list: readonly Diagnostic[]): readonly Diagnostic[] {
  const line = (one: Diagnostic): number => one.place?.line ?? 0;
  const column = (one: Diagnostic): number => one.place?.column ?? 0;
  return list.toSorted((a, b) => line(a) - line(b) || column(a) - column(b));
}
