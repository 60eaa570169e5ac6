#!/usr/bin/env node
// Starts the built command line: scripts, each with what V8 compiled of it when it was built, which saves a short command a
// third of its time. That is offered to the same Node only, and only where the script was not touched since; V8 looks itself
// whether it is of the same flags. Else the script is compiled as any other is. Nothing is ever written here.
'use strict';
const { existsSync, readFileSync, statSync } = require('node:fs');
const { join } = require('node:path');
const { Script } = require('node:vm');

const built = join(__dirname, '..', 'build', 'cli');
const first = 'skein.js';

/** Where a folder of scripts holds what this Node compiled of them. */
function compiledFolder(folder) {
  const { platform, arch, version, versions } = process;
  return join(folder, 'compiled', [platform, arch, version, versions.v8].join('-'));
}

/** Loads modules from the scripts of a folder by their names, each once. */
function openScripts(folder) {
  const compiled = compiledFolder(folder);
  const scripts = new Map();
  const loaded = new Map();
  const open = (name) => {
    const before = scripts.get(name);
    if (before !== undefined) return before;
    const filename = join(folder, name);
    const cachedData = bytesIfUntouched(join(compiled, name), filename);
    const script = new Script(readFileSync(filename, 'latin1'), { filename, cachedData });
    const opened = { script, ...script.runInThisContext() };
    scripts.set(name, opened);
    return opened;
  };
  const { scriptOf } = open(first);
  const load = (name) => {
    const before = loaded.get(name);
    if (before !== undefined) return before.exports;
    const module = { exports: {} };
    loaded.set(name, module);
    const find = (id) => (id.startsWith('./') ? load(id.slice(2)) : require(id));
    open(scriptOf[name] ?? name).modules[name](module, module.exports, find, folder);
    return module.exports;
  };
  return { load, scripts };
}

/** The build gives both the same time. V8 itself would look at no more than the length of the script. */
function bytesIfUntouched(path, script) {
  try {
    return statSync(path).mtimeMs === statSync(script).mtimeMs ? readFileSync(path) : undefined;
  } catch {
    return undefined;
  }
}

module.exports = { built, compiledFolder, first, openScripts };

if (require.main === module) {
  if (existsSync(join(built, first))) void openScripts(built).load(first).main(process.argv);
  else {
    console.error('skein is not built yet. Run `npm ci` and `npm run build` in its folder first.');
    process.exitCode = 3;
  }
}
