// Counts the browser tests, and what the runner itself lets pass: a file without tests, a file that never finished, errors outside any test.
import { relative } from 'node:path';
import { writeFileSync } from 'node:fs';
import { ROOT } from './root.mjs';

function tests(suite) {
  return suite ? [...suite.tests, ...suite.suites.flatMap(tests)] : [];
}

/**
 * @param {{testFile: string, passed?: boolean, errors: {message: string}[], testResults?: object}[]} sessions one a test file
 * @returns {{passed: number, failed: number, complaints: string[]}}
 */
export function countSessions(sessions) {
  let passed = 0;
  let failed = 0;
  const complaints = [];
  const complain = (text) => {
    failed++;
    complaints.push(text);
  };
  if (sessions.length === 0) complain('no browser test file was run');
  for (const session of sessions) {
    const file = relative(ROOT, session.testFile);
    const all = tests(session.testResults);
    const bad = all.filter((test) => !test.passed && !test.skipped).length;
    passed += all.filter((test) => test.passed && !test.skipped).length;
    failed += bad;
    if (session.errors.length > 0) complain(`${file}: ${session.errors.map((error) => error.message).join('; ')}`);
    else if (all.length === 0) complain(`${file}: holds no test`);
    else if (!session.passed && bad === 0) complain(`${file}: did not finish`);
  }
  return { passed, failed, complaints };
}

/** A reporter of the test runner that writes the count as JSON into `file` (if one is given) and fails the run if anything failed. */
export function browserReport(file) {
  return {
    onTestRunFinished({ sessions }) {
      const { passed, failed, complaints } = countSessions(sessions);
      if (file) writeFileSync(file, JSON.stringify({ passed, failed }));
      for (const text of complaints) console.error(text);
      console.log(`${passed} browser tests passed, ${failed} failed`);
      if (failed > 0) process.on('exit', () => (process.exitCode = 1));
    },
  };
}
