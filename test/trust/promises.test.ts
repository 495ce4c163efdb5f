import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';

const ROOT = join(import.meta.dirname, '../..');
const text = (name: string): string => readFileSync(join(ROOT, name), 'utf8');
const rows = text('src/help/promises.md')
  .split('\n')
  .filter((line) => line.startsWith('|') && !line.startsWith('|--') && !line.startsWith('| promise'))
  .map((line) => line.slice(1, -1).split('|').map((cell) => cell.trim()));

/** Whether a file registers a test whose name is this, or begins so and goes on with what differs between its cases. */
function registers(source: string, name: string): boolean {
  const starts = [...source.matchAll(/\b(?:it|test|scenario)\(\s*(['"`])((?:\\.|(?!\1).)*)\1/gs)].map(([, , found]) => found.replace(/\\(['"`])/g, '$1'));
  return starts.some((found) => found === name || (found.includes('${') && found.split('${')[0].trim() === name));
}

describe('what is promised', () => {
  it('is held by a test that exists under its name, each time', () => {
    expect(rows.length).toBeGreaterThan(25);
    for (const row of rows) {
      expect(row, row.join(' | ')).toHaveLength(3);
      const [promise, file, name] = row;
      expect(promise).toMatch(/\.$/);
      expect(file).toMatch(/^test\/.*\.(test\.ts|test\.mjs|browser\.ts|e2e\.ts)$/);
      expect(existsSync(join(ROOT, file)), file).toBe(true);
      expect(registers(text(file), name), `${file}: ${name}`).toBe(true);
    }
  });

  it('would be noticed if its test were gone', () => {
    expect(registers(text('test/export/link.test.ts'), 'gives every starter back as it was')).toBe(true);
    expect(registers(text('test/export/link.test.ts'), 'gives every starter back')).toBe(false);
    expect(registers("it.skip('a promise', () => {});", 'a promise')).toBe(false);
  });
});
