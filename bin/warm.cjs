// Keeps what V8 compiles of the command line, with the functions that it compiles when they are first called: after short
// commands of those that people wait for. Called by build.mjs in a process of its own.
'use strict';
const { mkdirSync, utimesSync, writeFileSync } = require('node:fs');
const { join } = require('node:path');
const { built, compiledFolder, first, openScripts } = require('./skein.cjs');

const model = join(__dirname, '..', 'models', 'two-ponds.yaml');
const calls = [
  ['--help'],
  ['run', model, '--replicates', '1'],
  ...['check', 'path', 'analyse'].map((command) => [command, model]),
];

async function warm() {
  const { load, scripts } = openScripts(built);
  for (const words of calls) {
    await load(first).main([process.execPath, 'skein', ...words]);
    if ((process.exitCode ?? 0) !== 0) throw new Error(`skein ${words.join(' ')} failed.`);
  }
  const folder = compiledFolder(built);
  mkdirSync(folder, { recursive: true });
  const wholeSeconds = Math.floor(Date.now() / 1000);
  for (const [name, { script }] of scripts) {
    writeFileSync(join(folder, name), script.createCachedData());
    for (const path of [join(folder, name), join(built, name)]) utimesSync(path, wholeSeconds, wholeSeconds);
  }
}

void warm();
