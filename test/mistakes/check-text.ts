// Everything that is told of a text, through all stages that look for mistakes.
import type { Diagnostic } from '../../src/diagnostic/diagnostic.ts';
import { readSpec } from '../../src/spec/read.ts';

export function checkText(text: string, file: string): readonly Diagnostic[] {
  return readSpec(text, file).diagnostics;
}
