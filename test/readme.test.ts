import { build } from 'esbuild';
import { execFileSync, spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import * as library from '../src/index.ts';
import { COMMANDS } from '../src/cli/run.ts';
import { EXIT } from '../src/cli/command.ts';
import { toleranced } from './tolerance/designs.ts';

const ROOT = join(import.meta.dirname, '..');
const readme = readFileSync(join(ROOT, 'README.md'), 'utf8');
const folder = mkdtempSync(join(tmpdir(), 'halfmark-readme-'));
afterAll(() => rmSync(folder, { recursive: true }));
writeFileSync(join(folder, 'design.json'), JSON.stringify(toleranced));

const HALFMARK = `"${process.execPath}" "${join(ROOT, 'src/tools/halfmark.mjs')}"`;
const blocks = (language: string, title?: string): string[] => {
  const from = title === undefined ? 0 : readme.indexOf(`# ${title}\n`);
  const section = title === undefined ? readme : readme.slice(from, readme.indexOf('\n#', from + 1));
  return [...section.matchAll(new RegExp(`\`\`\`${language}\\n([\\s\\S]*?)\`\`\``, 'g'))].map((m) => m[1]);
};
const halfmark = (...args: string[]): string => execFileSync(process.execPath, [join(ROOT, 'src/tools/halfmark.mjs'), ...args], { cwd: folder, encoding: 'utf8' });

/** What an example prints that is run as it stands, against the sources. */
async function output(example: string): Promise<{ printed: string; status: number | null }> {
  const bundle = await build({
    stdin: { contents: example, resolveDir: ROOT, loader: 'ts' }, bundle: true, platform: 'node', format: 'esm', write: false, logLevel: 'silent',
    banner: { js: "import { createRequire as requireFor } from 'node:module'; const require = requireFor(import.meta.url);" },
  });
  const { stdout, stderr, status } = spawnSync(process.execPath, ['--input-type=module', '-'], { cwd: folder, input: bundle.outputFiles[0].text, encoding: 'utf8' });
  expect(stderr).toBe('');
  return { printed: stdout, status };
}
async function exampleWith(part: string): Promise<{ printed: string; status: number | null }> {
  const found = blocks('ts').filter((text) => text.includes(part));
  expect(found, part).toHaveLength(1);
  return output(found[0]);
}

describe('the examples of the README', { timeout: 300_000 }, () => {
  it('are all tried here', () => {
    expect(blocks('ts')).toHaveLength(5);
    expect(blocks('sh')).toHaveLength(3);
  });

  it('solve a design, by the library and by the solver under it', async () => {
    for (const part of ["temperature: '350 K'", "from './solver/index.ts'"]) {
      const { printed } = await exampleWith(part);
      // Boltzmann statistics with complete ionisation give kT ln(1e18 1e16/ni^2): some 0.83 V at 300 K, 0.75 V at 350 K; incomplete ionisation takes a few mV off.
      const builtIn = Number.parseFloat(printed);
      expect(builtIn).toBeGreaterThan(0.7);
      expect(builtIn).toBeLessThan(0.86);
      expect(printed).toMatch(/converged: true/);
    }
  });

  it('hold a design file to its requirements, by the library as by the command line', async () => {
    const { printed, status } = await exampleWith('check(design, ');
    const judged = library.check(toleranced, { tolerances: 'stated' });
    expect(judged.kind === 'judged' && judged.requirements.every((row) => printed.includes(library.verdictLine(row)))).toBe(true);
    expect(status).toBe(judged.kind === 'judged' && judged.requirements.every((row) => row.met) ? 0 : 1);
    const [block] = blocks('sh', 'A design file in your own CI');
    expect(spawnSync('sh', ['-e', '-c', block.replaceAll('npm run -s halfmark --', HALFMARK)], { cwd: folder }).status).toBe(EXIT.requirementNotMet);
  });

  it('sweep, draw within tolerances and map as the command line does', async () => {
    const { printed } = await exampleWith('await vary(');
    const swept = JSON.parse(halfmark('sweep', 'design.json', '--variable', 'temperature', '--from', '250 K', '--to', '400 K', '--points', '4', '--figure', 'layers.n.n_cm3')) as library.SweepResult;
    for (const value of swept.figures[0].values) expect(printed).toContain(String(value));
    const varied = JSON.parse(halfmark('vary', 'design.json', '--count', '200', '--figure', 'layers.n.sheet_ohm', '--tolerance', 'p thickness=2 %', '--draw', 'p thickness=uniform', '--json')) as library.VariationResult;
    expect(printed).toContain(`sheet resistance ${varied.figures[0].mean} ${varied.figures[0].sd} ohm yield ${varied.yield!.share}`);
    expect(printed).toMatch(/coldest and least doped: freeze-out/);
  });

  it('size, rank metals, draw and write the sheet', async () => {
    const { printed } = await exampleWith('metals(design');
    expect(printed).toMatch(/best metal: \w+/);
    expect(printed).toMatch(/Nn from .* to .* meets every requirement|best metal/);
    expect(readFileSync(join(folder, 'plate.svg'), 'utf8')).toMatch(/^<svg[\s\S]*<\/svg>\s*$/);
    expect(readFileSync(join(folder, 'sheet-1.svg'), 'utf8')).toContain('A. Engineer');
    expect(existsSync(join(folder, 'sheet-1.svg'))).toBe(true);
  });

  it('give as array jobs what one run gives, to the last byte', () => {
    const jobs = blocks('sh', 'Array jobs');
    expect(jobs).toHaveLength(2);
    for (const job of jobs) execFileSync('sh', ['-e', '-c', job.replaceAll('npm run -s halfmark --', HALFMARK)], { cwd: folder });
    expect(readFileSync(join(folder, 'spread.json'), 'utf8')).toBe(halfmark('vary', 'design.json', '--count', '200', '--seed', '7', '--json'));
    expect(readFileSync(join(folder, 'sweep.csv'), 'utf8')).toBe(halfmark('sweep', 'design.json', '--variable', 'temperature', '--from', '200 K', '--to', '400 K', '--points', '41', '--csv', '--workers', '1'));
  });
});

describe('the README', () => {
  it('has a row for each command and each exit code', () => {
    for (const name of Object.keys(COMMANDS)) expect(readme).toContain(`\n| \`${name}\` |`);
    for (const code of Object.values(EXIT)) expect(readme).toContain(`\n| ${code} |`);
  });
});
