import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { run } from '../../src/cli/run.ts';
import { starters } from '../../src/design/starters/index.ts';
import type { Result } from '../../src/result/types.ts';

const folder = mkdtempSync(join(tmpdir(), 'halfmark-cli-'));
afterAll(() => rmSync(folder, { recursive: true }));
const fixture = join(import.meta.dirname, '../fixtures/designs/gaas-contact.json');

async function call(args: string[], stdin = ''): Promise<{ code: number; out: string; error: string }> {
  let out = '';
  let error = '';
  const code = await run(args, { out: (t) => void (out += t), error: (t) => void (error += t), stdin: async () => stdin });
  return { code, out, error };
}
function file(name: string, text: string): string {
  const path = join(folder, name);
  writeFileSync(path, text);
  return path;
}
/** Wrong input: exit code 2, nothing on standard output, one line without a stack trace. */
function expectRefusal(answer: { code: number; out: string; error: string }, line: RegExp): void {
  expect(answer.code).toBe(2);
  expect(answer.out).toBe('');
  expect(answer.error).toMatch(/^halfmark: [^\n]*\n$/);
  expect(answer.error).not.toMatch(/ at .*:\d+:\d+/);
  expect(answer.error).toMatch(line);
}

describe('halfmark compute', () => {
  it('prints the result as JSON', async () => {
    const { code, out, error } = await call(['compute', fixture]);
    expect([code, error]).toEqual([0, '']);
    const result = JSON.parse(out) as Result;
    expect(result.format).toBe('halfmark-result/1');
    expect(result.layers.map((l) => l.name)).toEqual(['cap', 'spacer', 'buffer']);
    expect(new Set(Object.values(result.profile).map((column) => column.length)).size).toBe(1);
    expect(out).not.toMatch(/NaN|Infinity|null,\s*null,\s*null,\s*null/);
  });

  it('takes variables and the temperature from --set', async () => {
    const cold = JSON.parse((await call(['compute', fixture, '--set', 'temperature=77 K', '--set=Ncap=1e18 cm^-3'])).out) as Result;
    expect(cold.conditions.temperature_K).toBe(77);
    expect(cold.layers[0].ionised[0].concentration_cm3).toBe(1e18);
  });

  it('reads a design from standard input', async () => {
    expect((await call(['compute', '-'], JSON.stringify(starters[0].design))).code).toBe(0);
  });

  it('prints the same bytes for the same design', async () => {
    expect((await call(['compute', fixture])).out).toBe((await call(['compute', fixture])).out);
  });

  it('refuses wrong input with one line and exit code 2', async () => {
    expectRefusal(await call(['compute', fixture, '--set', 'Nca=1e18 cm^-3']), /--set Nca: there is no variable 'Nca' in this design; did you mean Ncap\?/);
    expectRefusal(await call(['compute', fixture, '--set', 'Ncap=5']), /has no unit; a concentration is wanted here/);
    expectRefusal(await call(['compute', fixture, '--set', '__proto__=5']), /no variable '__proto__'/);
    expectRefusal(await call(['compute', fixture, '--set', 'temperature']), /NAME=VALUE/);
    expectRefusal(await call(['compute', join(folder, 'none.json')]), /there is no file/);
    expectRefusal(await call(['compute', folder]), /is a folder/);
    expectRefusal(await call(['compute']), /no FILE is named/);
    expectRefusal(await call(['compute', fixture, fixture]), /two files/);
    expectRefusal(await call(['compute', fixture, '--sett', 'a=b']), /did you mean --set\?/);
    expectRefusal(await call(['compote', fixture]), /no command 'compote'; did you mean compute\?/);
    expectRefusal(await call(['compute', file('junk.json', '\u0000\u0001'.repeat(1000))]), /no JSON document/);
    expectRefusal(await call(['compute', file('big.json', 'x'.repeat(25e6))]), /25 MB/);
    expectRefusal(await call(['compute', file('list.json', '[1,2]')]), /no design/);
    expectRefusal(await call(['compute', file('line.json', JSON.stringify({ format: 'halfmark-design/1', 'a\nb': 1 }))]), /halfmark: /);
  });

  it('says how many complaints there are beside the first', async () => {
    const design = structuredClone(starters[0].design);
    design.layers[0].thickness = '5 kg';
    design.layers[1].material = 'unobtainium';
    expectRefusal(await call(['compute', file('two.json', JSON.stringify(design))]), /layers\[0\]\.thickness: .* \(and 1 more\)/);
  });

  it('gives a gap that closes as wrong input', async () => {
    const design = structuredClone(starters[0].design);
    design.custom = { materials: [{ id: 'Si', gap: { zeroK: '0.2 eV', alpha: '1e-3 eV/K', beta: '10 K' }, affinity: '4 eV', permittivity: 10, electronMass: 1, holeMass: 1, source: 'invented' }] };
    design.layers.forEach((l) => { l.dopants = []; });
    design.top = { kind: 'neutral' };
    expectRefusal(await call(['compute', file('closed.json', JSON.stringify(design))]), /layers\[0\]: .*gap/);
  });
});

describe('halfmark draw', () => {
  it('writes the plate as SVG', async () => {
    const out = join(folder, 'plate.svg');
    expect(await call(['draw', fixture, '-o', out])).toEqual({ code: 0, out: '', error: '' });
    const svg = readFileSync(out, 'utf8');
    expect(svg.startsWith('<?xml') || svg.startsWith('<svg')).toBe(true);
    expect(svg).toContain('cap');
  });

  it('refuses what it cannot write', async () => {
    expectRefusal(await call(['draw', fixture]), /no output/);
    expectRefusal(await call(['draw', fixture, '-o', 'out.png']), /does not end in \.svg/);
    expectRefusal(await call(['draw', fixture, '-o', join(folder, 'none', 'out.svg')]), /cannot be written/);
    expectRefusal(await call(['draw', fixture, '-o', join(folder, 'a.svg'), '--style', 'jurnal']), /did you mean journal\?/);
  });
});

describe('halfmark', () => {
  it('lists its commands', async () => {
    const { code, out } = await call(['help']);
    expect(code).toBe(0);
    for (const word of ['compute', 'draw', 'Exit codes']) expect(out).toContain(word);
  });
});
