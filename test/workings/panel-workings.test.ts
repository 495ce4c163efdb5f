import { describe, expect, it, vi } from 'vitest';
import { closeUps } from '../../src/contacts/close-up.ts';
import { rankMetals, type Ranking } from '../../src/contacts/rank-metals.ts';
import { REQUIREMENT_QUANTITIES } from '../../src/design/requirement-quantities.ts';
import { starters } from '../../src/design/starters/index.ts';
import type { Design, Requirement } from '../../src/design/types.ts';
import { PANEL_QUANTITIES } from '../../src/quantity/panel-quantities.ts';
import { judge } from '../../src/requirements/judge.ts';
import { size } from '../../src/requirements/size.ts';
import { planVariations } from '../../src/tolerance/plan.ts';
import { variationResult } from '../../src/tolerance/result.ts';
import { variationJob, type VariationRows } from '../../src/tolerance/variations.ts';
import { bestFigures, comparedFigures, metalFigures, nearContactFigures, requirementFigures, sizingFigures, spreadFigures, yieldFigures, type PanelFigure } from '../../src/workings/panel-figures.ts';
import { panelWorkings } from '../../src/workings/panel-workings.ts';
import type { Workings } from '../../src/workings/workings.ts';
import { contactDesign } from '../requirements/designs.ts';
import { lastOf, wrongLines } from './by-hand.ts';

// Hundreds of solves: seconds on a free machine, many more on a busy one.
vi.setConfig({ testTimeout: 240_000 });

const starter = (id: string): Design => structuredClone(starters.find((s) => s.id === id)!.design);
/** Figures that were searched from another start differ by what the mesh leaves open: 0.2 % of a ratio (NOISE), or of kT. */
const OF_THE_MESH = 2e-3;
const MESH_ENERGY = 5e-5;

/** Every quantity that a requirement can limit, of the first part that can have it. */
function everyRequirement({ layers }: Design): Requirement[] {
  return Object.entries(REQUIREMENT_QUANTITIES).map(([quantity, row]) => ({
    quantity, of: row.of[0] === 'contact' ? 'top' : layers[0].name, ...(row.kind === 'flag' ? { max: false } : { max: `3 ${row.unit}`.trim() }), over: 'temperatureRange' as const,
  }));
}

function judged(design: Design): PanelFigure[] {
  const found = judge(design, { samples: 0, inside: 0 });
  if (found.kind !== 'judged') throw new Error(JSON.stringify(found.complaints));
  return found.requirements.flatMap((row, i) => requirementFigures(design, row, i));
}

/** Asks each figure how, and holds the answer against the figure. */
function held(name: string, figures: readonly PanelFigure[], within = OF_THE_MESH): Workings[] {
  const wrong: string[] = [];
  const all = figures.map((figure) => {
    const w = panelWorkings(figure);
    if (w.value[0] !== figure.text) wrong.push(`${name}: ${w.title}: ${w.value[0]} is not ${figure.text}`);
    if (w.steps.length + w.remarks.length === 0) wrong.push(`${name}: ${w.title} says nothing`);
    wrong.push(...wrongLines(name, w));
    if (figure.value === null) return w;
    const last = lastOf(w);
    const near = last !== null && (Math.abs(last - figure.value) <= Math.max(within * Math.abs(figure.value), within === 0 ? 0 : MESH_ENERGY) || last === figure.value);
    if (!near) wrong.push(`${name}: ${w.title}: ${last} against ${figure.value}`);
    return w;
  });
  expect(wrong).toEqual([]);
  return all;
}

const columnsOf = (figures: readonly PanelFigure[]): string[] => [...new Set(figures.map(({ asked }) => asked.column as string))].sort();

describe('the workings of a requirement', () => {
  it('lead from the worst corner to the figure, to the limit and to the margin, for every quantity that can be limited', () => {
    const seen = new Set<string>();
    for (const id of ['pn-diode', 'back-field', 'modulation-doped']) {
      const base = starter(id);
      const design: Design = { ...base, conditions: { ...base.conditions, temperatureRange: ['250 K', '350 K'] } };
      const figures = judged({ ...design, requirements: everyRequirement(design) });
      expect(columnsOf(figures)).toEqual(Object.keys(PANEL_QUANTITIES.requirement).sort());
      held(id, figures);
      for (const { asked, text } of figures) if (asked.table === 'requirement' && asked.column === 'worst' && text !== '–') seen.add(asked.row.quantity);
    }
    expect(seen.size).toBeGreaterThan(20);
  });

  it('stand behind what every starter requires', () => {
    for (const { id, design } of starters) held(id, judged(structuredClone(design)));
  });

  it('say at the corner how each tolerance moved its value, the barrier and the offset too', () => {
    const channel = starter('modulation-doped');
    const offset = held('channel', judged({ ...channel, requirements: [{ quantity: 'conductionOffset', of: channel.layers[0].name, max: '1 eV' }, { quantity: 'valenceOffset', of: channel.layers[0].name, max: '1 eV' }] }));
    const words = offset.flatMap((w) => w.steps.flatMap((s) => (s.kind === 'law' ? [] : [s.result.words])));
    for (const line of ['step of Ec without its tolerance', 'step of Ec at this corner', 'step of Ev at this corner']) expect(words).toContain(line);
    const c = contactDesign();
    const barrier = held('contact', judged({ ...c, requirements: [{ quantity: 'contactResistivity', of: 'top', max: '1e-6 ohm cm^2' }] })).find(({ title }) => title.startsWith('Worst of'))!;
    const lines = barrier.steps.flatMap((s) => (s.kind === 'formula' ? [s.result.words] : []));
    expect(lines).toContain('barrier for electrons at this corner');
    expect(lines).toContain('barrier for electrons, without its tolerance');
    expect(barrier.remarks[0]).toContain('+50 meV');
  });
});

