// Runs TypeScript of the project in Node: bundled once, again only when a source has changed.
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, renameSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { files } from './build.mjs';
import { installMissing } from './install.mjs';
import { CACHE, ROOT } from './root.mjs';

/**
 * Imports the bundle of `entry`, which reads `process.argv` like any program.
 * @param {string} name of the bundle
 * @param {string} entry path from the project's top folder
 * @param {string[]} places files and folders whose change asks for a new bundle
 */
export async function runBundled(name, entry, places) {
  const stamp = createHash('sha256');
  for (const { path, mtimeMs, size } of files([...places, 'package-lock.json'])) stamp.update(`${path}\0${mtimeMs}\0${size}\n`);
  const out = join(CACHE, `${name}-${stamp.digest('hex').slice(0, 16)}.mjs`);
  // The packages are looked at only here: a bundle that is there needs none of them.
  if (!existsSync(out)) {
    installMissing();
    await bundle(name, entry, out);
  }
  await import(pathToFileURL(out).href);
}

async function bundle(name, entry, out) {
  const { build } = await import('esbuild');
  mkdirSync(CACHE, { recursive: true });
  const unfinished = `${out}.${process.pid}`;
  await build({
    entryPoints: [join(ROOT, entry)],
    absWorkingDir: ROOT,
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    // Packages written for CommonJS call require, which an ES module lacks.
    banner: { js: "import { createRequire as requireFor } from 'node:module'; const require = requireFor(import.meta.url);" },
    outfile: unfinished,
    logLevel: 'error',
  });
  const older = new RegExp(`^${name}-[0-9a-f]{16}\\.mjs$`);
  for (const file of readdirSync(CACHE)) if (older.test(file)) rmSync(join(CACHE, file), { force: true });
  // Whole or not at all: of two commands at once neither reads half a bundle.
  renameSync(unfinished, out);
}
