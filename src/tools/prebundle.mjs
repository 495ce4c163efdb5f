// Packages the browser tests cannot load file by file (CommonJS inside, or hundreds of files), bundled into one module each.
import { build } from 'esbuild';
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { CACHE, ROOT } from './root.mjs';

/**
 * @param {string[]} packages names as written in an import
 * @returns a plugin of the test runner that sends these imports to the bundles
 */
export async function prebundled(packages) {
  const folder = join(CACHE, 'browser');
  const addresses = new Map();
  for (const name of packages) {
    const version = JSON.parse(readFileSync(join(ROOT, 'node_modules', name, 'package.json'), 'utf8')).version;
    const file = `${name.replaceAll('/', '-')}-${version}.js`;
    addresses.set(name, `/node_modules/.cache/browser/${file}`);
    if (existsSync(join(folder, file))) continue;
    await build({ entryPoints: [name], absWorkingDir: ROOT, bundle: true, format: 'esm', platform: 'browser', outfile: join(folder, file), logLevel: 'error' });
  }
  return { name: 'prebundled', resolveImport: ({ source }) => addresses.get(source) };
}
