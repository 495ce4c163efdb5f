// `npm test`: installs what is missing, then types, tests in Node, tests in a browser, the production build with its size, and scenarios against that
// build. Counts come from the runners' own reports; the last line is the count alone.
import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { installMissing } from './install.mjs';
import { ROOT } from './root.mjs';

installMissing();
const reports = mkdtempSync(join(tmpdir(), 'halfmark-'));
let passed = 0;
let failed = 0;

/** Runs a script of Node's. @returns {boolean} whether it ended well */
function run(title, script, args = [], env = {}) {
  console.log(`\n== ${title}`);
  return spawnSync(process.execPath, [join(ROOT, script), ...args], { cwd: ROOT, stdio: 'inherit', env: { ...process.env, ...env } }).status === 0;
}

/** A step that counts as one test. */
function step(title, script, args) {
  const ok = run(title, script, args);
  if (ok) passed++;
  else failed++;
  return ok;
}

/** A runner that leaves a report; `read` takes the counts out of it. */
function suite(title, script, args, env, report, read) {
  const ok = run(title, script, args, env);
  let counts;
  try {
    counts = read(JSON.parse(readFileSync(report, 'utf8')));
  } catch (error) {
    console.error(`${title}: left no report (${error.message})`);
    counts = { passed: 0, failed: 1 };
  }
  // A run without tests, or one that ended badly although no test failed, is a failure as well.
  if (counts.failed === 0 && (!ok || counts.passed === 0)) counts.failed = 1;
  passed += counts.passed;
  failed += counts.failed;
}

step('Types', 'node_modules/typescript/bin/tsc', ['--noEmit']);

const vitest = join(reports, 'vitest.json');
suite('Tests in Node', 'node_modules/vitest/vitest.mjs', ['run', '--reporter=default', '--reporter=json', `--outputFile=${vitest}`], {}, vitest, (json) => ({
  passed: json.numPassedTests,
  failed: json.numFailedTests + json.testResults.filter((file) => file.status === 'failed' && file.assertionResults.length === 0).length,
}));

const browser = join(reports, 'browser.json');
suite('Tests in a browser', 'node_modules/@web/test-runner/dist/bin.js', [], { BROWSER_REPORT: browser }, browser, (json) => json);

if (step('Production build', 'src/tools/build.mjs')) {
  step('Size of the first load', 'src/tools/size.mjs');
  const e2e = join(reports, 'e2e.json');
  suite('Scenarios against the production build', 'src/tools/e2e.mjs', [], { E2E_REPORT: e2e }, e2e, (json) => json);
}

rmSync(reports, { recursive: true, force: true });
console.log(`${passed} passed, ${failed} failed`);
process.exitCode = failed > 0 ? 1 : 0;
