// Before any test: the built kernel, page and command line are those of the sources.
import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('..', import.meta.url));
const sources = ['src', 'assembly', 'bin', 'asconfig.json', 'package-lock.json'];

export default function buildWhereStale(): void {
  const built = join(root, 'build/cli/skein.js');
  const newest = Math.max(...sources.map((source) => changedAt(join(root, source))));
  if (existsSync(built) && statSync(built).mtimeMs > newest) return;
  const { status } = spawnSync(process.execPath, ['bin/build.mjs'], { cwd: root, stdio: 'inherit' });
  if (status !== 0) throw new Error('The build failed.');
}

/** Of the newest file in a folder, or of the file itself. */
function changedAt(path: string): number {
  if (!statSync(path).isDirectory()) return statSync(path).mtimeMs;
  const files = readdirSync(path, { withFileTypes: true, recursive: true }).filter((entry) => entry.isFile());
  return Math.max(...files.map((entry) => statSync(join(entry.parentPath, entry.name)).mtimeMs));
}
