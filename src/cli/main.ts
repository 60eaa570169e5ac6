// The command line: which commands there are. Each is loaded only when it is called.
import { Command, CommanderError, InvalidArgumentError, Option } from 'commander';
import { toolVersion } from '../results/provenance.ts';
import { Ending, exitCodes } from './exit.ts';
import { addOptions, type CommonOptions } from './options.ts';
import { writeError, writeOut } from './output.ts';
import { addSweepOptions, detailsOfSweep } from './sweep/flags.ts';

type Handler<Path, Options> = (path: Path, options: Options) => void | Promise<void>;

function buildProgram(): Command {
  const program = new Command('skein')
    .description('Animals in several habitat patches linked by dispersal: sources and sinks, risks, maps and reports.')
    .version(toolVersion, '--version', 'print the version')
    .helpOption('--help', 'show this help')
    .helpCommand(false)
    .enablePositionalOptions()
    .exitOverride()
    .configureOutput({ writeOut, writeErr: writeError })
    .showHelpAfterError('(--help shows what it takes)');
  program
    .command('new')
    .argument('<folder>', 'a folder to make, or an empty one')
    .description('write a small working model to start from')
    .option('--example <name>', 'start from one of the examples instead (`--example list` names them)')
    .addHelpText('after', '\nExample:\n  skein new my-study')
    .action(async (folder: string, options: { readonly example?: string }) => {
      (await import('./command/new.ts')).newModel(folder, options);
    });
  model(program, 'check', 'tell all mistakes, every default used, and what was understood', [
    'set',
    'scenario',
    'years',
    'json',
  ])
    .option('--strict', 'let warnings fail')
    .addHelpText('after', '\nExample:\n  skein check models/reed-hare.yaml')
    .action(async (path: string, options: CommonOptions & { readonly strict?: boolean }) => {
      await (await import('./command/check.ts')).checkModel(path, options);
    });
  addShow(program);
  addCompile(program);
  addAnalyse(program);
  addRuns(program);
  addSweep(program);
  addSchema(program);
  return program;
}

function addShow(program: Command): void {
  addOptions(program.command('show'), ['set', 'scenario', 'years', 'json', 'allow'])
    .argument('<model>', 'a model file, or - for standard input')
    .argument('<stage>', 'spec, model, landscape, matrix or packed')
    .description('print what a stage of the work makes of a model')
    .addHelpText('after', '\nExample:\n  skein show models/reed-hare.yaml matrix')
    .action(async (path: string, stage: string, options: CommonOptions) => {
      await (await import('./command/show.ts')).showStage(path, stage, options);
    });
}

function addSweep(program: Command): void {
  const sweep = model(program, 'sweep', 'run the model at very many points, into a folder that survives anything', [
    ...(['set', 'years', 'replicates', 'seed', 'threads', 'json', 'out', 'quiet'] as const),
  ]);
  addSweepOptions(sweep)
    .addOption(refused('--scenario <name>', 'Write `--over scenario=NAME`, or `--compare all`.'))
    .enablePositionalOptions()
    .addHelpText(
      'after',
      '\nExample:\n  skein sweep models/reed-hare.yaml --over adult_survival=0.4:0.7 --over natal_leaving=0.05,0.2 --out sweep',
    )
    .action(run(async () => (await import('./command/sweep.ts')).sweepCommand));
  sweep
    .command('merge')
    .argument('<folders...>', 'folders that shards of one sweep were written to')
    .description('join what the shards of a sweep made, and name what is missing')
    .requiredOption('--out <folder>', 'where the whole sweep is to be')
    .option('--json', 'print one JSON object instead of text')
    .option('--details', detailsOfSweep)
    .option('--quiet', 'print nothing')
    .addHelpText('after', '\nExample:\n  skein sweep merge shard-1 shard-2 --out whole')
    .action(run(async () => (await import('./command/sweep-merge.ts')).mergeSweeps));
  sweep
    .command('summary')
    .argument('<folder>', 'the folder of a whole sweep')
    .description('say what matters most, and how each measure answers each number')
    .option('--json', 'print one JSON object instead of text')
    .option('--details', detailsOfSweep)
    .option('--page <file>', 'write it as one HTML page with response curves, maps over two numbers and bars')
    .addHelpText('after', '\nExample:\n  skein sweep summary sweep --page sweep.html')
    .action(run(async () => (await import('./command/sweep-summary.ts')).summariseFolder));
}

function addSchema(program: Command): void {
  program
    .command('schema')
    .argument('<name>', 'spec, run, path, analysis or another format; a wrong name lists them')
    .description('print the JSON Schema of what is read, printed or written')
    .addHelpText('after', '\nExample:\n  skein schema run')
    .action(async (name: string) => {
      (await import('./command/schema.ts')).printSchema(name);
    });
}

function addCompile(program: Command): void {
  model(program, 'compile', 'write the model as one file for other programs', [
    'set',
    'scenario',
    'years',
    'replicates',
    'seed',
    'quiet',
  ])
    .requiredOption('-o, --output <file>', 'the file: .mtx, .csv or .json for the matrix, .wasm for the whole model')
    .addHelpText('after', '\nExample:\n  skein compile models/reed-hare.yaml -o reed-hare.mtx')
    .action(run(async () => (await import('./command/compile.ts')).compileCommand));
}

