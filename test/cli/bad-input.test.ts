import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { run } from '../../src/cli/run.ts';
import type { Design } from '../../src/design/types.ts';
import { readCsv } from '../export/read-csv.ts';
import { toleranced } from '../tolerance/designs.ts';

const folder = mkdtempSync(join(tmpdir(), 'halfmark-bad-'));
afterAll(() => rmSync(folder, { recursive: true }));
let files = 0;
function file(design: Design): string {
  const path = join(folder, `${files++}.json`);
  writeFileSync(path, JSON.stringify(design));
  return path;
}
const with_ = (change: (design: Design) => void): string => {
  const design = structuredClone(toleranced);
  change(design);
  return file(design);
};
const good = file(toleranced);

async function call(...args: string[]): Promise<{ code: number; out: string; error: string; solved: boolean }> {
  let out = '';
  let error = '';
  let solved = false;
  const code = await run(args, { out: (t) => void (out += t), error: (t) => void (error += t), stdin: async () => '', progress: () => void (solved = true) });
  return { code, out, error, solved };
}
/** Wrong input: one line with its place and its mend, nothing on standard output, nothing long begun. */
async function expectRefusal(args: string[], line: RegExp): Promise<void> {
  const { code, out, error, solved } = await call(...args);
  expect([code, out, solved], error).toEqual([2, '', false]);
  expect(error).toMatch(/^halfmark: [^\n]*\n$/);
  expect(error).toMatch(line);
}
const sweep = (design: string, from: string, to: string, points = '5', ...more: string[]): string[] => ['sweep', design, '--variable', 'temperature', '--from', from, '--to', to, '--points', points, ...more];

/** Its gap has no value between 330 K and 370 K. */
const FORMULA: NonNullable<Design['custom']> = {
  materials: [{ id: 'own', gap: { formula: '1 eV + 0.01 eV * sqrt(abs(T - 350 K)/(1 K) - 20)' }, affinity: '4 eV', permittivity: 10, electronMass: 1, holeMass: 1, source: 'invented' }],
  dopants: [{ id: 'D', host: 'own', kind: 'donor', depth: '20 meV', degeneracy: 2, source: 'invented' }],
};
const formulaDesign: Design = {
  format: 'halfmark-design/1', title: 'formula', conditions: { temperature: '300 K' }, top: { kind: 'neutral' }, bottom: { kind: 'neutral' }, custom: FORMULA,
  layers: [{ name: 'only', material: 'own', thickness: '1 um', dopants: [{ dopant: 'D', concentration: '1e17 cm^-3' }] }],
};

