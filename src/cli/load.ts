// From the name of a model file to a compiled model; what is wrong with it goes to standard error.
import { constructionFindings } from '../analysis/construction/construction.ts';
import type { Diagnostic } from '../diagnostic/diagnostic.ts';
import { renderDiagnostics } from '../diagnostic/render.ts';
import { inFileOrder } from '../diagnostic/tell.ts';
import { wrongNames } from '../model/wrong-names.ts';
import { compileBase, compileScenario, compileSpec, type Compilation, type CompiledModel } from '../pipeline.ts';
import type { SpecDocument } from '../spec/document.ts';
import { locateFinding, type Finding } from '../spec/finding.ts';
import { nearestScenario, scenariosOf } from '../spec/plans/scenarios.ts';
import { readSpec } from '../spec/read.ts';
import type { Spec } from '../spec/schema/spec.ts';
import { applySettings, type Settings } from '../spec/settings.ts';
import { readDataFiles } from './data-files.ts';
import { Ending, exitCodes } from './exit.ts';
import { readText } from './input.ts';
import { writeError } from './output.ts';
import { terminalAt } from './terminal.ts';

export interface Loaded {
  /** Null where the text cannot be read as a spec. */
  readonly document: SpecDocument | null;
  readonly files: readonly string[];
  /** Null where there is an error. */
  readonly compiled: CompiledModel | null;
  readonly diagnostics: readonly Diagnostic[];
}

export interface LoadedModel {
  readonly document: SpecDocument;
  /** Data files that the model names, as it names them. */
  readonly files: readonly string[];
  readonly compiled: CompiledModel;
}

interface ReadOptions {
  readonly quiet?: boolean | undefined;
  /** Folders besides that of the spec from which its data files may come. */
  readonly allow?: readonly string[] | undefined;
  /** Look for mistakes in all scenarios, not only in the one that is asked for. */
  readonly everyScenario?: boolean;
}

/** A compiled model, or an ending after all mistakes were told. Warnings are told unless `quiet`. */
export async function loadModel(
  path: string,
  settings: Settings,
  { quiet, allow, everyScenario = false }: ReadOptions,
): Promise<LoadedModel> {
  const { document, files, compiled, diagnostics } = await readModel(path, settings, { allow, everyScenario });
  const told = diagnostics.filter((one) => one.severity === 'error' || (one.severity === 'warning' && quiet !== true));
  tellDiagnostics(compiled === null ? told.filter((one) => one.severity === 'error') : told);
  if (document === null || compiled === null) throw toldAlready();
  return { document, files, compiled };
}

export async function readModel(
  path: string,
  settings: Settings,
  { allow = [], everyScenario = false }: Omit<ReadOptions, 'quiet'> = {},
): Promise<Loaded> {
  const name = path === '-' ? 'standard input' : path;
  const text = readText(path);
  const alone = readSpec(text, name);
  const files = readDataFiles(alone.wants, { spec: path, allow });
  const { document, readable, diagnostics } = files.size === 0 ? alone : readSpec(text, name, files);
  if (document === undefined) {
    const names = readable === undefined ? [] : wrongNames(readable);
    const told = inFileOrder([...diagnostics, ...names]);
    return { document: null, files: alone.wants, compiled: null, diagnostics: told };
  }
  const applied = applySettings(document.spec, settings);
  if (!applied.ok) {
    const { name: unknown, nearest } = applied.unknown;
    const hint = nearest === undefined ? '' : ` Did you mean \`${nearest}\`?`;
    throw new Ending(exitCodes.usage, `--set ${unknown}: the model has no parameter \`${unknown}\`.${hint}`);
  }
  refuseUnknownScenario(applied.spec, settings);
  const { compiled, findings } = everyScenario ? compileEvery(applied.spec) : compileSpec(applied.spec);
  const ofSweep = compiled === null ? [] : await findingsOfSweep(compiled);
  const all = [...findings, ...ofSweep, ...(compiled === null ? [] : constructionFindings(compiled))];
  const located = all.map((finding) => locateFinding(document, finding));
  const told = inFileOrder([...diagnostics, ...located]);
  return { document, files: alone.wants, compiled: ofSweep.length > 0 ? null : compiled, diagnostics: told };
}

/** What designs points is loaded only where the model asks for a sweep. */
async function findingsOfSweep(compiled: CompiledModel): Promise<readonly Finding[]> {
  return compiled.spec.sweep === undefined ? [] : (await import('../sweep/findings.ts')).sweepFindings(compiled);
}

function refuseUnknownScenario(spec: Spec, { scenario }: Settings): void {
  if (scenario === undefined || scenariosOf(spec).some(({ name }) => name === scenario)) return;
  const nearest = nearestScenario(spec, scenario);
  const hint = nearest === undefined ? '' : ` Did you mean \`${nearest}\`?`;
  throw new Ending(exitCodes.usage, `--scenario ${scenario}: the model has no scenario \`${scenario}\`.${hint}`);
}

/** The scenario that is asked for, and what is wrong with any. */
function compileEvery(spec: Spec): Compilation {
  const base = compileBase(spec);
  const { compiled, findings } = compileScenario(base, spec);
  const all = [...findings];
  const told = new Set(all.map((one) => JSON.stringify(one)));
  for (const scenario of scenariosOf(spec)) {
    for (const one of compileScenario(base, scenario.spec).findings) {
      if (told.has(JSON.stringify(one))) continue;
      told.add(JSON.stringify(one));
      all.push(underScenario(one, scenario.name));
    }
  }
  return { compiled: all.some(({ severity }) => severity === 'error') ? null : compiled, findings: all };
}

/** A mistake of a plan that is told at a place of the model names the plan. */
function underScenario(finding: Finding, scenario: string): Finding {
  const { path, details = {} } = finding;
  if (path[0] === 'actions' || path[0] === 'scenarios' || details.reason !== undefined) return finding;
  return { ...finding, details: { ...details, reason: `So under the plan \`${scenario}\`.` } };
}

export function tellDiagnostics(diagnostics: readonly Diagnostic[]): void {
  if (diagnostics.length > 0) writeError(`${renderDiagnostics(diagnostics, terminalAt('stderr')).trimEnd()}\n`);
}

/** The mistakes were told with their count; there is nothing to add. */
export function toldAlready(): Ending {
  return new Ending(exitCodes.model, '');
}
