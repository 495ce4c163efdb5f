import { spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { run } from '../../src/cli/run.ts';
import type { SweepResult } from '../../src/sweep/sweep.ts';
import type { VariationResult } from '../../src/tolerance/result.ts';
import { readCsv } from '../export/read-csv.ts';
import { toleranced } from '../tolerance/designs.ts';

const ROOT = join(import.meta.dirname, '../..');
const folder = mkdtempSync(join(tmpdir(), 'halfmark-stopped-'));
afterAll(() => rmSync(folder, { recursive: true }));
const fixture = join(folder, 'design.json');
writeFileSync(fixture, JSON.stringify(toleranced));

/** Runs a command and stops it as soon as something has been computed. */
async function stopped(args: string[]): Promise<{ code: number; out: string; error: string }> {
  let out = '';
  let error = '';
  const stop = new AbortController();
  // The first word of progress is about what is done by then.
  const progress = (): void => stop.abort();
  const code = await run(args, { out: (t) => void (out += t), error: (t) => void (error += t), stdin: async () => '', progress, stopSignal: () => stop.signal });
  return { code, out, error };
}
const along = ['sweep', fixture, '--variable', 'temperature', '--from', '250 K', '--to', '350 K', '--points', '80', '--figure', 'layers.n.n_cm3'];

describe('a long command that Ctrl-C stops', () => {
  it('prints the points of a sweep that it has, marked as partial', async () => {
    const { code, out, error } = await stopped(along);
    const result = JSON.parse(out) as SweepResult;
    expect(code).toBe(130);
    expect(result.partial).toBe(true);
    expect(result.done).toBeGreaterThan(0);
    expect(result.done).toBeLessThan(80);
    expect(result.figures[0].values.filter((v) => v !== null)).toHaveLength(result.done);
    expect(error).toBe(`halfmark: stopped; this is partial: ${result.done} of 80 points\n`);
  });

  it('leaves gaps with their reason in the table of a sweep', async () => {
    const { code, out } = await stopped([...along, '--csv']);
    const [, ...rows] = readCsv(out);
    expect([code, rows.length]).toEqual([130, 80]);
    const blank = rows.filter((row) => row[1] === '');
    expect(blank.length).toBeGreaterThan(0);
    expect(blank.length).toBeLessThan(80);
    expect(new Set(blank.map((row) => row[2]))).toEqual(new Set(['not reached: the sweep was stopped']));
  });

  it('prints the spreads of a tolerance run over what it has, marked as partial', async () => {
    const args = ['vary', fixture, '--count', '500', '--figure', 'layers.n.n_cm3'];
    const { code, out } = await stopped([...args, '--json']);
    const result = JSON.parse(out) as VariationResult;
    expect([code, result.partial]).toEqual([130, true]);
    expect(result.done).toBeLessThan(500);
    const lines = await stopped(args);
    expect(lines.out).toMatch(/^partial: stopped before the end\n.* of 500 variations/);
    expect(lines.error).toMatch(/this is partial: \d+ of 500 variations/);
    const part = await stopped([...args, '--shard', '1/1']);
    expect([part.code, part.error]).toEqual([130, expect.stringMatching(/--gather refuses/)]);
  });

  it('prints the values that sizing has looked at, and no edge', async () => {
    const { code, out, error } = await stopped(['size', fixture, '--variable', 'Nn', '--from', '1e17 cm^-3', '--to', '1e18 cm^-3']);
    expect(code).toBe(130);
    expect(out).toMatch(/^partial: stopped before anything was judged in full/);
    expect(out).not.toMatch(/meets every requirement/);
    expect(error).toMatch(/nothing is judged in full/);
  });

  it('ends by a signal of the system with what it has, on its threads', async () => {
    const into = join(folder, 'part.json');
    let error = '';
    let code: number | null = null;
    // Before it listens a signal ends it as ever, without a code; on a busy machine that takes a while.
    for (let wait = 2000; code === null && wait <= 32_000; wait *= 2) {
      const child = spawn(process.execPath, [join(ROOT, 'src/tools/halfmark.mjs'), 'vary', fixture, '--count', '200000', '--workers', '2', '--json', '-o', into], { stdio: ['ignore', 'ignore', 'pipe'] });
      child.stderr.on('data', (text: Buffer) => void (error += text.toString()));
      const ended = new Promise<number | null>((resolve) => child.on('exit', resolve));
      await new Promise((resolve) => setTimeout(resolve, wait));
      child.kill('SIGINT');
      code = await ended;
    }
    expect(code).toBe(130);
    expect(error).toMatch(/stopped; this is partial/);
    const result = JSON.parse(readFileSync(into, 'utf8')) as VariationResult;
    expect(result.partial).toBe(true);
    expect(result.done).toBeLessThan(200_000);
  });
});
