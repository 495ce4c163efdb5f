// `npm run bench`: speed of the kernels, test/bench/bench.ts.
import { runBundled } from './bundled.mjs';

await runBundled('bench', 'test/bench/bench.ts', ['test/bench', 'src', 'solver', 'presets']);
// The page comes last: it needs a build and a browser.
if (!process.argv.includes('--kernels')) await import('./bench-page.mjs');
