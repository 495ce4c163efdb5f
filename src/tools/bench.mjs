// `npm run bench`: bundles test/bench/bench.ts and runs it.
import { build } from 'esbuild';
import { mkdirSync } from 'node:fs';
import { pathToFileURL } from 'node:url';
import { resolve } from 'node:path';

const out = resolve('node_modules/.cache/bench.mjs');
mkdirSync(resolve('node_modules/.cache'), { recursive: true });
await build({ entryPoints: ['test/bench/bench.ts'], bundle: true, platform: 'node', format: 'esm', outfile: out, logLevel: 'error' });
await import(pathToFileURL(out).href);
