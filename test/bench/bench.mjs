// npm run bench: how long the flagship takes, as medians over several runs. Figures to read, asserted nowhere.
import { spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { build, installPackages, root } from '../../bin/setup.mjs';

installPackages();
build();
const { applySettings, compileSpec, readSpec, runModel } = await import('../../build/index.js');

const file = 'models/reed-hare.yaml';
const rounds = 7;

function median(values) {
  return values.toSorted((a, b) => a - b)[Math.floor(values.length / 2)];
}

function times(action) {
  action();
  return Array.from({ length: rounds }, () => {
    const started = performance.now();
    action();
    return performance.now() - started;
  });
}

const { document } = readSpec(readFileSync(join(root, file), 'utf8'), file);
const { spec } = applySettings(document.spec, { replicates: 1000, years: 50 });
const { compiled } = compileSpec(spec);
const { patches, classes } = compiled.model;
const cells = patches.length * classes.length * 1000 * 50;
const run = median(times(() => runModel(compiled)));
const compile = median(times(() => compileSpec(spec)));
const process1 = (words) => median(times(() => spawnSync(process.execPath, words, { cwd: root, stdio: 'ignore' })));

const rows = [
  ['compile the flagship', compile, ''],
  ['run it, 1000 replicates x 50 years, in the process', run, `${((run * 1e6) / cells).toFixed(0)} ns a cell`],
  [
    'the same as a whole command',
    process1(['bin/skein.mjs', 'run', file, '--replicates', '1000', '--years', '50']),
    '',
  ],
  ['skein --help as a whole command', process1(['bin/skein.mjs', '--help']), ''],
  ['node -e 0, for comparison', process1(['-e', '0']), ''],
];
console.log(`Medians of ${rounds} runs in milliseconds, Node ${process.version}`);
for (const [what, ms, note] of rows) console.log(`${what.padEnd(52)} ${ms.toFixed(1).padStart(9)}  ${note}`);
