import { existsSync, readFileSync, readdirSync } from 'node:fs';
import { dirname, join, normalize, relative } from 'node:path';
import { describe, expect, it } from 'vitest';

const ROOT = join(import.meta.dirname, '..');
/** Which top-level folders each may import from. Arrows point one way: solver and presets know nobody, src joins, components draw. */
const MAY_IMPORT: Record<string, string[]> = { solver: ['solver'], presets: ['presets'], src: ['src', 'solver', 'presets'], components: ['components', 'src', 'solver'] };

function sources(folder: string): string[] {
  if (!existsSync(join(ROOT, folder))) return [];
  return readdirSync(join(ROOT, folder), { recursive: true, encoding: 'utf8' })
    .filter((name) => name.endsWith('.ts'))
    .map((name) => join(folder, name));
}

function imports(file: string): string[] {
  const text = readFileSync(join(ROOT, file), 'utf8');
  return [...text.matchAll(/(?:from|import)\s*\(?\s*['"]([^'"]+)['"]/g)].map((m) => m[1]);
}

describe('the architecture', () => {
  for (const [folder, allowed] of Object.entries(MAY_IMPORT)) {
    it(`${folder}/ imports only ${allowed.join(', ')}`, () => {
      for (const file of sources(folder)) {
        for (const target of imports(file)) {
          if (!target.startsWith('.')) {
            if (folder === 'solver' || folder === 'presets') throw new Error(`${file} imports the package ${target}; ${folder}/ imports no package`);
            continue;
          }
          const to = relative(ROOT, normalize(join(ROOT, dirname(file), target))).split(/[\\/]/)[0];
          expect(allowed, `${file} imports ${target}`).toContain(to);
        }
      }
    });
  }

  it('is checked on files that are there', () => {
    expect(sources('solver').length).toBeGreaterThan(20);
  });

  it('keeps pages and machines out of solver/', () => {
    for (const file of sources('solver')) {
      const code = readFileSync(join(ROOT, file), 'utf8').replace(/\/\*[\s\S]*?\*\/|\/\/.*$/gm, '');
      expect(code, file).not.toMatch(/\b(document|window|process|globalThis|performance|Date|Math\.random)\b[.(]/);
    }
  });

  it('keeps download hosts out of the lock file', () => {
    expect(readFileSync(join(ROOT, 'package-lock.json'), 'utf8')).not.toContain('"resolved": "http');
  });
});