describe('bad input on the command line', () => {
  it('is refused where a sweep is empty, runs down, has no points, or is of nothing', async () => {
    await expectRefusal(sweep(good, '300 K', '300 K'), /--to: .*an empty sweep; move one end/);
    await expectRefusal(sweep(good, '400 K', '300 K'), /--from: runs down .* put the lower end first: from '300 K' to '400 K'/);
    await expectRefusal(sweep(good, '300 K', '400 K', '1'), /--points: .*2 points or more/);
    await expectRefusal(sweep(good, '300 K', '400 K', 'many'), /--points is 'many'; a whole number/);
    await expectRefusal(sweep(good, '0 K', '400 K', '5', '--log'), /--from: .*begins above zero/);
    await expectRefusal(sweep(good, '300 nm', '400 K'), /--from: .*is a length, not a temperature/);
    await expectRefusal(sweep(good, '300 K', '4000 K'), /--to: /);
    await expectRefusal(['sweep', good, '--variable', 'layers.n.thicknes', '--from', '1 nm', '--to', '2 nm', '--points', '3'], /--variable: there is nothing called 'layers\.n\.thicknes'/);
    await expectRefusal(['size', good, '--variable', 'Nn', '--from', '1e18 cm^-3', '--to', '1e17 cm^-3'], /--from: is no range to search: its lower end must come first/);
    await expectRefusal(['size', good, '--variable', 'Nn', '--from', '1e17 cm^-3', '--to', '1e17 cm^-3'], /--from: is no range to search/);
    await expectRefusal(['size', good, '--variable', 'nothing'], /nothing/);
  });

  it('leaves a gap with its reason where a formula fails at some temperature', async () => {
    const design = file(formulaDesign);
    const { code, out, error } = await call(...sweep(design, '300 K', '400 K', '5', '--csv', '--figure', 'layers.only.gap_eV'));
    const rows = readCsv(out).slice(1);
    expect(code, error).toBe(0);
    expect(rows.map((row) => row[1] !== '')).toEqual([true, true, false, true, true]);
    expect(rows[2][2]).toMatch(/gap/);
    expect(error).toMatch(/1 of 5 points have no answer; the first: .*gap/);
  });

  it('is refused where a formula fails at the end of a range', async () => {
    const design = file(formulaDesign);
    await expectRefusal(sweep(design, '300 K', '350 K'), /--to: /);
    const over = file({ ...formulaDesign, conditions: { temperature: '300 K', temperatureRange: ['300 K', '350 K'] } });
    await expectRefusal(['compute', over], /custom\.materials\[0\]\.gap/);
    await expectRefusal(['vary', over, '--count', '10'], /custom\.materials\[0\]\.gap/);
  });

  it('is refused where an own entry has no source', async () => {
    const blank = structuredClone(formulaDesign);
    blank.custom!.materials![0].source = '';
    for (const args of [['compute'], ['check'], ['vary', '--count', '10']]) await expectRefusal([args[0], file(blank), ...args.slice(1)], /custom\.materials\[0\]\.source/);
  });

  it('is refused where nothing uses the variable that is sized', async () => {
    const idle = with_((d) => void d.variables!.push({ name: 'idle', value: '1 nm', range: ['1 nm', '5 nm'] }));
    await expectRefusal(['size', idle, '--variable', 'idle'], /idle/);
    await expectRefusal(['vary', idle, '--count', '10', '--draw', 'idle=uniform'], /input 'idle': moves nothing/);
  });

  it('is refused where a requirement is about something that is not there, or its limit is of another kind', async () => {
    const of = with_((d) => void (d.requirements![0].of = 'middle'));
    const limit = with_((d) => void (d.requirements![0].max = '5 nm'));
    const bare = with_((d) => void (d.requirements![0].max = '0.5'));
    for (const [name, ...more] of [['check'], ['size', '--variable', 'Nn'], ['vary', '--count', '10'], ['compute'], ['sheet', '-o', join(folder, 'x.pdf')]]) {
      await expectRefusal([name, of, ...more], /requirements\[0\]\.of: .*'middle'/);
      await expectRefusal([name, limit, ...more], /requirements\[0\]\.max: .*is a length, not an energy/);
      await expectRefusal([name, bare, ...more], /requirements\[0\]\.max: .*has no unit/);
    }
  });

  it('is refused where a tolerance leaves nothing of a positive quantity', async () => {
    await expectRefusal(['vary', with_((d) => void (d.variables![0].tolerance = '100 %')), '--count', '10'], /variables\[0\]\.tolerance: .*below 100 %/);
    await expectRefusal(['check', with_((d) => void (d.variables![0].tolerance = '250 %'))], /variables\[0\]\.tolerance: .*below 100 %/);
    await expectRefusal(['vary', with_((d) => { d.variables![0].tolerance = '400 nm'; d.layers[0].thickness = 'tcore'; }), '--count', '10'], /input 'tcore': '400 nm' is too wide: at its lower end, layers\[0\]\.thickness/);
    await expectRefusal(['vary', good, '--count', '0'], /--count: .*from 1 to/);
    await expectRefusal(['vary', good, '--count', '10', '--seed', '-1'], /--seed is '-1'; a whole number/);
    await expectRefusal(['vary', good, '--count', '10', '--tolerances', 'none'], /nothing has a tolerance/);
    await expectRefusal(['vary', good, '--count', '10', '--shard', '3/2'], /--shard is '3\/2'/);
    await expectRefusal(['vary', good, '--count', '10', '--workers', 'two'], /--workers is 'two'/);
  });
});
