import { spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { LICENCES_FILE, licencesText, shippedPackages } from '../../src/tools/licences.mjs';
import { ROOT } from '../../src/tools/root.mjs';

/** Licences that ask for no more than that their text is kept. */
const FREE = /^(MIT|ISC|BSD-[23]-Clause|Apache-2\.0|0BSD)$/;
/** The fonts name no licence of the list: theirs, read by eye, lets them be embedded, copied and passed on with its text, though not sold by themselves. */
const READ = { 'dejavu-fonts-ttf': 'Bitstream Vera Fonts Copyright' };

describe('the packages that ship', () => {
  it('are listed with their licences as they are installed: npm run licences', () => {
    expect(readFileSync(LICENCES_FILE, 'utf8')).toBe(licencesText());
  });

  it('are free to be passed on, each with the text of its licence or its name', () => {
    const packages = shippedPackages();
    expect(packages.map(({ name }) => name)).toEqual(expect.arrayContaining(['lit', 'mathjs', 'idb', 'valibot', 'immer', 'dejavu-fonts-ttf']));
    for (const { name, licence, text } of packages) {
      if (name in READ) expect(text, name).toContain(READ[name]);
      else expect(licence, name).toMatch(FREE);
    }
  });

  it('are those that package.json names and what they need, none of which only development needs', () => {
    const { dependencies, devDependencies } = JSON.parse(readFileSync(join(ROOT, 'package.json'), 'utf8'));
    const names = shippedPackages().map(({ name }) => name);
    expect(names).toEqual(expect.arrayContaining(Object.keys(dependencies)));
    for (const name of Object.keys(devDependencies)) if (!(name in dependencies)) expect(names).not.toContain(name);
  });

  it('are fixed to one version each, held by a hash, need nothing that is not listed, and run nothing when they are installed', () => {
    const { packages } = JSON.parse(readFileSync(join(ROOT, 'package-lock.json'), 'utf8'));
    const manifest = JSON.parse(readFileSync(join(ROOT, 'package.json'), 'utf8'));
    for (const [name, version] of Object.entries({ ...manifest.dependencies, ...manifest.devDependencies })) expect(version, name).toMatch(/^\d+\.\d+\.\d+$/);
    const shipped = shippedPackages();
    const reached = new Set();
    const follow = (name) => {
      if (reached.has(name)) return;
      reached.add(name);
      for (const next of Object.keys(packages[`node_modules/${name}`]?.dependencies ?? {})) follow(next);
    };
    Object.keys(manifest.dependencies).forEach(follow);
    // What is listed is what is needed, no more and no less.
    expect(shipped.map(({ name }) => name)).toEqual([...reached].sort());
    for (const { name, version } of shipped) {
      const entry = packages[`node_modules/${name}`];
      expect(entry.version, name).toBe(version);
      expect(entry.integrity, name).toMatch(/^sha512-/);
      expect(entry.hasInstallScript, name).toBe(undefined);
      expect(JSON.parse(readFileSync(join(ROOT, 'node_modules', name, 'package.json'), 'utf8')).version, name).toBe(version);
    }
  });

  it('have no known hole by the registry, where one answers', { timeout: 60_000 }, (context) => {
    const { stdout } = spawnSync(process.platform === 'win32' ? 'npm.cmd' : 'npm', ['audit', '--omit=dev', '--json', '--fetch-retries=0', '--fetch-timeout=10000'], { cwd: ROOT, encoding: 'utf8', timeout: 30_000, shell: process.platform === 'win32' });
    let report;
    try {
      report = JSON.parse(stdout);
    } catch {
      report = undefined;
    }
    if (report?.metadata?.vulnerabilities === undefined) return context.skip('no registry answered with an audit: nothing was checked');
    expect(report.metadata.vulnerabilities.total, stdout.slice(0, 2000)).toBe(0);
  });
});
