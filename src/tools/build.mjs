// `npm run build`: the page for production into dist/. Other commands ask for a build that is no older than its sources.
import { existsSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { installMissing } from './install.mjs';
import { ROOT } from './root.mjs';

export const DIST = join(ROOT, 'dist');
const SOURCES = ['index.html', 'vite.config.ts', 'package-lock.json', 'src', 'components', 'solver', 'presets', 'public'];

/** @returns {{path: string, mtimeMs: number, size: number}[]} every file under the given files and folders of the project, in order of path */
export function files(places) {
  const found = [];
  for (const place of places) {
    const path = join(ROOT, place);
    if (!existsSync(path)) continue;
    const names = statSync(path).isDirectory() ? readdirSync(path, { recursive: true, encoding: 'utf8' }).map((name) => join(path, name)) : [path];
    for (const name of names) {
      const stat = statSync(name);
      if (stat.isFile()) found.push({ path: name, mtimeMs: stat.mtimeMs, size: stat.size });
    }
  }
  return found.sort((a, b) => (a.path < b.path ? -1 : 1));
}

/** Builds the page with vite. */
export async function buildPage() {
  const { build } = await import('vite');
  await build({ root: ROOT, configFile: join(ROOT, 'vite.config.ts'), logLevel: 'warn' });
}

/** Builds the page if dist/ is missing or older than any source. */
export async function buildIfStale() {
  const page = join(DIST, 'index.html');
  const built = existsSync(page) ? statSync(page).mtimeMs : -Infinity;
  if (files(SOURCES).every((file) => file.mtimeMs <= built)) return;
  console.log('Building the page');
  await buildPage();
}

if (import.meta.url === pathToFileURL(process.argv[1]).href) {
  installMissing();
  await buildPage();
}