describe('the workings of a sizing', () => {
  it('verify both sides of each edge, give the width of the bracket, and why the best is the best', () => {
    const design: Design = { ...contactDesign(), variables: [...contactDesign().variables!, { name: 'N', value: '1e20 cm^-3', range: ['1e19 cm^-3', '1e21 cm^-3'] }], requirements: [{ quantity: 'contactResistivity', of: 'top', max: '1e-6 ohm cm^2' }, { quantity: 'barrierN', of: 'top', min: '0.3 eV' }] };
    design.layers = design.layers.map((layer, l) => (l === 0 ? { ...layer, dopants: [{ ...layer.dopants![0], concentration: 'N' }] } : layer));
    const answer = size(design, { variable: 'N', points: 9, samples: 0, tolerances: 'stated' });
    if (answer.kind !== 'sized') throw new Error(JSON.stringify(answer));
    expect(answer.intervals.length).toBe(1);
    const figures = sizingFigures(design, answer, 'stated');
    expect(columnsOf(figures)).toEqual(Object.keys(PANEL_QUANTITIES.sizing).sort());
    const [lower] = held('sizing', figures, 0);
    const of = (sign: string): number => lower.steps.flatMap((s) => (s.kind === 'formula' && s.result.sign === sign ? [s.result.value] : []))[0];
    expect(of('s_in')).toBeGreaterThanOrEqual(-OF_THE_MESH);
    expect(of('s_out')).toBeLessThan(OF_THE_MESH);
    expect(of('w')).toBeLessThanOrEqual(answer.tolerance * (1 + 1e-9));
    held('best', bestFigures(design, answer, 'stated').flat());
  });
});

describe('the workings of a ranked metal', () => {
  it('stand behind its barrier, its resistivity, both ends of the band and the worst, and behind each other value of the barrier', () => {
    const design = contactDesign();
    const steps = rankMetals(design, { side: 'top' });
    let step = steps.next();
    while (!step.done) step = steps.next();
    const ranking = step.value as Ranking;
    const rows = [ranking.rows[0], ranking.rows.find((r) => r.values.length > 2)!, ranking.rows.find((r) => r.values.some((v) => v.key === r.value && v.basis === 'pinned')) ?? ranking.rows[5], ranking.rows.at(-1)!];
    const seen = new Set<string>();
    for (const row of rows) {
      const figures = metalFigures(design, ranking, row);
      columnsOf(figures).forEach((column) => seen.add(column));
      held(row.metal, figures);
      for (const value of row.values) held(`${row.metal} ${value.key}`, metalFigures(design, ranking, row, value), 1e-9);
    }
    expect([...seen].sort()).toEqual(Object.keys(PANEL_QUANTITIES.metal).sort());
  });
});

describe('the workings of a contact from near', () => {
  it('stand behind each of its figures', () => {
    const seen = new Set<string>();
    for (const id of ['schottky', 'pn-diode']) {
      const design = starter(id);
      const answer = closeUps(design, { compare: id === 'schottky' });
      if (answer.kind !== 'seen') throw new Error(JSON.stringify(answer));
      for (const contact of answer.contacts) {
        const figures = nearContactFigures(design, contact);
        columnsOf(figures).forEach((column) => seen.add(column));
        held(id, figures, 1e-9);
        // Solved for another transmission, a mesh of its own decides the last digits.
        const compared = comparedFigures(design, contact);
        expect(compared.length).toBe(id === 'schottky' ? 3 : 0);
        held(`${id}, compared`, compared);
      }
    }
    expect([...seen].sort()).toEqual(Object.keys(PANEL_QUANTITIES.nearContact).sort());
  });
});

describe('the workings of a tolerance run', () => {
  it('give mean, deviation, percentiles and yields again', () => {
    const design = { ...contactDesign(), requirements: [{ quantity: 'contactResistivity', of: 'top', max: '1e-8 ohm cm^2' }, { quantity: 'barrierN', of: 'top', min: '0.5 eV' }] };
    const planned = planVariations(design, { count: 40, seed: 3, figures: ['contacts.top.barrier_n_eV', 'contacts.top.rho_c_ohm_cm2'] });
    if (!planned.ok) throw new Error(JSON.stringify(planned.complaints));
    const job = variationJob(planned.plan);
    const result = variationResult(planned.plan, new Map<number, VariationRows>(Array.from({ length: job.chunks }, (_, i) => [i, job.run(i)])));
    const figures = [...result.figures.flatMap((figure) => [...spreadFigures(result, figure), ...yieldFigures(result, figure)]), ...yieldFigures(result, null)];
    expect(columnsOf(figures)).toEqual(Object.keys(PANEL_QUANTITIES.spread).sort());
    held('run', figures, 1e-9);
  });
});
