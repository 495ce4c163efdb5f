import { describe, expect, it } from 'vitest';
import { allChunks, runHere, shardChunks, steps } from '../../src/batch/job.ts';
import { starters } from '../../src/design/starters/index.ts';
import type { Design } from '../../src/design/types.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import { sweepCsvHeading, sweepCsvRows } from '../../src/sweep/csv.ts';
import { figuresOf } from '../../src/sweep/figures.ts';
import { findPlace, isComplaint, sweepNames } from '../../src/sweep/places.ts';
import { toStack } from '../../src/design/stack.ts';
import { filmJob, framesOf, planFilm } from '../../src/sweep/film.ts';
import { atPoint, planSweep, pointsOf, sweepJob, sweepResult, type SweepPlan, type SweepRequest } from '../../src/sweep/sweep.ts';
import { readCsv } from '../export/read-csv.ts';

const schottky: Design = { ...starters.find((s) => s.design.title.startsWith('Nickel'))!.design, requirements: [] };

function planned(design: Design, request: SweepRequest): SweepPlan {
  const reading = planSweep(design, request);
  if (!reading.ok) throw new Error(JSON.stringify(reading.complaints));
  return reading.plan;
}
async function swept(plan: SweepPlan, chunks?: number[]) {
  const { values } = await runHere(sweepJob(plan), { chunks });
  return { result: sweepResult(plan, values), points: pointsOf(plan, values) };
}
const doping: SweepRequest['axis'] = { variable: 'Ndrift', from: '1e15 cm^-3', to: '1e17 cm^-3', points: 21, scale: 'log' };

