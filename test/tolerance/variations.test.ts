import { describe, expect, it } from 'vitest';
import { runHere, shardChunks } from '../../src/batch/job.ts';
import { starters } from '../../src/design/starters/index.ts';
import { toStack } from '../../src/design/stack.ts';
import type { Design } from '../../src/design/types.ts';
import { uncertaintiesOf } from '../../src/requirements/uncertainties.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import { MovedStacks } from '../../src/tolerance/moved-stacks.ts';
import { planVariations, type VariationPlan, type VariationRequest } from '../../src/tolerance/plan.ts';
import { strongestInputs, variationResult } from '../../src/tolerance/result.ts';
import { variationReport } from '../../src/tolerance/report.ts';
import { readShards, writeShard } from '../../src/tolerance/shards.ts';
import { chunkOf, variationJob } from '../../src/tolerance/variations.ts';
import { toleranced } from './designs.ts';

function planned(design: Design, request: Partial<VariationRequest>): VariationPlan {
  const reading = planVariations(design, { count: 100, seed: 1, ...request });
  if (!reading.ok) throw new Error(JSON.stringify(reading.complaints));
  return reading.plan;
}
async function varied(plan: VariationPlan, chunks?: readonly number[]) {
  const { values } = await runHere(variationJob(plan), { chunks });
  return { values, result: variationResult(plan, values) };
}

