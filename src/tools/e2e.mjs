// `npm run e2e [-- word]`: runs test/e2e/*.e2e.ts (those with the word in their name) against the built page in a real browser.
import { build } from 'esbuild';
import { readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { openBrowser } from './browser.mjs';
import { buildIfStale } from './build.mjs';
import { CACHE, ROOT } from './root.mjs';
import { serve } from './serve.mjs';

const FOLDER = join(ROOT, 'test/e2e');
/** Longest a scenario may take, ms. */
const PATIENCE = 60_000;

/** Bundles one file together with its harness, and reads what it registered. */
async function scenariosOf(file) {
  const outfile = join(CACHE, 'e2e', file.replace(/\.ts$/, '.mjs'));
  const contents = `import ${JSON.stringify(`./${file}`)}; export { scenarios } from './harness.ts';`;
  const stdin = { contents, resolveDir: FOLDER, loader: 'ts' };
  await build({ stdin, bundle: true, platform: 'node', format: 'esm', packages: 'external', sourcemap: 'inline', outfile, logLevel: 'error' });
  return (await import(pathToFileURL(outfile).href)).scenarios;
}

/** Notes what a page does wrong. */
function watch(page, url, problems) {
  page.on('pageerror', (error) => problems.push(`error in the page: ${error.stack ?? error}`));
  page.on('console', (message) => {
    if (message.type() === 'error') problems.push(`console error: ${message.text()} ${message.location().url ?? ''}`);
  });
  page.on('requestfailed', (request) => {
    // Leaving a page aborts what it was loading.
    const reason = request.failure()?.errorText;
    if (reason !== 'net::ERR_ABORTED') problems.push(`request failed: ${request.url()} ${reason}`);
  });
  page.on('request', (request) => {
    const target = new URL(request.url());
    if (/^(https?|wss?):$/.test(target.protocol) && target.origin !== new URL(url).origin) problems.push(`request to another server: ${target.href}`);
  });
  page.on('response', (response) => {
    if (response.status() >= 400) problems.push(`answer ${response.status()} to ${response.url()}`);
  });
}

/** Runs one scenario. @returns {Promise<string[]>} what went wrong */
async function runScenario(browser, url, { run }) {
  const problems = [];
  const context = await browser.createBrowserContext();
  let timer;
  try {
    const page = await context.newPage();
    await page.setViewport({ width: 1440, height: 900 });
    watch(page, url, problems);
    const open = async (path = '') => void (await page.goto(url + path, { waitUntil: 'networkidle0' }));
    const late = new Promise((_, reject) => (timer = setTimeout(() => reject(new Error(`not done after ${PATIENCE / 1000} s`)), PATIENCE)));
    await Promise.race([run({ page, url, open, problems }), late]);
    // Errors in flight arrive before the page answers this.
    await page.evaluate(() => new Promise((done) => setTimeout(done, 50)));
  } catch (error) {
    problems.push(error?.stack ?? String(error));
  } finally {
    clearTimeout(timer);
    await context.close();
  }
  return problems;
}

await buildIfStale();
const word = process.argv[2] ?? '';
const names = readdirSync(FOLDER).filter((name) => name.endsWith('.e2e.ts') && name.includes(word)).sort();
let passed = 0;
let failed = 0;
const { url, close } = await serve(0);
const browser = await openBrowser();
try {
  for (const file of names) {
    console.log(`\n${file}`);
    const found = await scenariosOf(file).catch((error) => [{ name: 'can be read', run: () => Promise.reject(error) }]);
    if (found.length === 0) found.push({ name: 'holds a scenario', run: () => Promise.reject(new Error('none is registered')) });
    for (const scenario of found) {
      const problems = await runScenario(browser, url, scenario);
      if (problems.length === 0) passed++;
      else failed++;
      console.log(`  ${problems.length === 0 ? 'passed' : 'FAILED'}  ${scenario.name}`);
      for (const problem of problems) console.log(`    ${problem.replaceAll('\n', '\n    ')}`);
    }
  }
} finally {
  await browser.close();
  await close();
}
if (names.length === 0) {
  console.error('no scenario file was found');
  failed++;
}
if (process.env.E2E_REPORT) writeFileSync(process.env.E2E_REPORT, JSON.stringify({ passed, failed }));
console.log(`\n${passed} scenarios passed, ${failed} failed`);
process.exitCode = failed > 0 ? 1 : 0;
