import { build } from 'esbuild';
import { execFileSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { describe, expect, it } from 'vitest';

const ROOT = join(import.meta.dirname, '..');
const text = (name: string): string => readFileSync(join(ROOT, name), 'utf8');
const examples = [...text('README.md').matchAll(/```ts\n([\s\S]*?)```/g)].map((m) => m[1]);

async function output(example: string): Promise<string> {
  const bundle = await build({
    stdin: { contents: example, resolveDir: ROOT, loader: 'ts' }, bundle: true, platform: 'node', format: 'esm', write: false, logLevel: 'silent',
    banner: { js: "import { createRequire as requireFor } from 'node:module'; const require = requireFor(import.meta.url);" },
  });
  return execFileSync(process.execPath, ['--input-type=module', '-'], { input: bundle.outputFiles[0].text, encoding: 'utf8' });
}

describe('the README', () => {
  it('has examples that run as they stand', { timeout: 60_000 }, async () => {
    expect(examples).toHaveLength(2);
    for (const example of examples) {
      const printed = await output(example);
      // Boltzmann statistics with complete ionisation give kT ln(1e18 1e16/ni^2): some 0.83 V at 300 K, 0.75 V at 350 K; incomplete ionisation takes a few mV off.
      const builtIn = Number.parseFloat(printed);
      expect(builtIn).toBeGreaterThan(0.7);
      expect(builtIn).toBeLessThan(0.86);
      expect(printed).toMatch(/converged: true/);
    }
  });
});

describe('every page of the docs', () => {
  for (const page of ['README.md', 'DEVELOPERS.md']) {
    it(`${page} points at files that are there`, () => {
      const links = [...text(page).matchAll(/\]\(([^)#:]+)\)/g)].map((m) => join(dirname(page), m[1]));
      const named = [...text(page).matchAll(/`((?:src|solver|components|presets|test)\/[\w./-]+\.\w+)`/g)].map((m) => m[1]);
      for (const file of [...links, ...named]) expect(existsSync(join(ROOT, file)), file).toBe(true);
      expect(links.length + named.length).toBeGreaterThan(2);
    });

    it(`${page} names commands that package.json has`, () => {
      const scripts = Object.keys((JSON.parse(text('package.json')) as { scripts: Record<string, string> }).scripts);
      for (const [, name] of text(page).matchAll(/npm run (?:-s )?([a-z0-9-]+)/g)) expect(scripts, name).toContain(name);
    });
  }
});