describe('a sweep', () => {
  it('gives at each point what a single solve gives', async () => {
    const figures = ['layers.drift.ec_minus_ef_eV', 'contacts.top.depletion_nm', 'junctions.0.builtin_V'];
    const plan = planned(schottky, { axis: doping, figures });
    const { result } = await swept(plan);
    expect(result.gaps).toEqual([]);
    for (const i of [0, 7, 16, 20]) {
      const { design, set } = atPoint(plan, i);
      const answer = solveDesign(design, { set });
      if (answer.kind !== 'result') throw new Error(answer.kind);
      const { layers, contacts, junctions } = answer.result;
      // Figures of a layer by itself know no mesh; the others differ by the accepted mesh error, 0.1 mV of some volts.
      expect(result.figures[0].values[i]).toBe(layers[0].ec_minus_ef_eV);
      expect(result.figures[2].values[i]).toBe(junctions[0].builtin_V);
      expect(Math.abs(result.figures[1].values[i]! / contacts[0].depletion_nm! - 1)).toBeLessThan(2e-3);
    }
    expect(result.axes[0]).toMatchObject({ variable: 'Ndrift', unit: 'cm^-3', scale: 'log' });
    expect(result.axes[0].values[10]).toBe(1e16);
  });

  it('takes the temperature and quantities at places of the design', async () => {
    const cases: [string, string, string, (d: Design) => unknown][] = [
      ['temperature', '77 K', '300 K', () => null],
      ['layers[0].thickness', '3 um', '5 um', (d) => d.layers[0].thickness],
      ['layers.buffer.dopants[0].concentration', '1e17 cm^-3', '1e18 cm^-3', (d) => d.layers[1].dopants![0].concentration],
      ['top.barrier', '0.8 eV', '1.2 eV', (d) => (d.top as { barrier?: string }).barrier],
      ['layers[0].dopants[0].activation', '0.5', '1', (d) => d.layers[0].dopants![0].activation],
    ];
    for (const [variable, from, to, read] of cases) {
      const plan = planned(schottky, { axis: { variable, from, to, points: 3 } });
      const last = atPoint(plan, 2);
      if (variable === 'temperature') expect(last.set).toEqual({ temperature: '300 K' });
      else expect(String(read(last.design))).toBe(to);
      const { result } = await swept(plan);
      expect(result.gaps, variable).toEqual([]);
    }
  });

  it('runs two axes as a matrix, the first fastest', async () => {
    const plan = planned(schottky, { axis: { variable: 'temperature', from: '250 K', to: '350 K', points: 3 }, second: { ...doping, points: 2 }, figures: ['layers.drift.ec_minus_ef_eV'] });
    const { result } = await swept(plan);
    const [values] = result.figures.map((f) => f.values);
    expect(values).toHaveLength(6);
    const single = solveDesign(schottky, { set: { temperature: '350 K', Ndrift: '1e17 cm^-3' } });
    expect(single.kind === 'result' && single.result.layers[0].ec_minus_ef_eV).toBe(values[5]);
    expect(values[0]).toBeGreaterThan(values[3]!);
  });

  it('does not depend on who computes which part', async () => {
    const plan = planned(schottky, { axis: { ...doping, points: 40 } });
    const whole = (await swept(plan)).points;
    const rows = sweepCsvRows(plan, whole);
    const job = sweepJob(plan);
    let parts = '';
    for (const i of [1, 2]) parts += sweepCsvRows(plan, (await swept(plan, shardChunks(job.chunks, i, 2))).points);
    expect(parts).toBe(rows);
  });

  it('leaves a gap with its reason where a point has no answer', async () => {
    const design: Design = structuredClone(schottky);
    design.custom = { materials: [{ id: 'narrow', gap: { zeroK: '0.2 eV', alpha: '1e-3 eV/K', beta: '10 K' }, affinity: '4 eV', permittivity: 10, electronMass: 1, holeMass: 1, source: 'invented' }] };
    design.layers = [{ name: 'only', material: 'narrow', thickness: '100 nm' }];
    design.top = design.bottom = { kind: 'neutral' };
    // 0.2 - 1e-3 T^2/(T + 10) closes near 210 K.
    const plan = planned(design, { axis: { variable: 'temperature', from: '150 K', to: '250 K', points: 5 }, figures: ['layers.only.gap_eV'] });
    const { result, points } = await swept(plan);
    expect(result.gaps.map((g) => g.index)).toEqual([3, 4]);
    expect(result.gaps[0].reason).toMatch(/gap/);
    expect(result.figures[0].values.map((v) => v === null)).toEqual([false, false, false, true, true]);
    const csv = readCsv(sweepCsvHeading(plan) + sweepCsvRows(plan, points));
    expect(csv[4].slice(1)).toEqual(['', result.gaps[0].reason]);
  });

  it('writes a table that reads back equal', async () => {
    const design: Design = structuredClone(schottky);
    design.layers[0].name = '=cmd|"x",y';
    const plan = planned(design, { axis: { ...doping, points: 3 }, figures: ['layers.0.ec_minus_ef_eV', 'contacts.top.barrier_n_eV'] });
    const { result, points } = await swept(plan);
    const [heading, ...rows] = readCsv(sweepCsvHeading(plan) + sweepCsvRows(plan, points));
    expect(heading[0]).toBe('Ndrift (cm^-3)');
    expect(heading[1]).toBe(`'=cmd|"x",y: Ec - EF (eV)`);
    rows.forEach((row, i) => {
      expect(Number(row[0])).toBe(result.axes[0].values[i]);
      result.figures.forEach((figure, f) => expect(Number(row[1 + f])).toBe(figure.values[i]));
    });
  });

  it('can be left between two steps', async () => {
    const plan = planned(schottky, { axis: { ...doping, points: 40 } });
    const stop = new AbortController();
    const { values, stopped } = await runHere(sweepJob(plan), { signal: stop.signal, onChunk: () => stop.abort() });
    expect([stopped, values.size]).toEqual([true, 1]);
    expect(sweepResult(plan, values).done).toBe(16);
    const first = steps(sweepJob(plan)).next();
    expect(first.done).toBe(false);
    expect(!first.done && first.value && first.value.progress).toEqual({ done: 16, total: 40 });
  });

  it('is refused at an end where a formula of the design has no value, and names the formula', () => {
    const design = structuredClone(schottky);
    const { material } = design.layers[0];
    const own = { id: material, gap: { formula: '1.12 eV + 1e-9 eV*K/(T - 350 K)' }, affinity: '4.05 eV', affinityShare: 0.5, permittivity: 11.7, permittivityHighFrequency: 11.7, electronMass: 1.09, holeMass: 1.15, source: 'invented' };
    design.custom = { materials: [own] };
    delete design.conditions.temperatureRange;
    delete design.requirements;
    const ends = (from: string, to: string) => planSweep(design, { axis: { variable: 'temperature', from, to, points: 3 } });
    const reading = ends('300 K', '350 K');
    expect(!reading.ok && reading.complaints).toEqual([{ path: 'to', message: expect.stringMatching(/^the design cannot be solved there: custom\.materials\[0\]\.gap\.formula has no finite value at 350 K.*Mend the formula/) }]);
    expect(ends('300 K', '400 K').ok).toBe(true);
  });

  it('is refused with place and mend before anything is solved', () => {
    const refusal = (change: Partial<SweepRequest['axis']>, more: Partial<SweepRequest> = {}): string => {
      const reading = planSweep(schottky, { axis: { ...doping, ...change }, ...more });
      if (reading.ok) throw new Error('was not refused');
      return reading.complaints.map((c) => `${c.path}: ${c.message}`).join('\n');
    };
    expect(refusal({ variable: 'Ndrif' })).toMatch(/^variable: .*did you mean Ndrift\?/);
    expect(refusal({ variable: 'layers[0].thicknes' })).toMatch(/did you mean layers\[0\]\.thickness\?/);
    expect(refusal({ variable: 'layers[0].x', from: '0', to: '1' })).toMatch(/^variable: .*is not there/);
    expect(refusal({ variable: 'bottom.barrier', from: '0.1 eV', to: '1 eV' })).toMatch(/does not go with a bottom contact of kind "neutral"/);
    expect(refusal({ variable: '__proto__.x' })).toMatch(/^variable: there is nothing/);
    expect(refusal({ points: 1 })).toMatch(/^points: .*2 points or more/);
    expect(refusal({ points: 1e9 })).toMatch(/^points: /);
    expect(refusal({ from: '1e17 cm^-3', to: '1e15 cm^-3' })).toMatch(/^from: .*put the lower end first: from '1e15 cm\^-3' to '1e17 cm\^-3'/);
    expect(refusal({ to: '1e15 cm^-3' })).toMatch(/^to: .*empty sweep/);
    expect(refusal({ from: '0 cm^-3' })).toMatch(/^from: .*above zero/);
    expect(refusal({ from: '5 nm' })).toMatch(/^from: .*is a length, not a concentration/);
    expect(refusal({ to: '1e25 cm^-3' })).toMatch(/^to: .*must be at most 1e23 cm\^-3/);
    expect(refusal({}, { figures: ['layers.drift.n_cm'] })).toMatch(/^figure: .*did you mean layers\.drift\.n_cm3\?/);
    expect(refusal({}, { figures: ['profile.z_nm'] })).toMatch(/^figure: there is no figure/);
    expect(refusal({}, { second: { ...doping } })).toMatch(/^second\.variable: /);
  });
});

