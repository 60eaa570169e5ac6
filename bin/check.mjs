// npm run check: types, lint, format and unused code, each with the tool that knows it best. All are told before it fails.
import { spawnSync } from 'node:child_process';
import { join } from 'node:path';
import { build, installPackages, root } from './setup.mjs';

installPackages();
build();
const tools = [
  ['types', 'typescript/bin/tsc', ['--noEmit']],
  ['lint', 'eslint/bin/eslint.js', ['.', '--max-warnings=0']],
  ['format', 'prettier/bin/prettier.cjs', ['--check', '.', '--log-level', 'warn']],
  ['unused code', 'knip/bin/knip.js', ['--no-progress']],
];
let failed = 0;
for (const [name, script, words] of tools) {
  const { status } = spawnSync(process.execPath, [join(root, 'node_modules', script), ...words], {
    cwd: root,
    stdio: 'inherit',
  });
  console.error(status === 0 ? `check: ${name} fine` : `check: ${name} FAILED`);
  if (status !== 0) failed++;
}
process.exitCode = failed === 0 ? 0 : 1;
