import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { run } from '../../src/cli/run.ts';
import { wellFormed } from '../drawing/well-formed.ts';
import { readPdf } from '../export/read-pdf.ts';

const folder = mkdtempSync(join(tmpdir(), 'halfmark-sheet-'));
afterAll(() => rmSync(folder, { recursive: true }));
const fixture = join(import.meta.dirname, '../fixtures/designs/gaas-contact.json');
const at = (name: string): string => join(folder, name);

async function call(args: string[]): Promise<{ code: number; out: string; error: string }> {
  let out = '';
  let error = '';
  const code = await run(['sheet', ...args], { out: (t) => void (out += t), error: (t) => void (error += t), stdin: async () => readFileSync(fixture, 'utf8') });
  return { code, out, error };
}

const wordsOf = (file: string): string => readPdf(readFileSync(file)).flatMap((p) => p.texts.map((t) => t.text)).join(' ');

describe('halfmark sheet', () => {
  it('writes the sheet as PDF, with what was said for its title block', async () => {
    const { code, out, error } = await call([fixture, '-o', at('a.pdf'), '--author', 'A. Author', '--date', '1 March', '--revision=C', '--style', 'journal', '--paper', 'Letter', '--tolerances', 'none']);
    expect([code, out, error]).toEqual([0, '', '']);
    const [page] = readPdf(readFileSync(at('a.pdf')));
    expect([page.width, page.height]).toEqual([792, 612]);
    const words = wordsOf(at('a.pdf'));
    for (const text of ['A. Author', '1 March', 'cap', 'spacer', 'buffer', 'Works cited']) expect(words).toContain(text);
  });

  it('writes the same bytes each time, and puts no date on it by itself', async () => {
    await call([fixture, '-o', at('b.pdf'), '--tolerances', 'none']);
    await call(['-', '-o', at('c.pdf'), '--tolerances', 'none']);
    expect(readFileSync(at('b.pdf')).equals(readFileSync(at('c.pdf')))).toBe(true);
    expect(wordsOf(at('b.pdf'))).not.toContain(String(new Date().getFullYear()));
  });

  it('takes values from --set and says so on the sheet', async () => {
    expect((await call([fixture, '-o', at('d.pdf'), '--set', 'temperature=77 K', '--tolerances', 'none'])).code).toBe(0);
    expect(wordsOf(at('d.pdf'))).toContain('Set for this sheet: temperature = 77 K.');
  });

  it('adds the sections that are asked for', async () => {
    const starter = join(import.meta.dirname, '../../src/design/starters/graded-cap.json');
    const other = JSON.parse(readFileSync(starter, 'utf8')) as { variables: { value: string }[] };
    other.variables[0].value = '3e18 cm^-3';
    writeFileSync(at('lighter.halfmark.json'), JSON.stringify(other));
    const { code, error } = await call([starter, '-o', at('more.pdf'), '--over', at('lighter.halfmark.json'), '--worst-corner', '--contacts', '--workings=layers.cap.ecMinusEf', '--workings', 'layers.0.n']);
    expect([code, error]).toEqual([0, '']);
    const words = wordsOf(at('more.pdf'));
    for (const text of ['Changes from graded-cap to lighter', 'At the worst corner', 'From near: Ti on cap', 'Workings: Ec − EF of cap', 'Workings: n of cap']) expect(words).toContain(text);
  });

  it('writes an SVG a page', async () => {
    expect((await call([fixture, '-o', at('e.svg'), '--tolerances', 'none'])).code).toBe(0);
    let pages = 0;
    while (existsSync(at(`e-${pages + 1}.svg`))) wellFormed(readFileSync(at(`e-${++pages}.svg`), 'utf8'));
    expect(pages).toBeGreaterThan(2);
  });

  it('refuses what it cannot do with one line and exit code 2', async () => {
    const cases: [string[], RegExp][] = [
      [[fixture], /no output is named/],
      [[fixture, '-o', at('x.png')], /neither \.pdf nor \.svg/],
      [[fixture, '-o', at('x.pdf'), '--style', 'jurnal'], /--style is 'jurnal'; screen, slide, journal would do; did you mean journal\?/],
      [[fixture, '-o', at('x.pdf'), '--tolerances', 'none', '--workings', 'layers.cap.ecMinus'], /there is no figure 'layers\.cap\.ecMinus' to show the workings of; did you mean layers\.cap\.ecMinusEf\?/],
      [[fixture, '-o', at('x.pdf'), '--tolerances', 'none', '--over', fixture, '--over', fixture, '--over', fixture, '--over', fixture], /no more than 3/],
      [[fixture, '-o', at('x.pdf'), '--tolerances', 'none', '--over', at('none.json')], /there is no file/],
      [[fixture, '-o', at('x.pdf'), '--worst-corner=1'], /takes no value/],
      [[fixture, '-o', at('x.pdf'), '--paper', 'A3'], /--paper is 'A3'; A4, letter would do/],
      [[fixture, '-o', at('no/such/folder/x.pdf')], /cannot be written/],
      [[at('none.json'), '-o', at('x.pdf')], /there is no file/],
    ];
    for (const [args, line] of cases) {
      const { code, error } = await call(args);
      expect(code).toBe(2);
      expect(error).toMatch(/^halfmark: [^\n]*\n$/);
      expect(error).toMatch(line);
    }
  });
});
