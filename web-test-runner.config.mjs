// Tests in a real browser: `npx wtr` runs all, `npx wtr --files test/components/one.browser.ts` one. The runner strips types without checking them (`npm run check` does).
import { esbuildPlugin } from '@web/dev-server-esbuild';
import { defaultReporter } from '@web/test-runner';
import { chromeLauncher } from '@web/test-runner-chrome';
import { join } from 'node:path';
import { browserReport } from './src/tools/browser-report.mjs';
import { chromium } from './src/tools/chromium.mjs';
import { prebundled } from './src/tools/prebundle.mjs';
import { ROOT } from './src/tools/root.mjs';

const { executablePath, env, args, headless } = await chromium();

/** Every test file brings the watch for errors outside tests. */
const watchErrors = {
  name: 'watch-errors',
  transform: ({ path, body }) => (path.endsWith('.browser.ts') ? `${body}\nimport '/test/browser-errors.ts';\n` : undefined),
};

export default {
  files: 'test/**/*.browser.ts',
  rootDir: ROOT,
  nodeResolve: { exportConditions: ['production', 'default'] },
  // One page at a time: files share one origin and with it the stores that some of them break on purpose; and full Chromium with two pages at once times out on
  // pointer drags and screenshots.
  concurrency: 1,
  browsers: [chromeLauncher({ launchOptions: { executablePath, env, args, headless } })],
  plugins: [await prebundled(['mathjs', 'axe-core', 'immer']), watchErrors, esbuildPlugin({ ts: true, target: 'esnext', tsconfig: join(ROOT, 'tsconfig.json') })],
  reporters: [defaultReporter({ reportTestResults: true, reportTestProgress: process.stdout.isTTY === true }), browserReport(process.env.BROWSER_REPORT)],
  testFramework: { config: { timeout: 10_000 } },
  testsFinishTimeout: 240_000,
};
