import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { run } from '../../src/cli/run.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import { MOBILITY_NOTE } from '../../src/result/mobility-note.ts';
import type { SweepResult } from '../../src/sweep/sweep.ts';
import type { VariationResult } from '../../src/tolerance/result.ts';
import { readCsv } from '../export/read-csv.ts';
import { toleranced } from '../tolerance/designs.ts';

const folder = mkdtempSync(join(tmpdir(), 'halfmark-sweep-'));
afterAll(() => rmSync(folder, { recursive: true }));
const fixture = join(folder, 'design.json');
writeFileSync(fixture, JSON.stringify(toleranced));

async function call(args: string[], stdin = '', progress?: (text: string) => void): Promise<{ code: number; out: string; error: string }> {
  let out = '';
  let error = '';
  const code = await run(args, { out: (t) => void (out += t), error: (t) => void (error += t), stdin: async () => stdin, progress });
  return { code, out, error };
}
function expectRefusal(answer: { code: number; out: string; error: string }, line: RegExp): void {
  expect([answer.code, answer.out]).toEqual([2, '']);
  expect(answer.error).toMatch(/^halfmark: [^\n]*\n$/);
  expect(answer.error).toMatch(line);
}
const along = ['sweep', fixture, '--variable', 'Nn', '--from', '1e17 cm^-3', '--to', '1e18 cm^-3', '--points', '20', '--log'];

describe('halfmark sweep', () => {
  it('prints a table that says what single solves say', async () => {
    const { code, out, error } = await call([...along, '--csv', '--figure', 'layers.n.n_cm3', '--figure=junctions.0.builtin_V']);
    expect([code, error]).toEqual([0, '']);
    const [heading, ...rows] = readCsv(out);
    expect(heading).toEqual(['Nn (cm^-3)', 'n: electrons (cm^-3)', 'n to p: built-in potential (V)', 'no figures because']);
    expect(rows).toHaveLength(20);
    const last = solveDesign(toleranced, { set: { Nn: '1e18 cm^-3' } });
    expect(last.kind === 'result' && [last.result.layers[0].n_cm3, last.result.junctions[0].builtin_V]).toEqual(rows[19].slice(1, 3).map(Number));
  });

  it('prints JSON, of two axes as well', async () => {
    const { out } = await call(['sweep', fixture, '--variable', 'temperature', '--from=250 K', '--to', '350 K', '--points', '3', '--second', 'top.barrier', '--from2', '0.4 eV', '--to2=0.6 eV', '--points2=2']);
    const result = JSON.parse(out) as SweepResult;
    expect(result.axes.map((a) => [a.variable, a.values])).toEqual([['temperature', [250, 300, 350]], ['top.barrier', [0.4, 0.6]]]);
    expect(result.figures.every((f) => f.values.length === 6)).toBe(true);
    expect(result.figures.find((f) => f.path === 'contacts.top.barrier_n_eV')!.values).toEqual([0.4, 0.4, 0.4, 0.6, 0.6, 0.6]);
  });

  it('says that mobilities are those of 300 K where a figure rests on one away from it, in the notes and on standard error', async () => {
    const over = (figure: string, ...more: string[]) => call(['sweep', fixture, '--variable', 'temperature', '--from=250 K', '--to', '350 K', '--points', '2', '--figure', figure, ...more]);
    const resting = await over('layers.n.sheet_ohm');
    expect([(JSON.parse(resting.out) as SweepResult).notes, resting.error]).toEqual([[MOBILITY_NOTE], `halfmark: ${MOBILITY_NOTE}\n`]);
    const other = await over('layers.n.n_cm3');
    expect([(JSON.parse(other.out) as SweepResult).notes, other.error]).toEqual([[], '']);
    const room = [...along, '--figure', 'layers.n.sheet_ohm'];
    expect((await call(room)).error).toBe('');
    expect((await call([...room, '--set', 'temperature=77 K', '--csv'])).error).toBe(`halfmark: ${MOBILITY_NOTE}\n`);
  });

  it('is put together from shards by laying them end to end', async () => {
    const whole = await call([...along, '--csv']);
    let parts = '';
    for (const i of [1, 2, 3]) parts += (await call([...along, '--csv', '--shard', `${i}/3`])).out;
    expect(parts).toBe(whole.out);
  });

  it('refuses with place and mend', async () => {
    const with_ = (...more: string[]) => call([...along, ...more]);
    expectRefusal(await call(['sweep', fixture]), /--variable is missing/);
    expectRefusal(await call(along.map((a) => (a === 'Nn' ? 'Nm' : a))), /--variable: there is nothing called 'Nm'.*did you mean Nn\?/);
    expectRefusal(await call(along.map((a) => (a === '1e18 cm^-3' ? '1e16 cm^-3' : a))), /--from: runs down .* put the lower end first: from '1e16 cm\^-3' to '1e17 cm\^-3'/);
    expectRefusal(await call(along.map((a) => (a === '1e18 cm^-3' ? '1e17 cm^-3' : a))), /--to: .*empty sweep/);
    expectRefusal(await call(along.map((a) => (a === '20' ? '1' : a))), /--points: /);
    expectRefusal(await call(along.map((a) => (a === '20' ? 'many' : a))), /--points is 'many'; a whole number/);
    expectRefusal(await with_('--figure', 'layers.n.n_cm'), /--figure: .*did you mean layers\.n\.n_cm3\?/);
    expectRefusal(await with_('--shard', '1/2'), /add --csv/);
    expectRefusal(await with_('--csv', '--shard', '3/2'), /from 1\/8 to 8\/8/);
    expectRefusal(await with_('--second', 'tcore'), /--from2 is missing/);
    expectRefusal(await with_('--lgo'), /did you mean --log\?/);
    expectRefusal(await with_('--log=yes'), /takes no value/);
  });
});

