// Builds everything that is made from the sources: the kernel, the command line, the page and the library.
import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, readdirSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { buildCommandLine } from './command-line.mjs';

const root = fileURLToPath(new URL('..', import.meta.url));
const at = (...parts) => join(root, ...parts);

function newest(folder) {
  let time = 0;
  for (const entry of readdirSync(folder, { withFileTypes: true, recursive: true })) {
    if (entry.isFile()) time = Math.max(time, statSync(join(entry.parentPath, entry.name)).mtimeMs);
  }
  return time;
}

function buildKernel() {
  const target = at('build', 'kernel.ts');
  const made = existsSync(target) ? statSync(target).mtimeMs : 0;
  if (made > Math.max(newest(at('assembly')), statSync(at('asconfig.json')).mtimeMs)) return;
  const asc = at('node_modules', 'assemblyscript', 'bin', 'asc.js');
  const run = spawnSync(process.execPath, [asc, '--config', 'asconfig.json', '--target', 'release'], {
    cwd: root,
    stdio: 'inherit',
  });
  if (run.status !== 0) process.exit(run.status ?? 1);
  const bytes = readFileSync(at('build', 'kernel.wasm')).toString('base64');
  writeFileSync(target, `// Made by npm run build from assembly/.\nexport const kernelBase64 =\n  '${bytes}';\n`);
}

function writeScript(name, from, content) {
  writeFileSync(at('build', name), `// Made by npm run build from ${from}.\nexport const ${content};\n`);
}

const shared = { absWorkingDir: root, bundle: true, format: 'esm', target: 'es2023', logLevel: 'warning' };

/** The script of a thread, as text. */
async function threadScript(name, from, constant) {
  const { build } = await import('esbuild');
  const script = {
    entryPoints: [from],
    format: 'cjs',
    platform: 'node',
    packages: 'bundle',
    minify: true,
    write: false,
  };
  const { outputFiles } = await build({ ...shared, ...script });
  writeScript(name, from, `${constant}: string =\n  ${JSON.stringify(outputFiles[0].text)}`);
}

async function bundle() {
  const { build } = await import('esbuild');
  // The page goes into the command line as text, so it is built first.
  if (existsSync(at('src/page/main.ts'))) {
    await build({
      ...shared,
      entryPoints: ['src/page/main.ts'],
      format: 'iife',
      platform: 'browser',
      minify: true,
      outfile: 'build/page.js',
      charset: 'utf8',
    });
    const script = readFileSync(at('build', 'page.js'), 'utf8');
    writeScript('page-script.ts', 'src/page/', `pageScript: string =\n  ${JSON.stringify(script)}`);
  }
  // The script of a thread goes into the command line and the library as text, so that both find it wherever they are put.
  await threadScript('worker-script.ts', 'src/threads/worker.ts', 'workerScript');
  await threadScript('sweep-worker-script.ts', 'src/cli/sweep/worker.ts', 'sweepWorkerScript');
  const node = { ...shared, platform: 'node', packages: 'bundle', minifySyntax: true };
  const banner = {
    js: "import { createRequire as createRequireHere } from 'node:module'; const require = createRequireHere(import.meta.url);",
  };
  await buildCommandLine(shared, at('build', 'cli'));
  if (existsSync(at('src/index.ts'))) {
    await build({ ...node, banner, entryPoints: { index: 'src/index.ts' }, outdir: 'build' });
  }
}

mkdirSync(at('build'), { recursive: true });
buildKernel();
await bundle();
