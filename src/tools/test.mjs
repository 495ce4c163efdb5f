// `npm test`: installs what is missing, then types and tests; ends with the count alone on the last line.
import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

const npm = process.platform === 'win32' ? 'npm.cmd' : 'npm';
const run = (command, args) => spawnSync(command, args, { stdio: 'inherit', shell: process.platform === 'win32' }).status ?? 1;

if (!existsSync('node_modules/vitest') && run(npm, ['ci']) !== 0) process.exit(1);
let passed = 0;
let failed = 0;
const count = (ok) => (ok ? passed++ : failed++);

console.log('Types');
count(run('node', ['node_modules/typescript/bin/tsc', '--noEmit']) === 0);

const report = join(mkdtempSync(join(tmpdir(), 'halfmark-')), 'vitest.json');
const status = run('node', ['node_modules/vitest/vitest.mjs', 'run', '--reporter=default', '--reporter=json', `--outputFile=${report}`]);
try {
  const json = JSON.parse(readFileSync(report, 'utf8'));
  passed += json.numPassedTests;
  failed += json.numFailedTests + json.testResults.filter((f) => f.status === 'failed' && f.assertionResults.length === 0).length;
  // An error outside any test fails the run without failing a test.
  if (json.numTotalTests === 0 || (status !== 0 && failed === 0)) failed++;
} catch (error) {
  console.error(`vitest left no report: ${error.message}`);
  failed++;
}
console.log(`${passed} passed, ${failed} failed`);
process.exit(failed > 0 ? 1 : 0);
