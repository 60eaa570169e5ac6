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

/** In the order of the file, one file after another as they come; what has no place comes first. */
export function inFileOrder(list: readonly Diagnostic[]): readonly Diagnostic[] {
  const files = [...new Set(list.map((one) => one.place?.file))];
  const file = (one: Diagnostic): number => (one.place === undefined ? -1 : files.indexOf(one.place.file));
  const line = (one: Diagnostic): number => one.place?.line ?? 0;
  const column = (one: Diagnostic): number => one.place?.column ?? 0;
  return list.toSorted((a, b) => file(a) - file(b) || line(a) - line(b) || column(a) - column(b));
}
