import { describe, expect, it } from 'vitest';
import { countSessions } from '../../src/tools/browser-report.mjs';

const test = (passed, skipped = false) => ({ name: 'test', passed, skipped });
const session = (more) => ({ testFile: 'a.browser.ts', passed: true, errors: [], testResults: { name: '', tests: [test(true)], suites: [] }, ...more });

describe('the count of browser tests', () => {
  it('takes tests from suites within suites and leaves skipped ones out', () => {
    const inner = { name: 'inner', tests: [test(true), test(false, true)], suites: [] };
    const testResults = { name: '', tests: [test(true)], suites: [{ name: 'outer', tests: [test(false)], suites: [inner] }] };
    expect(countSessions([session({ testResults, passed: false })])).toEqual({ passed: 2, failed: 1, complaints: [] });
  });

  it('fails a file without tests, which the runner calls passed', () => {
    expect(countSessions([session({ testResults: { name: '', tests: [], suites: [] } })])).toMatchObject({ passed: 0, failed: 1 });
  });

  it('fails a file with an error outside its tests, beside those that passed', () => {
    expect(countSessions([session({ errors: [{ message: 'thrown late' }] })])).toMatchObject({ passed: 1, failed: 1 });
  });

  it('fails a file that never finished', () => {
    expect(countSessions([session({ passed: false })])).toMatchObject({ passed: 1, failed: 1 });
  });

  it('fails a run of no files', () => {
    expect(countSessions([])).toMatchObject({ passed: 0, failed: 1 });
  });
});