function addAnalyse(program: Command): void {
  const states = new Option('--at <state>', 'numbers at which the matrix is taken')
    .choices(['zero', 'equilibrium', 'start'])
    .default('zero');
  model(program, 'analyse', 'say what drives growth, and which patches feed the others', [
    'set',
    'scenario',
    'json',
    'out',
    'quiet',
  ])
    .addOption(states)
    .option('--against <model>', 'say what makes it grow otherwise than another model, or than a scenario of its own')
    .option('--eigenvalues', 'list all eigenvalues')
    .addHelpText('after', '\nExample:\n  skein analyse models/reed-hare.yaml --at start')
    .action(run(async () => (await import('./command/analyse.ts')).analyseCommand));
}

function addRuns(program: Command): void {
  model(program, 'path', 'follow the path without chance, year by year', [
    'set',
    'scenario',
    'years',
    'json',
    'out',
    'places',
    'quiet',
  ])
    .addHelpText('after', '\nExample:\n  skein path models/reed-hare.yaml --years 20')
    .action(run(async () => (await import('./command/path.ts')).pathCommand));
  const chance = [
    'set',
    'scenario',
    'years',
    'replicates',
    'seed',
    'draws',
    'precision',
    'at-most',
    'threads',
  ] as const;
  addOptions(program.command('run'), [...chance, 'rare', 'json', 'out', 'places', 'quiet', 'allow'])
    .argument('[model]', 'a model file, or - for standard input')
    .description('run the model many times with chance')
    .option('--again <file>', 'run what a run.json of `--out` holds, to the last byte')
    .addHelpText('after', '\nExample:\n  skein run models/reed-hare.yaml --replicates 500 --seed 7')
    .action(run(async () => (await import('./command/run.ts')).runCommand));
  addCompare(program, chance);
  model(program, 'report', 'run the model and write one page that an agency can read', [
    ...chance,
    'only',
    'robust',
    'places',
    'quiet',
  ])
    .requiredOption('-o, --output <file>', 'the HTML file to write (- for standard output)')
    .addHelpText('after', '\nExample:\n  skein report models/reed-hare.yaml -o reed-hare.html')
    .action(run(async () => (await import('./command/report.ts')).reportCommand));
}

function addCompare(program: Command, chance: Parameters<typeof addOptions>[1]): void {
  const own = ['only', ...chance.filter((name) => name !== 'scenario'), 'robust'] as const;
  addOptions(program.command('compare'), [...own, 'json', 'out', 'places', 'quiet', 'allow'])
    .argument('[model]', 'a model file, or - for standard input')
    .description('set the plans of a model side by side, in the same futures')
    .option('--details', 'print all pairs of plans in all outcomes, chances of being best, and patches, too')
    .option('--again <file>', 'compare what a run.json of `--out` holds, to the last byte')
    .addOption(
      refused(
        '--scenario <name>',
        '`compare` sets all scenarios of the model side by side, or those of `--only`; `run` takes one.',
      ),
    )
    .addHelpText('after', '\nExample:\n  skein compare models/reed-hare.yaml --replicates 500')
    .action(run(async () => (await import('./command/compare.ts')).compareCommand));
}

/** An option of other commands, with what to write instead. */
function refused(flags: string, instead: string): Option {
  return new Option(flags).hideHelp().argParser(() => {
    throw new InvalidArgumentError(instead);
  });
}

function model(program: Command, name: string, what: string, shared: Parameters<typeof addOptions>[1]): Command {
  return addOptions(program.command(name), [...shared, 'allow'])
    .argument('<model>', 'a model file, or - for standard input')
    .description(what);
}

function run<Path, Options>(load: () => Promise<Handler<Path, Options>>) {
  return async (path: Path, options: Options): Promise<void> => {
    await (
      await load()
    )(path, options);
  };
}

/** Text for a report of a bug, without anything of the model. */
function tellBug(error: unknown): void {
  const what = error instanceof Error ? (error.stack ?? error.message) : String(error);
  writeError(
    `This is a bug in skein ${toolVersion}, not a mistake of yours. Please report it with the lines below\n` +
      `and, if you can, the model.\n\n${what}\nNode ${process.version}, ${process.platform} ${process.arch}\n`,
  );
}

function endingOf(error: unknown): number {
  if (error instanceof CommanderError) return error.exitCode === 0 ? exitCodes.done : exitCodes.usage;
  if (error instanceof Ending) {
    if (error.message !== '') writeError(`${error.message}\n`);
    return error.exitCode;
  }
  tellBug(error);
  return exitCodes.bug;
}

/** Of the words that Node was called with; sets the exit code. */
export async function main(words: readonly string[]): Promise<void> {
  try {
    await buildProgram().parseAsync(words);
  } catch (error) {
    try {
      process.exitCode = endingOf(error);
    } catch {
      process.exitCode = exitCodes.work;
    }
  }
}
