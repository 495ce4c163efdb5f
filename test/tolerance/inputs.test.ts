import { describe, expect, it } from 'vitest';
import { runHere } from '../../src/batch/job.ts';
import type { Design } from '../../src/design/types.ts';
import { planVariations, type VariationPlan, type VariationRequest } from '../../src/tolerance/plan.ts';
import { variationReport } from '../../src/tolerance/report.ts';
import { variationResult } from '../../src/tolerance/result.ts';
import { summaryCsv } from '../../src/tolerance/summary-csv.ts';
import { variationJob } from '../../src/tolerance/variations.ts';
import { toleranced } from './designs.ts';

const plain: Design = { ...toleranced, requirements: [] };

function reading(request: Partial<VariationRequest>, design = plain) {
  return planVariations(design, { count: 10, seed: 1, ...request });
}
function planned(request: Partial<VariationRequest>, design = plain): VariationPlan {
  const answer = reading(request, design);
  if (!answer.ok) throw new Error(JSON.stringify(answer.complaints));
  return answer.plan;
}
function refusal(request: Partial<VariationRequest>, design = plain): string {
  const answer = reading(request, design);
  if (answer.ok) throw new Error('was not refused');
  return answer.complaints.map((c) => `${c.path}: ${c.message}`).join('\n');
}
const rows = (plan: VariationPlan): Record<string, string> => Object.fromEntries(plan.uncertainties.map((u) => [u.label, `${u.tolerance}, ${u.distribution}, ${u.span[0]} to ${u.span[1]}, ${u.origin}`]));

