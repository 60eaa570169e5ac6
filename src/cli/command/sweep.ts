// skein sweep: very many points of one model, in a folder that survives anything.
import { availableParallelism } from 'node:os';
import { locateFinding, type Finding } from '../../spec/finding.ts';
import type { Spec } from '../../spec/schema/spec.ts';
import { manifestOf, type Manifest } from '../../sweep/manifest.ts';
import { planSweep, type SweepPlan } from '../../sweep/request.ts';
import { Ending, exitCodes } from '../exit.ts';
import { loadModel, tellDiagnostics, toldAlready, type LoadedModel } from '../load.ts';
import { settingsOf } from '../options.ts';
import { writeError } from '../output.ts';
import { specJson } from '../spec-json.ts';
import { fillStore, msAPoint } from '../sweep/fill.ts';
import { finishSweep } from '../sweep/finish.ts';
import { askedOf, type SweepOptions } from '../sweep/flags.ts';
import { tellNotSplit } from '../rare.ts';
import { KeptParts } from '../sweep/kept-parts.ts';
import { costText, planText } from '../sweep/plan-text.ts';
import { openStore, type Store } from '../sweep/store.ts';
import { tellSweep, writeLog } from '../sweep/tell.ts';

export async function sweepCommand(path: string, options: SweepOptions): Promise<void> {
  const started = new Date();
  const loaded = await loadModel(path, settingsOf(options), options);
  tellNotSplit(loaded.compiled.model, 'A sweep', options.quiet);
  const spec = withoutSweep(loaded.compiled.spec);
  const manifest = manifestOf({ ...loaded.compiled, spec }, planOf(loaded, options), specJson(spec));
  const { quiet = false, threads = availableParallelism() } = options;
  const tell = (): void => {
    if (!quiet) writeError(`${planText(manifest)}\n`);
  };
  if (options.plan === true) {
    tell();
    writeError(`${costText(msAPoint(spec, manifest), { left: manifest.points, threads })}\n`);
    return;
  }
  if (options.out === undefined) throw new Ending(exitCodes.usage, 'Name a folder for the results with --out.');
  const store = openStore(options.out, manifest);
  tell();
  try {
    const { shard } = options;
    const kept = new KeptParts();
    await fillStore(store, { spec, manifest, threads, shard, quiet, kept });
    await finish(store, { manifest, threads, started, kept }, options);
  } catch (error) {
    throw error instanceof Ending ? withGoOn(error) : error;
  } finally {
    store.close();
  }
}

interface Done {
  readonly manifest: Manifest;
  readonly threads: number;
  readonly started: Date;
  readonly kept: KeptParts;
}

async function finish(
  store: Store,
  { manifest, threads, started, kept }: Done,
  { quiet, json, details }: SweepOptions,
): Promise<void> {
  const missing = manifest.parts - store.finished().size;
  if (missing > 0) {
    const others = `${missing} of ${manifest.parts} parts are for others`;
    if (quiet !== true) writeError(`This shard is done. ${others}; \`skein sweep merge\` joins them.\n`);
    return;
  }
  const summary = await finishSweep(store.folder, manifest, kept);
  writeLog(store.folder, { command: 'sweep', hash: manifest.hash, started, threads });
  tellSweep(summary, { json: json === true, details: details === true });
}

function withoutSweep({ named, ...core }: Spec): Spec {
  const kept = { ...core };
  delete kept.sweep;
  return { ...kept, named };
}

/** An ending after all that stands against the sweep was told: at its place in the model, or for the command line. */
function planOf({ document, compiled }: LoadedModel, options: SweepOptions): SweepPlan {
  const { plan, findings } = planSweep(askedOf(compiled.spec.sweep, options), compiled);
  if (plan !== null) return plan;
  if (compiled.spec.sweep !== undefined && options.over === undefined && options.list === undefined) {
    tellDiagnostics(findings.map((finding) => locateFinding(document, finding)));
    throw toldAlready();
  }
  throw new Ending(exitCodes.usage, findings.map(plainText).join('\n'));
}

function plainText({ message, details = {} }: Finding): string {
  const { expected, nearest, fix } = details;
  const more = [
    ...(expected === undefined ? [] : [`expected ${expected}`]),
    ...(nearest === undefined ? [] : [`did you mean \`${nearest}\`?`]),
    ...(fix === undefined ? [] : [fix]),
  ];
  return `${message}${more.length === 0 ? '' : `: ${more.join('; ')}`}`;
}

/** With the command that goes on. */
function withGoOn({ exitCode, message }: Ending): Ending {
  const plain = /^[\w./:=,+@%-]+$/u;
  const words = process.argv.slice(2).map((word) => (plain.test(word) ? word : `'${word.replaceAll("'", "'\\''")}'`));
  const goOn = `What is finished is kept. The same command goes on:\n  skein ${words.join(' ')}`;
  return new Ending(exitCode, `${message} ${goOn}`);
}
