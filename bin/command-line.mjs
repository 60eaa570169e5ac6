// Builds the command line as scripts for bin/skein.cjs: each is an object with the modules in it, as functions by name. Most of
// what the everyday commands load is one script, since opening another one costs more than a function that nobody calls.
import { spawnSync } from 'node:child_process';
import { mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { basename, join } from 'node:path';
import { build, transform } from 'esbuild';

const first = { script: 'skein.js', from: 'src/cli/main.ts' };
const everyday = { script: 'everyday.js', from: 'src/cli/command/run.ts' };

export async function buildCommandLine(shared, folder) {
  const packages = join(shared.absWorkingDir, 'node_modules');
  const { outputFiles, metafile } = await build({
    ...shared,
    platform: 'node',
    packages: 'bundle',
    // Editions of which what nobody calls can be left out.
    mainFields: ['module', 'main'],
    alias: {
      yaml: join(packages, 'yaml/browser/dist/index.js'),
      'ml-matrix': join(packages, 'ml-matrix/src/index.js'),
    },
    plugins: [withoutPrograms],
    minifySyntax: true,
    entryPoints: { [basename(first.script, '.js')]: first.from },
    outdir: folder,
    splitting: true,
    metafile: true,
    write: false,
    define: { 'import.meta.dirname': '__dirname' },
  });
  const texts = new Map(outputFiles.map(({ path, text }) => [basename(path), text]));
  rmSync(folder, { force: true, recursive: true });
  mkdirSync(folder, { recursive: true });
  const { scripts, scriptOf } = scriptsOf(metafile);
  for (const [script, names] of scripts) {
    const named = async (name) => `${JSON.stringify(name)}: ${await asFunction(texts.get(name))}`;
    const modules = (await Promise.all(names.map(named))).join(',\n');
    const where = script === first.script ? `scriptOf: ${JSON.stringify(scriptOf)}, ` : '';
    writeFileSync(join(folder, script), `({ ${where}modules: {\n${modules}\n} })\n`);
  }
  const warm = join(shared.absWorkingDir, 'bin', 'warm.cjs');
  const { status } = spawnSync(process.execPath, [warm], { stdio: ['ignore', 'ignore', 'inherit'] });
  if (status !== 0) process.exit(status ?? 1);
}

/** The modules of each script; and the script of each module that is not in one of its own name. */
function scriptsOf({ outputs }) {
  const named = new Map(Object.entries(outputs).map(([path, output]) => [basename(path), output]));
  const entryOf = (from) => [...named].find(([, { entryPoint }]) => entryPoint === from)[0];
  const needs = (name, found = new Set()) => {
    if (found.has(name)) return found;
    found.add(name);
    const loaded = named.get(name).imports.filter(({ kind, external }) => kind === 'import-statement' && !external);
    for (const { path } of loaded) needs(basename(path), found);
    return found;
  };
  const scripts = new Map();
  const scriptOf = {};
  for (const { script, from } of [first, everyday]) {
    const names = [...needs(entryOf(from))].filter((name) => scriptOf[name] === undefined);
    scripts.set(script, names);
    for (const name of names) scriptOf[name] = script;
  }
  for (const name of named.keys()) if (scriptOf[name] === undefined) scripts.set(name, [name]);
  return { scripts, scriptOf };
}

/** Without spaces, but with names and short lines, by which traces of errors can be read; one byte for each character. */
async function asFunction(text) {
  const { code } = await transform(text, {
    format: 'cjs',
    platform: 'node',
    target: 'es2023',
    supported: { 'dynamic-import': false },
    charset: 'ascii',
    legalComments: 'none',
    minifyWhitespace: true,
    lineLimit: 120,
  });
  return `function (module, exports, require, __dirname) {${escaped(code)}\n}`;
}

/** esbuild leaves what is not ASCII in regular expressions and tagged templates, which may ask for their raw text; none here does. */
function escaped(code) {
  return code.replace(/[^\0-\x7f]/g, (unit) => `\\u${unit.charCodeAt(0).toString(16).padStart(4, '0')}`);
}

/** Commander can start other programs as its commands. None is one here, and Node's part for it takes a while to load. */
const withoutPrograms = {
  name: 'without-programs',
  setup: ({ onResolve, onLoad }) => {
    onResolve({ filter: /^node:child_process$/ }, ({ importer }) =>
      /node_modules.commander/.test(importer) ? { path: 'none', namespace: 'without-programs' } : undefined,
    );
    onLoad({ filter: /^none$/, namespace: 'without-programs' }, () => ({ contents: 'module.exports = {};' }));
  },
};
