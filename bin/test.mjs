// npm test: installs what is missing, builds, checks the sources and runs all tests. Words after `--` go to vitest.
import { join } from 'node:path';
import { build, findOrInstallBrowser, installPackages, root, run } from './setup.mjs';

const words = process.argv.slice(2);
installPackages();
const browser = findOrInstallBrowser();
build();
if (words.length === 0) run(process.execPath, ['bin/check.mjs']);
run(
  process.execPath,
  [join(root, 'node_modules/vitest/vitest.mjs'), 'run', '--config', 'test/vitest.config.ts', ...words],
  { env: { ...process.env, CHROMIUM: browser } },
);
