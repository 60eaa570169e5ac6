// From the text of a spec to a compiled model, as a command does it; mistakes fail the test with what a user would read.
import type { Diagnostic } from '../../src/diagnostic/diagnostic.ts';
import { renderDiagnostics } from '../../src/diagnostic/render.ts';
import { compileSpec, type CompiledModel } from '../../src/pipeline.ts';
import type { DataFiles } from '../../src/spec/data/files.ts';
import { locateFinding } from '../../src/spec/finding.ts';
import { readSpec } from '../../src/spec/read.ts';
import { applySettings, type Settings } from '../../src/spec/settings.ts';

export interface Told {
  readonly compiled: CompiledModel | null;
  readonly diagnostics: readonly Diagnostic[];
}

/** Whatever the text, with all that is told of it. */
export function tryText(text: string, settings: Settings = {}, files: DataFiles = new Map()): Told {
  const { document, diagnostics } = readSpec(text, 'test.yaml', files);
  if (document === undefined) return { compiled: null, diagnostics };
  const applied = applySettings(document.spec, settings);
  if (!applied.ok) throw new Error(`The spec has no parameter ${applied.unknown.name}.`);
  const { compiled, findings } = compileSpec(applied.spec);
  return { compiled, diagnostics: [...diagnostics, ...findings.map((finding) => locateFinding(document, finding))] };
}

export function compileText(text: string, settings: Settings = {}, files: DataFiles = new Map()): CompiledModel {
  const { compiled, diagnostics } = tryText(text, settings, files);
  if (compiled === null) throw new Error(renderDiagnostics(diagnostics, { colour: false, width: 100 }));
  return compiled;
}

/** Codes of the errors that are told of a text. */
export function errorsOf(text: string): readonly string[] {
  return tryText(text).diagnostics.flatMap(({ severity, code }) => (severity === 'error' ? [code] : []));
}
