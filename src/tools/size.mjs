// `npm run size`: what the browser must load before the page first shows (the entry of index.html and its static imports), compressed.
// Parts loaded when first needed and workers do not count.
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';
import { DIST } from './build.mjs';

/** Most that the first load may take, kB (1000 bytes) of gzip. */
const LIMIT = 200;

const manifest = JSON.parse(readFileSync(join(DIST, '.vite/manifest.json'), 'utf8'));
const parts = new Set();
function follow(key) {
  if (parts.has(key)) return;
  parts.add(key);
  for (const next of manifest[key].imports ?? []) follow(next);
}
follow('index.html');

const sizes = [...parts].map((key) => ({ file: manifest[key].file, kB: gzipSync(readFileSync(join(DIST, manifest[key].file))).length / 1000 }));
for (const { file, kB } of sizes.sort((a, b) => b.kB - a.kB)) console.log(`${kB.toFixed(1).padStart(8)} kB  ${file}`);
const total = sizes.reduce((sum, { kB }) => sum + kB, 0);
console.log(`${total.toFixed(1).padStart(8)} kB  first load, gzip; at most ${LIMIT}`);
// A manifest without scripts would pass any limit.
if (!sizes.some(({ file }) => file.endsWith('.js')) || total > LIMIT) {
  console.error(total > LIMIT ? `The first load is ${(total - LIMIT).toFixed(1)} kB too large.` : 'index.html loads no script.');
  process.exitCode = 1;
}