describe('figures by path', () => {
  it('are numbers of the result or null, each with words', () => {
    const answer = solveDesign(schottky);
    if (answer.kind !== 'result') throw new Error(answer.kind);
    const figures = figuresOf(schottky);
    const known = figures.filter((f) => f.read(answer.result) !== null);
    expect(known.length).toBeGreaterThan(60);
    expect(new Set(figures.map((f) => f.path)).size).toBe(figures.length);
    const read = (path: string) => figures.find((f) => f.path === path)!.read(answer.result);
    expect(read('layers.drift.n_cm3')).toBe(answer.result.layers[0].n_cm3);
    expect(read('layers.drift.ionised.0.fraction')).toBe(answer.result.layers[0].ionised[0].fraction);
    expect(read('contacts.top.barrier_n_eV')).toBe(answer.result.contacts[0].barrier_n_eV);
    expect(read('junctions.1.builtin_V')).toBe(answer.result.junctions[1].builtin_V);
  });

  it('name every numeric field of layers, junctions and contacts but assumptions and errors', () => {
    const left = /\.(?:kane_[np]_per_eV|rho_c_error)$/;
    const answer = solveDesign(schottky);
    if (answer.kind !== 'result') throw new Error(answer.kind);
    const paths = new Set(figuresOf(schottky).map((f) => f.path));
    const numbers = (at: object, path: string): string[] => Object.entries(at).flatMap(([key, v]) => (typeof v === 'number' ? [`${path}.${key}`] : key === 'boltzmann' ? numbers(v as object, `${path}.${key}`) : []));
    const { layers, junctions, contacts } = answer.result;
    const missing = [...numbers(layers[0], 'layers.drift'), ...numbers(layers[0].ionised[0], 'layers.drift.ionised.0'), ...numbers(junctions[0], 'junctions.0'), ...numbers(contacts[0], 'contacts.top')].filter((p) => !paths.has(p) && !left.test(p));
    expect(missing).toEqual([]);
  });
});

