// `npm run fuzz`: hostile and random input for as long as it is asked to, test/fuzz/fuzz.ts.
import { runBundled } from './bundled.mjs';

await runBundled('fuzz', 'test/fuzz/fuzz.ts', ['test', 'src', 'solver', 'presets']);
