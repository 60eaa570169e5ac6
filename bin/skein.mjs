#!/usr/bin/env node
// Starts the built command line.
import { existsSync } from 'node:fs';

const built = new URL('../build/cli/skein.js', import.meta.url);
if (existsSync(built)) await import(built.href);
else {
  console.error('skein is not built yet. Run `npm ci` and `npm run build` in its folder first.');
  process.exitCode = 3;
}
