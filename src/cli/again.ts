// Runs again what a run.json holds: the model with all its inputs, by a kernel that gives the same bytes.
import { kernelVersion } from '../results/provenance.ts';
import { compileSpec, type CompiledModel } from '../pipeline.ts';
import { readSpec } from '../spec/read.ts';
import { Ending, exitCodes } from './exit.ts';
import { readText } from './input.ts';
import type { CommonOptions } from './options.ts';

/** What a run.json says beside its spec. */
interface Inputs {
  readonly hash: string;
  readonly spec: object;
  readonly robust: boolean;
}

export interface LoadedAgain {
  readonly compiled: CompiledModel;
  /** Whether a comparison asked other sound models, too. */
  readonly robust: boolean;
}

/** Of a file that this command wrote. */
export function loadAgain(path: string, command: 'run' | 'compare'): LoadedAgain {
  const { hash, spec, robust } = readInputs(path, command);
  const { document } = readSpec(JSON.stringify(spec), path);
  const compiled = document === undefined ? null : compileSpec(document.spec).compiled;
  if (compiled?.provenance.hash !== hash) {
    throw refused(path, 'its hash stands for other inputs, so it was changed. Its `spec` alone can be run as a model');
  }
  return { compiled, robust };
}

/** A command that takes a model, or all that decides its result from such a file. */
export function refuseBesideAgain(
  path: string | undefined,
  options: CommonOptions & { readonly again?: string },
): void {
  if (options.again === undefined) {
    if (path === undefined) throw new Ending(exitCodes.usage, 'Name a model, or a run.json with --again.');
    return;
  }
  const given = deciding.filter((name) => options[name] !== undefined);
  if (path === undefined && given.length === 0) return;
  const told = deciding.map((name) => `--${name === 'atMost' ? 'at-most' : name}`).join(', ');
  const why = `--again takes the model and all that decides the result (${told}) from its file; leave them out.`;
  throw new Ending(exitCodes.usage, why);
}

const deciding = [
  'set',
  'scenario',
  'only',
  'years',
  'replicates',
  'seed',
  'draws',
  'rare',
  'precision',
  'atMost',
  'robust',
] as const;

function readInputs(path: string, wanted: 'run' | 'compare'): Inputs {
  const read = parsed(path);
  const { format, command, tool, hash, spec, places, robust } = read;
  if (format !== 'skein-inputs/1' || !isRecord(spec) || !isRecord(tool) || typeof hash !== 'string') {
    throw refused(path, 'it is not the run.json of a run');
  }
  if (command !== wanted) throw refused(path, `it belongs to \`skein ${String(command)}\``);
  if (places !== undefined) {
    throw refused(
      path,
      'the places of its patches are hidden. Whoever has the model runs it with the `run` of this file',
    );
  }
  const [made, here] = [String(tool['kernel']), kernelVersion];
  if (made.split('.')[0] !== here.split('.')[0]) {
    const version = String(tool['version']);
    throw refused(
      path,
      `it was made by kernel ${made}, and kernel ${here} of this skein gives other bytes. Use skein ${version}`,
    );
  }
  return { hash, spec, robust: robust === true };
}

function parsed(path: string): Readonly<Record<string, unknown>> {
  try {
    const value: unknown = JSON.parse(readText(path));
    if (isRecord(value)) return value;
  } catch (error) {
    if (!(error instanceof SyntaxError)) throw error;
  }
  throw refused(path, 'it is not the run.json of a run');
}

function isRecord(value: unknown): value is Readonly<Record<string, unknown>> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function refused(path: string, why: string): Ending {
  return new Ending(exitCodes.model, `Cannot run ${path} again: ${why}.`);
}
