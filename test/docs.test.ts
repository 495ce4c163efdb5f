import { build } from 'esbuild';
import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';

const ROOT = join(import.meta.dirname, '..');

describe('the README', () => {
  it('has an example that runs as it stands', async () => {
    const block = /```ts\n([\s\S]*?)```/.exec(readFileSync(join(ROOT, 'README.md'), 'utf8'));
    if (!block) throw new Error('README.md has no example');
    const bundle = await build({ stdin: { contents: block[1], resolveDir: ROOT, loader: 'ts' }, bundle: true, platform: 'node', format: 'esm', write: false, logLevel: 'silent' });
    const printed = execFileSync(process.execPath, ['--input-type=module', '-'], { input: bundle.outputFiles[0].text, encoding: 'utf8' });
    // Boltzmann statistics with complete ionisation give kT ln(1e18 1e16/ni^2), some 0.83 V; incomplete ionisation takes a few mV off.
    const builtIn = Number.parseFloat(printed);
    expect(builtIn).toBeGreaterThan(0.75);
    expect(builtIn).toBeLessThan(0.86);
    expect(printed).toContain('converged: true');
  });
});