describe('a film over the temperature', () => {
  it('keeps whole results and the regime of each layer', async () => {
    const plan = planFilm(schottky, { from: '-40 degC', to: '125 degC', frames: 18 });
    if (!plan.ok) throw new Error(JSON.stringify(plan.complaints));
    const job = filmJob(plan.plan);
    expect(allChunks(job).length).toBe(2);
    const frames = framesOf((await runHere(job)).values);
    expect(frames).toHaveLength(18);
    expect(frames[0].temperature_K).toBeCloseTo(233.15, 9);
    for (const frame of frames) {
      if ('gap' in frame) throw new Error(frame.gap);
      expect(frame.result.conditions.temperature_K).toBe(frame.temperature_K);
      expect(frame.regimes).toEqual(frame.result.layers.map((l) => l.regime));
    }
  });
});

describe('the ends of an axis', () => {
  const values = (axis: SweepRequest['axis'], set?: Record<string, string>): number[] => planned(schottky, { axis, set }).axes[0].values;

  it('keep the unit that they were typed in, and their digits', () => {
    expect(values({ variable: 'layers[0].thickness', from: '3 um', to: '5000 nm', points: 3 })).toEqual([3, 4, 5]);
    expect(values({ variable: 'temperature', from: '-40 degC', to: '300 K', points: 2 })).toEqual([233.15, 300]);
    expect(values({ variable: 'top.barrier', from: '100 meV', to: '0.3 eV', points: 3 })).toEqual([100, 200, 300]);
    expect(values({ variable: 'layers[0].dopants[0].activation', from: '0.1', to: '0.3', points: 3 })).toEqual([0.1, 0.2, 0.3]);
  });

  it('may be expressions over the variables as they are set', () => {
    expect(values({ variable: 'layers[1].dopants[0].concentration', from: 'Ndrift', to: '10*Ndrift', points: 2 }, { Ndrift: '1e15 cm^-3' })).toEqual([1e15, 1e16]);
  });

  it('are not taken from nothing', () => {
    const reading = planSweep(schottky, { axis: { variable: 'layers[0].dopants[0].activation', from: ' ', to: '1', points: 2 } });
    expect(reading.ok).toBe(false);
  });
});

describe('what can be swept', () => {
  it('can all be put into its design and read again', () => {
    const sample: Record<string, string> = { length: '210 nm', energy: '0.11 eV', density: '2.5e17 cm^-3', sheetDensity: '1e12 cm^-2', temperature: '310 K', number: '0.15' };
    for (const { design } of starters) {
      const names = sweepNames(design);
      expect(names.length).toBeGreaterThan(5);
      for (const name of names) {
        const place = findPlace(design, name);
        if (isComplaint(place)) throw new Error(`${design.title} ${name}: ${place.message}`);
        const put = place.put(design, sample[place.kind]);
        const reading = toStack(put.design, put.set);
        expect(reading.ok ? [] : reading.complaints, `${design.title} ${name}`).toEqual([]);
        expect(JSON.stringify(put), name).not.toBe(JSON.stringify({ design, set: {} }));
      }
    }
  });
});