describe('inputs of a tolerance run', () => {
  it('say how wide they are, in values', () => {
    expect(rows(planned({}))).toEqual({
      tcore: '10 %, normal, 270 nm to 330 nm, stated',
      tskin: '8 nm, normal, 92 nm to 108 nm, stated',
      Nn: '20 %, normal, 1.6e17 cm^-3 to 2.4e17 cm^-3, stated',
      'p B': '20 %, normal, 8e15 cm^-3 to 1.2e16 cm^-3, default',
      'p thickness': '5 %, normal, 950 nm to 1.05 um, default',
      barrier: '50 meV, normal, -50 meV to +50 meV, default',
    });
  });

  it('end a share of atoms where it is drawn to, and no other number', () => {
    const { dopants: [boron] = [], ...rest } = plain.layers.find(({ name }) => name === 'p')!;
    const withShare = (row: object, more: Partial<Design> = {}): Design => ({ ...plain, ...more, variables: [...plain.variables!, { name: 'a', value: '0.9', tolerance: '20 %' }], layers: plain.layers.map((layer) => (layer.name === 'p' ? { ...rest, dopants: [{ ...boron, ...row }] } : layer)) });
    const span = (design: Design): string => /, (\S+ to \S+), stated$/.exec(rows(planned({ tolerances: 'stated' }, design)).a)![1];
    expect(span(withShare({ activation: 'a' }))).toBe('0.72 to 1');
    expect(span(withShare({ activation: ' a ', compensation: 'a' }))).toBe('0.72 to 1');
    // What is made of it may end elsewhere, so the number itself goes as far as its tolerance.
    expect(span(withShare({ activation: 'a/2' }))).toBe('0.72 to 1.08');
    expect(span(withShare({ concentration: 'a * 1e16 cm^-3', activation: 'a' }))).toBe('0.72 to 1.08');
    const low = withShare({ compensation: 'a' });
    low.variables![low.variables!.length - 1] = { name: 'a', value: '0.1', tolerance: '0.2' };
    expect(span(low)).toBe('0 to 0.3');
  });

  it('take another tolerance and another distribution one by one, and leave the design alone', () => {
    const plan = planned({ inputs: { tcore: { tolerance: '3 nm' }, 'p thickness': { tolerance: '20 nm', distribution: 'uniform' }, 'p B': { tolerance: '0 %' }, barrier: { tolerance: '20 meV' }, Nn: { distribution: 'uniform' } } });
    expect(rows(plan)).toEqual({
      tcore: '3 nm, normal, 297 nm to 303 nm, stated',
      tskin: '8 nm, normal, 92 nm to 108 nm, stated',
      Nn: '20 %, uniform, 1.6e17 cm^-3 to 2.4e17 cm^-3, stated',
      'p thickness': '20 nm, uniform, 980 nm to 1.02 um, stated',
      barrier: '20 meV, normal, -20 meV to +20 meV, stated',
    });
    expect(plan.design).toBe(plain);
  });

  it('spread their figures by the tolerance and the distribution of this run', async () => {
    const count = 800;
    const plan = planned({ count, figures: ['layers.p.thickness_nm', 'contacts.top.barrier_n_eV'], inputs: { 'p thickness': { tolerance: '20 nm', distribution: 'uniform' }, barrier: { tolerance: '20 meV' } } });
    const { values } = await runHere(variationJob(plan));
    const result = variationResult(plan, values);
    const [thickness, barrier] = result.figures;
    // Even between 980 and 1020: 40/sqrt(12); kurtosis 1.8, so an error of sd sqrt(0.2/n) in a standard deviation; five of them.
    expect(Math.abs(thickness.sd! / (40 / Math.sqrt(12)) - 1)).toBeLessThan(5 * Math.sqrt(0.2 / count));
    expect(thickness.least).toBeGreaterThanOrEqual(980);
    expect(thickness.most).toBeLessThanOrEqual(1020);
    expect(Math.abs(barrier.sd! / 0.01 - 1)).toBeLessThan(5 / Math.sqrt(2 * count));
    const at = result.inputs.findIndex(({ label }) => label === 'p thickness');
    expect([thickness.ends[at].low, thickness.ends[at].high].map((v) => Math.round(v! * 1e6) / 1e6)).toEqual([980, 1020]);
    expect(variationReport(result)).toContain('p thickness 20 nm: 980 nm to 1.02 um, uniform');
    expect(summaryCsv(result)).toContain('p thickness,20 nm,stated,uniform,980 nm,1.02 um');
  });

  it('are refused where nothing would be left, with the place and the mend, before anything is solved', () => {
    const stated = (tolerance: string): Design => ({ ...plain, variables: plain.variables!.map((v) => (v.name === 'tcore' ? { ...v, tolerance } : v)) });
    expect(refusal({}, stated('120 %'))).toMatch(/^variables\[0\]\.tolerance: .*stays below 100 %/);
    expect(refusal({}, { ...stated('301 nm'), layers: plain.layers.map((l, i) => (i === 0 ? { ...l, thickness: 'tcore' } : l)) })).toMatch(/^inputs\.tcore: '301 nm' is too wide: at its lower end, layers\[0\]\.thickness.*; make it smaller/);
    expect(refusal({ inputs: { tcore: { tolerance: '100 %' } } })).toMatch(/^inputs\.tcore: .*stays below 100 %/);
    expect(refusal({ inputs: { 'p thickness': { tolerance: '150 %' } } })).toMatch(/^inputs\.p thickness: '150 %' is the whole value or more.*below 100 %/);
    expect(refusal({ inputs: { 'p thickness': { tolerance: '2 um' } } })).toMatch(/^inputs\.p thickness: '2 um' is the whole value or more/);
    expect(refusal({ inputs: { 'p thickness': { tolerance: '-5 nm' } } })).toMatch(/is negative/);
    expect(refusal({ inputs: { 'p thickness': { tolerance: '5 eV' } } })).toMatch(/a share such as "5 %", or a length such as "2 nm"/);
    expect(refusal({ inputs: { 'p B': { tolerance: '1e15 cm^-3' } } })).toMatch(/is no share/);
    expect(refusal({ inputs: { barrier: { tolerance: '5 %' } } })).toMatch(/an energy such as "30 meV"/);
    expect(refusal({ inputs: { 'p thicknes': { tolerance: '5 %' } } })).toMatch(/did you mean p thickness\?/);
    expect(refusal({ inputs: { __proto__x: {} } })).toMatch(/is nothing that this design leaves uncertain/);
  });

  it('depend on nothing but their own choice: the others are drawn as before', async () => {
    const one = async (request: Partial<VariationRequest>): Promise<(number | null)[]> => [...(await runHere(variationJob(planned({ count: 5, figures: ['layers.n.thickness_nm'], ...request })))).values.values()].pop()!.values;
    expect(await one({ inputs: { barrier: { distribution: 'uniform', tolerance: '10 meV' } } })).toEqual(await one({}));
  });
});
