// Installs what package.json names and node_modules lacks. Imports no package itself: it runs before there are any.
import { spawnSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { ROOT } from './root.mjs';

const read = (path) => JSON.parse(readFileSync(join(ROOT, path), 'utf8'));

/** @returns {string[]} packages that are absent or of another version than package.json asks for */
export function missingPackages() {
  const { dependencies = {}, devDependencies = {} } = read('package.json');
  return Object.entries({ ...dependencies, ...devDependencies })
    .filter(([name, version]) => {
      const manifest = `node_modules/${name}/package.json`;
      return !existsSync(join(ROOT, manifest)) || read(manifest).version !== version;
    })
    .map(([name]) => name);
}

/** Runs `npm ci` if any package is missing; ends the process if that fails. What npm says goes to standard error: standard output belongs to the command. */
export function installMissing() {
  const missing = missingPackages();
  if (missing.length === 0) return;
  console.error(`Installing: ${missing.length} of the packages are missing (${missing.slice(0, 3).join(', ')}${missing.length > 3 ? ', …' : ''})`);
  const windows = process.platform === 'win32';
  // Other versions of npm warn about keys of package.json they do not know; nothing hangs on it.
  const { status } = spawnSync(windows ? 'npm.cmd' : 'npm', ['ci'], { cwd: ROOT, stdio: ['ignore', 2, 2], shell: windows });
  if (status !== 0) process.exit(status ?? 1);
}
