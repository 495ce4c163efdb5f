import { describe, expect, it } from 'vitest';
import { runHere } from '../../src/batch/job.ts';
import { planVariations } from '../../src/tolerance/plan.ts';
import { variationResult, type VariationResult } from '../../src/tolerance/result.ts';
import { summaryCsv } from '../../src/tolerance/summary-csv.ts';
import { variationJob } from '../../src/tolerance/variations.ts';
import { readCsv } from '../export/read-csv.ts';
import { toleranced } from './designs.ts';

async function run(count = 24): Promise<VariationResult> {
  const planned = planVariations(toleranced, { count, seed: 3, tolerances: 'stated' });
  if (!planned.ok) throw new Error(JSON.stringify(planned.complaints));
  return variationResult(planned.plan, (await runHere(variationJob(planned.plan))).values);
}

describe('the summary of a tolerance run as CSV', () => {
  it('has every figure with all its digits, its yield and what moves it', async () => {
    const result = await run();
    const rows = readCsv(summaryCsv(result));
    expect(rows[1].slice(0, 4)).toEqual(['24', '24', '0', '3']);
    const heading = rows.findIndex((row) => row[0] === 'figure');
    const table = rows.slice(heading + 1, heading + 1 + result.figures.length);
    result.figures.forEach((figure, i) => {
      expect(table[i][0].replace(/^'/, '')).toBe(figure.words);
      const cell = (name: string): string => table[i][rows[heading].indexOf(name)];
      expect(cell('mean')).toBe(figure.mean === null ? '' : String(figure.mean));
      expect(cell('0.975 quantile')).toBe(String(figure.quantiles.find((q) => q.p === 0.975)?.value ?? ''));
      expect(cell('share met')).toBe(figure.yield === null ? '' : String(figure.yield.share));
    });
    expect(rows.some((row) => row[0] === 'tcore' && row[1].includes('10 %'))).toBe(true);
  });

  it('lists the variations without an answer, and runs no formula of a stranger', async () => {
    const result = await run(8);
    const csv = summaryCsv({ ...result, inputs: result.inputs.map((input) => ({ ...input, label: '=1+1' })), gaps: [{ index: 5, reason: 'a gap, "closed"' }] });
    expect(csv).toContain("'=1+1");
    expect(csv).not.toMatch(/(?:^|,)=1/m);
    expect(readCsv(csv).at(-1)).toEqual(['5', 'a gap, "closed"']);
  });
});
