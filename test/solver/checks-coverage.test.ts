import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';

const FIXTURES = join(import.meta.dirname, '../fixtures');
const files = readdirSync(FIXTURES).filter((name) => /^checks-(.|rho-c)\.json$/.test(name));
const tests = readdirSync(import.meta.dirname).filter((name) => name.endsWith('.test.ts') && name !== 'checks-coverage.test.ts').map((name) => readFileSync(join(import.meta.dirname, name), 'utf8')).join('\n');

describe('the published checks', () => {
  for (const name of files) {
    const { checks } = JSON.parse(readFileSync(join(FIXTURES, name), 'utf8')) as { checks: { id: string; what: string; source: { author: string; title: string; year: number }; checked: string; expected: unknown[] }[] };

    it(`of ${name} are all run by some test`, () => {
      const idle = checks.filter(({ id }) => !tests.includes(`'${id}'`)).map(({ id }) => id);
      expect(idle).toEqual([]);
    });

    it(`of ${name} all state their source and something to hold`, () => {
      for (const c of checks) {
        expect(c.source.author && c.source.title && c.what, c.id).toBeTruthy();
        expect(c.source.year, c.id).toBeGreaterThan(1900);
        expect(['page', 'memory', 'computed'], c.id).toContain(c.checked);
        expect(c.expected.length, c.id).toBeGreaterThan(0);
      }
    });
  }

  it('cover all ten topics, metal contacts in two files', () => {
    expect(files).toHaveLength(11);
  });
});