/** Several hundred solves each; a busy machine takes its time. */
describe('a tolerance run', () => {
  it('spreads a linear figure as the closed form says', async () => {
    const count = 800;
    const { result } = await varied(planned({ ...toleranced, requirements: [] }, { count, figures: ['layers.n.thickness_nm', 'contacts.top.barrier_n_eV'] }));
    expect([result.done, result.gaps]).toEqual([count, []]);
    const [thickness, barrier] = result.figures;
    // A tolerance is two standard deviations: 10 % of 300 nm and twice 8 nm, added in squares (JCGM 100:2008, equation 10).
    const closed = Math.hypot(0.05 * 300, 2 * 4);
    // Five standard errors: sd/sqrt(n) of a mean, sd/sqrt(2n) of a standard deviation.
    expect(Math.abs(thickness.mean! - 500)).toBeLessThan((5 * closed) / Math.sqrt(count));
    expect(Math.abs(thickness.sd! / closed - 1)).toBeLessThan(5 / Math.sqrt(2 * count));
    expect(thickness.nominal).toBeCloseTo(500, 9);
    expect(Math.abs(barrier.sd! / 0.025 - 1)).toBeLessThan(5 / Math.sqrt(2 * count));
    expect(barrier.histogram!.counts.reduce((a, b) => a + b)).toBe(count);
    // The quartiles of a normal figure lie 0.6745 standard deviations off (error of a quartile: 1.36 sd/sqrt(n)).
    const quartile = thickness.quantiles.find((q) => q.p === 0.75)!.value;
    expect(Math.abs((quartile - 500) / closed - 0.6745)).toBeLessThan((5 * 1.36) / Math.sqrt(count));
    const ends = Object.fromEntries(result.inputs.map((input, i) => [input.label, thickness.ends[i]]));
    expect(ends.tcore.low).toBeCloseTo(470, 6);
    expect(ends.tskin.high).toBeCloseTo(516, 6);
    expect(result.inputs[strongestInputs(thickness)[0].input].label).toBe('tcore');
    expect(result.inputs[strongestInputs(barrier)[0].input].label).toBe('barrier');
  });

  it('counts the yield of each requirement and of all', async () => {
    const count = 400;
    const { result } = await varied(planned(toleranced, { count, figures: ['contacts.top.barrier_n_eV'] }));
    expect(result.temperatures_K.map((T) => Math.round(T))).toEqual([300, 233, 398]);
    const [, barrier, electrons] = result.figures;
    // Nominal at the limit: half of the variations meet it. Standard error 0.5/sqrt(n); five of them.
    expect(Math.abs(barrier.yield!.share - 0.5)).toBeLessThan(2.5 / Math.sqrt(count));
    expect(electrons.words).toMatch(/electron density of n, min 1\.5e17/);
    expect(result.yield!.met).toBeLessThanOrEqual(Math.min(barrier.yield!.met, electrons.yield!.met));
    // Independent inputs: shares multiply.
    expect(Math.abs(result.yield!.share - barrier.yield!.share * electrons.yield!.share)).toBeLessThan(0.1);
    expect(electrons.yield!.low).toBeLessThan(electrons.yield!.share);
    // The density of frozen dopants is least in the cold.
    const cold = solveDesign(toleranced, { set: { temperature: '233.15 K' } });
    expect(cold.kind === 'result' && Math.abs(electrons.nominal! / cold.result.layers[0].n_cm3 - 1)).toBeLessThan(1e-9);
    const report = variationReport(result);
    expect(report).toContain('all requirements');
    expect(report).toContain('Nn 20 %');
  });

  it('is the same to the last digit whatever the number of shards, and by its seed', async () => {
    const request = { count: 70, seed: 42 };
    const plan = planned(toleranced, request);
    const whole = JSON.stringify((await varied(plan)).result);
    const { chunks } = variationJob(plan);
    for (const shards of [2, 4]) {
      let text = '';
      for (let i = shards; i >= 1; i--) text += writeShard(plan, (await varied(planned(toleranced, request), shardChunks(chunks, i, shards))).values);
      const reading = readShards(plan, text);
      if (!reading.ok) throw new Error(reading.complaint.message);
      expect(JSON.stringify(variationResult(plan, reading.chunks))).toBe(whole);
    }
    expect(JSON.stringify((await varied(planned(toleranced, { ...request, seed: 43 }))).result)).not.toBe(whole);
  });

  it('takes shards of its own run only, and all of them', async () => {
    const plan = planned(toleranced, { count: 40 });
    const { chunks } = variationJob(plan);
    const half = writeShard(plan, (await varied(plan, shardChunks(chunks, 1, 2))).values);
    const complaint = (text: string, of = plan): string => {
      const reading = readShards(of, text);
      if (reading.ok) throw new Error('was taken');
      return reading.complaint.message;
    };
    expect(complaint(half)).toMatch(/pieces of the run are missing/);
    expect(complaint(half.slice(0, -20))).toMatch(/no line of JSON/);
    expect(complaint(half, planned(toleranced, { count: 41 }))).toMatch(/another run/);
    expect(complaint('{"chunk":0,"values":["x"],"met":[],"gaps":[]}')).toMatch(/no part/);
  });

  it('gives as many variations when it is stopped as it got', async () => {
    const plan = planned(toleranced, { count: 320, figures: ['layers.n.n_cm3'] });
    const stop = new AbortController();
    const { values, stopped } = await runHere(variationJob(plan), { signal: stop.signal, onProgress: ({ done }) => done > 100 && stop.abort() });
    const result = variationResult(plan, values);
    expect(stopped).toBe(true);
    expect(result.done).toBeGreaterThan(60);
    expect(result.done).toBeLessThan(160);
    expect(result.figures[0].known).toBe(result.done);
  });

  it('says of variations without an answer why, and counts them as not met', async () => {
    const design = structuredClone(toleranced);
    // 40 nm less 2 sigma of 15 nm and more: some variations have no thickness left.
    design.variables![0] = { name: 'tcore', value: '40 nm', tolerance: '30 nm' };
    design.layers[0].thickness = 'tcore';
    const { result } = await varied(planned(design, { count: 150, figures: ['layers.n.thickness_nm'] }));
    expect(result.gaps.length).toBeGreaterThan(0);
    expect(result.gaps[0].reason).toMatch(/layers\[0\]\.thickness: .*must be (?:at least 0\.01 nm|above zero)/);
    expect(result.figures[0].known).toBe(150 - result.gaps.length);
    expect(result.yield!.of).toBe(150);
  });

  it('ends the draws of an active share at all atoms', async () => {
    const design = structuredClone(toleranced);
    design.variables = [...design.variables!, { name: 'active', value: '0.95', tolerance: '20 %' }];
    const doped = design.layers.find(({ dopants = [] }) => dopants.length > 0)!;
    doped.dopants = [{ ...doped.dopants![0], concentration: '1e18 cm^-3', activation: 'active' }];
    const { result } = await varied(planned(design, { count: 60, tolerances: 'stated', figures: [`layers.${doped.name}.ionised.0.concentration_cm3`] }));
    expect(result.gaps).toEqual([]);
    expect(result.figures[0].most).toBe(1e18);
    expect(result.inputs.find(({ label }) => label === 'active')).toMatchObject({ span: ['0.76', '1'] });
  });

  it('covers every variation once', () => {
    const plan = planned(toleranced, { count: 101 });
    const job = variationJob(plan);
    const drawn: number[] = [];
    for (let c = 0; c < job.chunks; c++) {
      const { kind, first, count } = chunkOf(plan, c);
      if (kind === 'draws') for (let i = 0; i < count; i++) drawn.push(first + i);
    }
    expect(drawn).toEqual(Array.from({ length: 101 }, (_, i) => i));
  });

  it('is refused with place and mend', () => {
    const refusal = (request: Partial<VariationRequest>, design = toleranced): string => {
      const reading = planVariations(design, { count: 10, seed: 1, ...request });
      if (reading.ok) throw new Error('was not refused');
      return reading.complaints.map((c) => `${c.path}: ${c.message}`).join('\n');
    };
    expect(refusal({ count: 0 })).toMatch(/^count: .*from 1 to/);
    expect(refusal({ count: Number.NaN })).toMatch(/^count: is no number; a whole number from 1 to/);
    expect(refusal({ seed: -1 })).toMatch(/^seed: /);
    expect(refusal({ figures: ['layers.n.m_cm3'] })).toMatch(/^figure: .*did you mean/);
    expect(refusal({ tolerances: 'none' })).toMatch(/nothing has a tolerance/);
  });
});

describe('stacks moved within their tolerances', () => {
  it('are those that the whole reading gives', () => {
    for (const design of [toleranced, ...starters.map((s) => s.design)]) {
      const nominal = toStack(design);
      if (!nominal.ok) throw new Error(design.title);
      const uncertainties = uncertaintiesOf(design, {}, 'all');
      const stacks = new MovedStacks(design, {}, uncertainties, nominal.stack);
      for (let k = 0; k < 6; k++) {
        const counts = uncertainties.map((_, i) => Math.sin(17 * k + 5 * i));
        const moves = Object.fromEntries(uncertainties.flatMap((u, i) => (u.variable === null ? [] : [[u.variable, counts[i]]])));
        const reading = toStack(design, {}, moves);
        if (!reading.ok) throw new Error(design.title);
        const expected = uncertainties.reduce((s, u, i) => u.apply(s, counts[i]), reading.stack);
        expect(stacks.at(counts), design.title).toEqual(expected);
      }
    }
  });
});
