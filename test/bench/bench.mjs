// npm run bench [-- NAME ...] [--quick] [--rounds N] [--out FILE]: builds everything, then measures. See main.ts.
import { spawnSync } from 'node:child_process';
import { join } from 'node:path';
import { build as bundle } from 'esbuild';
import { build, installPackages, root } from '../../bin/setup.mjs';

installPackages();
build();
const outfile = join(root, 'build', 'bench.mjs');
await bundle({
  absWorkingDir: root,
  bundle: true,
  format: 'esm',
  platform: 'node',
  target: 'es2023',
  logLevel: 'warning',
  entryPoints: ['test/bench/main.ts'],
  outfile,
  external: ['playwright-core'],
  banner: {
    js: "import { createRequire as createRequireHere } from 'node:module'; const require = createRequireHere(import.meta.url);",
  },
});
process.exitCode =
  spawnSync(process.execPath, [outfile, ...process.argv.slice(2)], { cwd: root, stdio: 'inherit' }).status ?? 1;