describe('halfmark vary', () => {
  const base = ['vary', fixture, '--count', '40', '--seed', '9'];

  it('says that mobilities are those of 300 K where a figure rests on one away from it', async () => {
    const few = (...more: string[]) => call(['vary', fixture, '--count', '2', '--figure', 'layers.n.sheet_ohm', ...more]);
    const cold = await few('--set', 'temperature=250 K', '--json');
    expect([(JSON.parse(cold.out) as VariationResult).notes, cold.error]).toEqual([[MOBILITY_NOTE], `halfmark: ${MOBILITY_NOTE}\n`]);
    expect((await few('--set', 'temperature=250 K')).out).toContain(`\n${MOBILITY_NOTE}\n`);
  });

  it('takes another tolerance and distribution of an input', async () => {
    const { code, out } = await call(['vary', fixture, '--count', '4', '--tolerance', 'p thickness=3 %', '--draw=p thickness=uniform', '--tolerance', 'Nn=0 %', '--figure', 'layers.n.n_cm3']);
    expect(code).toBe(0);
    expect(out).toContain('  p thickness 3 %: 970 nm to 1.03 um, uniform\n');
    expect(out).not.toContain('Nn');
    expectRefusal(await call(['vary', fixture, '--count', '4', '--tolerance', 'p thickness=130 %']), /input 'p thickness': '130 %' is the whole value or more/);
    expectRefusal(await call(['vary', fixture, '--count', '4', '--tolerance', 'p thickness']), /--tolerance is 'p thickness'; it takes INPUT=3 %/);
    expectRefusal(await call(['vary', fixture, '--count', '4', '--draw', 'Nn=unform']), /--draw is 'unform'; normal or uniform would do; did you mean uniform\?/);
  });

  it('prints spreads, sensitivities and the yield', async () => {
    const seen: string[] = [];
    const { code, out, error } = await call(base, '', (text) => seen.push(text));
    expect([code, error]).toEqual([0, '']);
    for (const words of ['40 variations, seed 9', 'tcore 10 %', 'p thickness 5 % (default)', 'n: sheet resistance', 'all requirements']) expect(out).toContain(words);
    expect(seen[seen.length - 1]).toBe('');
    expect(seen[0]).toMatch(/^\d+ of \d+ \(\d+ %\)$/);
  });

  it('gathers shards to the same bytes as one run', async () => {
    const whole = await call([...base, '--json']);
    const result = JSON.parse(whole.out) as VariationResult;
    expect([result.format, result.done, result.seed]).toEqual(['halfmark-variations/1', 40, 9]);
    let parts = '';
    for (const i of [1, 2, 3]) parts += (await call([...base, '--shard', `${i}/3`])).out;
    const file = join(folder, 'parts.jsonl');
    writeFileSync(file, parts);
    expect((await call([...base, '--json', '--gather', file])).out).toBe(whole.out);
    expect((await call([...base, '--json', '--gather', '-'], parts)).out).toBe(whole.out);
    expectRefusal(await call(['vary', fixture, '--count', '40', '--seed', '8', '--gather', file]), /line 1: begins a part of another run/);
  });

  it('refuses with place and mend', async () => {
    expectRefusal(await call(['vary', fixture]), /--count is missing/);
    expectRefusal(await call(['vary', fixture, '--count', '0']), /--count: is 0; a whole number from 1/);
    expectRefusal(await call(['vary', fixture, '--count', '5', '--seed', 'x']), /--seed is 'x'/);
    expectRefusal(await call([...base, '--distribution', 'gauss']), /normal or uniform/);
    expectRefusal(await call([...base, '--shard', '1/2', '--gather', 'x']), /one of them at a time/);
    expectRefusal(await call([...base, '--gather', join(folder, 'none')]), /cannot be read/);
    expectRefusal(await call([...base, '--jsno']), /did you mean --json\?/);
  });
});
