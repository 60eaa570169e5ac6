// Set-up on a fresh machine: the packages of the lock file, and a browser for the tests of the page.
import { spawnSync } from 'node:child_process';
import { copyFileSync, existsSync, lstatSync, mkdirSync, readFileSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { fileURLToPath } from 'node:url';

export const root = fileURLToPath(new URL('..', import.meta.url));

/** Runs a command in the project's folder and ends this program where it fails. */
export function run(command, words, options = {}) {
  const done = spawnSync(command, words, { cwd: root, stdio: 'inherit', ...options });
  if (done.status !== 0) process.exit(done.status ?? 1);
  return done;
}

/** Installs what the lock file names, unless exactly that is installed already, or packages are linked from another folder. */
export function installPackages() {
  const folder = join(root, 'node_modules');
  const [lock, mark] = [join(root, 'package-lock.json'), join(folder, '.skein-lock.json')];
  // Installing through a link would empty the folder of another copy.
  if (lstatSync(folder, { throwIfNoEntry: false })?.isSymbolicLink()) return;
  if (existsSync(mark) && readFileSync(mark, 'utf8') === readFileSync(lock, 'utf8')) return;
  console.error('Installing the packages of package-lock.json ...');
  run(process.platform === 'win32' ? 'npm.cmd' : 'npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error'], {
    shell: process.platform === 'win32',
    stdio: ['ignore', 'ignore', 'inherit'],
  });
  mkdirSync(folder, { recursive: true });
  copyFileSync(lock, mark);
}

export function build() {
  run(process.execPath, ['bin/build.mjs']);
}

const browserNames = ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable'];

/** Path of a Chromium: named by CHROMIUM, on the PATH, or installed from Debian's packages; else ends with what to do. */
export function findOrInstallBrowser() {
  const found = findBrowser();
  if (found !== null) return found;
  if (existsSync('/usr/bin/apt-get') && process.getuid?.() === 0) {
    console.error('Installing the package chromium for the tests of the page ...');
    const quiet = {
      stdio: ['ignore', 'ignore', 'inherit'],
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
    };
    spawnSync('apt-get', ['update', '-qq'], quiet);
    spawnSync('apt-get', ['install', '-y', '-qq', '--no-install-recommends', 'chromium'], quiet);
  }
  const installed = findBrowser();
  if (installed !== null) return installed;
  console.error(
    'The tests of the page need Chromium, and none was found.\n' +
      'Install it (on Debian or Ubuntu: `sudo apt-get install chromium`),\n' +
      'or name one: `CHROMIUM=/path/to/chromium npm test`.',
  );
  process.exit(1);
}

function findBrowser() {
  const named = process.env.CHROMIUM;
  if (named !== undefined && named !== '') return existsSync(named) ? named : null;
  for (const folder of (process.env.PATH ?? '').split(delimiter)) {
    for (const name of browserNames) if (existsSync(join(folder, name))) return join(folder, name);
  }
  return null;
}
