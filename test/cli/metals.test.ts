import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { run } from '../../src/cli/run.ts';
import type { Ranking } from '../../src/contacts/rank-metals.ts';
import type { Design } from '../../src/design/types.ts';

const folder = mkdtempSync(join(tmpdir(), 'halfmark-metals-'));
afterAll(() => rmSync(folder, { recursive: true }));

async function call(...args: string[]): Promise<{ code: number; out: string; error: string; progress: string[] }> {
  let out = '';
  let error = '';
  const progress: string[] = [];
  const code = await run(args, { out: (t) => void (out += t), error: (t) => void (error += t), stdin: async () => '', progress: (t) => void progress.push(t) });
  return { code, out, error, progress };
}

function file(change: Partial<Design> = {}): string {
  const path = join(folder, 'design.json');
  const design: Design = {
    format: 'halfmark-design/1', title: 'Contact', conditions: { temperature: '300 K' },
    variables: [{ name: 'Ncap', value: '5e19 cm^-3', tolerance: '10 %' }],
    top: { kind: 'barrier', metal: 'Ti' },
    layers: [{ name: 'cap', material: 'Si', thickness: '80 nm', dopants: [{ dopant: 'P', concentration: 'Ncap' }] }],
    bottom: { kind: 'neutral' },
    requirements: [{ quantity: 'contactResistivity', of: 'top', max: '1e-7 ohm cm^2' }],
    ...change,
  };
  writeFileSync(path, JSON.stringify(design));
  return path;
}

describe('halfmark metals', () => {
  it('prints a table, the best first, the metal of the stack marked', async () => {
    const { code, out, error, progress } = await call('metals', file());
    expect([code, error]).toEqual([0, '']);
    const [sentence, , heading, ...lines] = out.split('\n');
    expect(sentence).toMatch(/^\d+ of \d+ metals on cap \(n-type Si, top\), by their worst contact resistivity over 300 K and within ±10 % of Ncap, ±50 meV of barrier\. \d+ of them stay within the limit of 1\.0e−7 ohm cm²\.$/);
    expect(heading).toMatch(/^metal +phi_Bn \(eV\) +rho_c/);
    const at = heading.indexOf('worst');
    const worst = lines.slice(0, lines.indexOf('')).map((line) => Number(line.slice(at).split(' ')[0]));
    expect(worst.length).toBeGreaterThan(40);
    expect(worst).toEqual([...worst].sort((a, b) => a - b));
    expect(lines.filter((line) => line.startsWith('Ti *'))).toHaveLength(1);
    expect(out).toMatch(/without a figure:\n {2}\S+: '\S+' has no work function and no measured barrier on Si/);
    // Wiped in the end, so that nothing is left on the terminal's line.
    expect(progress.length === 0 || progress[progress.length - 1] === '').toBe(true);
  });

  it('says where the metal of the stack has a barrier of its own, which the table leaves out', async () => {
    const { out } = await call('metals', file({ top: { kind: 'barrier', metal: 'Ti', barrier: '0.55 eV' } }));
    expect(out).toContain('\n* on the stack now, but with a barrier given as 0.55 eV, which this table leaves out\n');
    expect((await call('metals', file())).out).toContain('\n* on the stack now\n');
  });

  it('writes the ranking as JSON, with values of variables for this run', async () => {
    const plain = JSON.parse((await call('metals', file(), '--json')).out) as Ranking;
    const more = JSON.parse((await call('metals', file(), '--json', '--set', 'Ncap=2e20 cm^-3')).out) as Ranking;
    expect(plain.kind).toBe('ranked');
    expect(plain.limit_ohm_cm2).toBe(1e-7);
    const of = (ranking: Ranking): number => ranking.rows.find(({ metal }) => metal === 'Ti')!.rho_c_ohm_cm2 as number;
    expect(of(more)).toBeLessThan(of(plain));
  });

  it('takes the end that has a metal, or the one that is asked for', async () => {
    const turned = { top: { kind: 'neutral' }, bottom: { kind: 'barrier', metal: 'Al' }, requirements: [] } as Partial<Design>;
    expect((await call('metals', file(turned), '--tolerances', 'none')).out).toContain('n-type Si, bottom');
    expect((await call('metals', file(turned), '--side', 'top', '--tolerances', 'none')).out).toContain('n-type Si, top');
  });

  it('refuses wrong input in one line', async () => {
    for (const [args, words] of [[['--side', 'left'], /--side is 'left'; top or bottom would do/], [['--sid', 'top'], /no option '--sid'; did you mean --side/]] as const) {
      const { code, out, error } = await call('metals', file(), ...args);
      expect([code, out]).toEqual([2, '']);
      expect(error).toMatch(words);
      expect(error.split('\n')).toHaveLength(2);
    }
    expect((await call('metals', file({ layers: [{ name: 'cap', material: 'Sii', thickness: '80 nm' }], requirements: [] }))).error).toMatch(/did you mean Si/);
  });

  it('tells by its exit code that no metal has a figure', async () => {
    const oxide = file({ layers: [{ name: 'cap', material: 'SiO2', thickness: '5 nm' }], bottom: { kind: 'open' }, variables: [], requirements: [] });
    const { code, out } = await call('metals', oxide);
    expect(code).toBe(3);
    expect(out).toContain('0 of ');
  });
});
