// Writes the service worker into a built page: the sources of src/offline/worker.ts with the list of the build's files and their hashes.
import { build } from 'esbuild';
import { createHash } from 'node:crypto';
import { readFileSync, readdirSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ROOT } from './root.mjs';

export const WORKER_FILE = 'offline-worker.js';

/** @returns {[string, string][]} every file of the folder that the page may ask for, by its name in addresses, with its hash; the page itself is "" */
export function keptFiles(folder) {
  return readdirSync(folder, { recursive: true, encoding: 'utf8' })
    .map((name) => name.replaceAll('\\', '/'))
    .filter((name) => !name.startsWith('.') && name !== WORKER_FILE && statSync(join(folder, name)).isFile())
    .sort()
    .map((name) => [name === 'index.html' ? '' : name.split('/').map(encodeURIComponent).join('/'), `sha256-${createHash('sha256').update(readFileSync(join(folder, name))).digest('base64')}`]);
}

/** @param {string} folder of the built page, complete but for the worker */
export async function writeOfflineWorker(folder) {
  const files = keptFiles(folder);
  const version = createHash('sha256').update(JSON.stringify(files)).digest('hex').slice(0, 16);
  const { outputFiles } = await build({
    entryPoints: [join(ROOT, 'src/offline/worker.ts')],
    absWorkingDir: ROOT,
    bundle: true,
    minify: true,
    format: 'iife',
    target: 'es2022',
    define: { FILES: JSON.stringify(files), VERSION: JSON.stringify(version) },
    write: false,
    logLevel: 'error',
  });
  writeFileSync(join(folder, WORKER_FILE), outputFiles[0].contents);
}
