// `npm run e2e [-- word]`: runs test/e2e/*.e2e.ts (those with the word in their name) against the built page in a real browser.
import { build } from 'esbuild';
import { cpSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { openBrowser } from './browser.mjs';
import { buildIfStale, DIST } from './build.mjs';
import { writeOfflineWorker } from './offline-worker.mjs';
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

/** Notes what a page does wrong. `origins` are those it may ask. */
function watch(page, origins, problems) {
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
    if (/^(https?|wss?):$/.test(target.protocol) && !origins.has(target.origin)) problems.push(`request to another server: ${target.href}`);
  });
  page.on('response', (response) => {
    if (response.status() >= 400) problems.push(`answer ${response.status()} to ${response.url()}`);
  });
}

/** Notes what the service workers of a visit ask for elsewhere: their requests are none of the page's. */
function watchWorkers(context, origins, problems) {
  context.on('targetcreated', async (target) => {
    if (target.type() !== 'service_worker') return;
    const session = await target.createCDPSession().catch(() => null);
    session?.on('Network.requestWillBeSent', ({ request }) => {
      if (!origins.has(new URL(request.url).origin)) problems.push(`the service worker asks another server: ${request.url}`);
    });
    await session?.send('Network.enable').catch(() => {});
  });
}

/**
 * A copy of the built page on a server of its own, for scenarios that change the build or take the server away.
 * @returns {Promise<{folder: string, url: string, publish: () => Promise<void>, close: () => Promise<void>}>} `publish` makes what was changed in the folder a whole build again
 */
async function ownServer(origins) {
  const folder = mkdtempSync(join(tmpdir(), 'halfmark-page-'));
  cpSync(DIST, folder, { recursive: true });
  const { url, close } = await serve(0, folder);
  origins.add(new URL(url).origin);
  const end = async () => {
    await close();
    rmSync(folder, { recursive: true, force: true });
  };
  return { folder, url, publish: () => writeOfflineWorker(folder), close, end };
}

/** Runs one scenario. @returns {Promise<string[]>} what went wrong */
async function runScenario(browser, url, { run }) {
  const problems = [];
  const origins = new Set([new URL(url).origin]);
  const servers = [];
  const context = await browser.createBrowserContext();
  watchWorkers(context, origins, problems);
  let timer;
  try {
    const page = await context.newPage();
    await page.setViewport({ width: 1440, height: 900 });
    watch(page, origins, problems);
    const serveCopy = async () => {
      const server = await ownServer(origins);
      servers.push(server);
      return server;
    };
    const open = async (path = '') => void (await page.goto(url + path, { waitUntil: 'networkidle0' }));
    const late = new Promise((_, reject) => (timer = setTimeout(() => reject(new Error(`not done after ${PATIENCE / 1000} s`)), PATIENCE)));
    await Promise.race([run({ page, url, open, problems, serveCopy }), late]);
    // Errors in flight arrive before the page answers this.
    await page.evaluate(() => new Promise((done) => setTimeout(done, 50)));
  } catch (error) {
    problems.push(error?.stack ?? String(error));
  } finally {
    clearTimeout(timer);
    await context.close();
    for (const server of servers) await server.end();
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
