// `npm run licences`: writes src/help/licences.txt, the licences of every package that the page, the library and the command line carry with them.
import { existsSync, mkdirSync, readFileSync, readdirSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { ROOT } from './root.mjs';

export const LICENCES_FILE = join(ROOT, 'src/help/licences.txt');

/** @returns {{name: string, version: string, licence: string, text: string}[]} packages of the lock file that are not for development only, in order of name */
export function shippedPackages() {
  const { packages } = JSON.parse(readFileSync(join(ROOT, 'package-lock.json'), 'utf8'));
  const { devDependencies } = packages[''];
  return Object.entries(packages)
    .filter(([path, { dev, devOptional, optional, peer }]) => path.startsWith('node_modules/') && !dev && !devOptional && !optional && !peer)
    // One that some package only wishes beside itself, and development has.
    .filter(([path]) => !(path.slice('node_modules/'.length) in devDependencies))
    .map(([path, { version }]) => {
      const folder = join(ROOT, path);
      const { name, license } = JSON.parse(readFileSync(join(folder, 'package.json'), 'utf8'));
      const file = readdirSync(folder).find((candidate) => /^licen[cs]e(\.(md|txt))?$/i.test(candidate));
      return { name, version, licence: license ?? 'not stated', text: file === undefined ? '' : readFileSync(join(folder, file), 'utf8').replaceAll('\r\n', '\n').trim() };
    })
    .sort((a, b) => (a.name < b.name ? -1 : 1));
}

export function licencesText() {
  const packages = shippedPackages();
  const list = packages.map(({ name, version, licence }) => `${name} ${version}: ${licence}`);
  const texts = packages.map(({ name, version, licence, text }) => `${'-'.repeat(80)}\n${name} ${version}\n\n${text || `The package states "${licence}" and brings no text of it.`}`);
  return `Halfmark carries these packages with it, each under the licence of its authors.\n\n${list.join('\n')}\n\n${texts.join('\n\n')}\n`;
}

if (process.argv[1] !== undefined && existsSync(process.argv[1]) && import.meta.url === pathToFileURL(process.argv[1]).href) {
  mkdirSync(dirname(LICENCES_FILE), { recursive: true });
  writeFileSync(LICENCES_FILE, licencesText());
}
