import { describe, expect, it } from 'vitest';
import { originWords, valueWords } from '../../src/contacts/metal-words.ts';
import { rankMetals, type MetalRow, type RankOptions, type Ranking } from '../../src/contacts/rank-metals.ts';
import { starters } from '../../src/design/starters/index.ts';
import type { Design, MetalInput } from '../../src/design/types.ts';
import { judge } from '../../src/requirements/judge.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import { setContact } from '../../src/state/commands/index.ts';

/** n-type silicon under a metal, two layers, over a range of temperatures. */
function design(change: Partial<Design> = {}, metals: MetalInput[] = []): Design {
  return {
    format: 'halfmark-design/1', title: 'Contact', conditions: { temperature: '300 K', temperatureRange: ['250 K', '400 K'] },
    top: { kind: 'barrier', metal: 'Al', imageForce: true },
    layers: [{ name: 'cap', material: 'Si', thickness: '60 nm', dopants: [{ dopant: 'P', concentration: '6e19 cm^-3' }] }, { name: 'base', material: 'Si', thickness: '400 nm', dopants: [{ dopant: 'P', concentration: '1e17 cm^-3' }] }],
    bottom: { kind: 'neutral' },
    ...(metals.length === 0 ? {} : { custom: { metals } }),
    ...change,
  };
}

function ranked(d: Design, options: Partial<RankOptions> = {}): { ranking: Ranking; seen: MetalRow[]; steps: { done: number; of: number }[] } {
  const steps: { done: number; of: number }[] = [];
  const seen: MetalRow[] = [];
  const run = rankMetals(d, { side: 'top', ...options });
  for (;;) {
    const step = run.next();
    if (step.done) {
      if (step.value.kind !== 'ranked') throw new Error(JSON.stringify(step.value));
      return { ranking: step.value, seen, steps };
    }
    steps.push(step.value);
    if (step.value.seen) seen.push(step.value.seen);
  }
}
const { ranking, seen, steps } = ranked(design());
const row = (metal: string, from: Ranking = ranking): MetalRow => from.rows.find((r) => r.metal === metal)!;

describe('the ranking of metals', () => {
  it('holds every metal of the presets, best worst case first, those without one last and with a reason', () => {
    const worst = ranking.rows.map((r) => r.worst_ohm_cm2);
    const known = worst.filter((v): v is number => v !== null);
    expect(known.length).toBeGreaterThan(50);
    expect(worst.slice(0, known.length)).toEqual([...known].sort((a, b) => a - b));
    for (const r of ranking.rows.slice(known.length)) expect(r.reason).toMatch(/\w/);
    expect(row('NiGe').reason).toContain('no work function and no measured barrier on Si');
    expect(row('NiGe').values).toEqual([]);
  });

  it('gives the metal on the stack the figures that the design itself has', () => {
    const answer = solveDesign(design(), { accuracy: 1e-5 });
    if (answer.kind !== 'result') throw new Error('no result');
    const contact = answer.result.contacts[0];
    const al = row('Al');
    expect(al.present).toBe(true);
    expect(ranking.rows.filter((r) => r.present)).toHaveLength(1);
    expect(al.barrier_n_eV).toBeCloseTo(contact.barrier_n_eV as number, 9);
    // Two meshes of one stack: within what the mesh may be off.
    expect((al.rho_c_ohm_cm2 as number) / (contact.rho_c_ohm_cm2 as number)).toBeCloseTo(1, 3);
  });

  it('gives what choosing a metal then shows', () => {
    for (const metal of ['PtSi', 'Er', 'Ti']) {
      const { contact, rho_c_ohm_cm2 } = row(metal);
      const answer = solveDesign(setContact(design(), 'top', contact), { accuracy: 1e-5 });
      if (answer.kind !== 'result') throw new Error('no result');
      expect((rho_c_ohm_cm2 as number) / (answer.result.contacts[0].rho_c_ohm_cm2 as number), metal).toBeCloseTo(1, 3);
    }
  });

  it('finds the same worst case as the requirements do', () => {
    const judged = judge({ ...design(), requirements: [{ quantity: 'contactResistivity', of: 'top', max: '1e-6 ohm cm^2', over: 'temperatureRange' }] });
    if (judged.kind !== 'judged') throw new Error('not judged');
    const [requirement] = judged.requirements;
    expect((row('Al').worst_ohm_cm2 as number) / (requirement.worst as number)).toBeCloseTo(1, 2);
    expect(row('Al').worst_at).toBe('250 K, cap P -20 %, barrier +50 meV');
  });

  it('puts the figure within its band, and the worst case beyond it', () => {
    for (const r of ranking.rows) {
      if (r.band_ohm_cm2 === null) continue;
      const rho = r.rho_c_ohm_cm2 as number;
      expect(r.band_ohm_cm2[0], r.metal).toBeLessThanOrEqual(rho);
      expect(r.band_ohm_cm2[1], r.metal).toBeGreaterThanOrEqual(rho);
      expect(r.worst_ohm_cm2 as number, r.metal).toBeGreaterThanOrEqual(r.band_ohm_cm2[1] * (1 - 1e-9));
    }
  });

  it('takes a measured barrier before pinning, and says which', () => {
    const words = (metal: string): string => valueWords(row(metal).values.find(({ key }) => key === row(metal).value)!);
    expect(words('Al')).toMatch(/^measured for electrons, \w+/);
    expect(words('Er')).toMatch(/^pinned, S = 0\.\d+$/);
  });

  it('cites the work behind each value', () => {
    for (const value of row('Al').values) {
      expect(value.work, value.key).toMatch(/\(\d{4}\)|\d{4}/);
      expect(originWords(value)).toContain(value.work as string);
      expect(originWords(value).startsWith('work function: ')).toBe(value.basis !== 'measured');
    }
  });

  it('sets the measured, pinned and ideal values of a pair side by side', () => {
    expect(row('Al').values.map(({ basis, carrier }) => [basis, carrier])).toEqual([['measured', 'n'], ['measured', 'p'], ['pinned', null], ['ideal', null]]);
    const [n, p, pinned, ideal] = row('Al').values;
    expect(n.barrier_n_eV + n.barrier_p_eV).toBeCloseTo(p.barrier_n_eV + p.barrier_p_eV, 9);
    // Pinning draws the height from the ideal one towards that of full pinning.
    expect(Math.abs(pinned.barrier_n_eV - ideal.barrier_n_eV)).toBeGreaterThan(0.1);
  });

  it('runs again with a rival value, of that metal alone', () => {
    const al = row('Al');
    for (const rival of al.values.filter(({ key }) => key !== al.value)) {
      const { ranking: again } = ranked(design(), { rerun: { metal: 'Al', key: rival.key } });
      expect(again.rows).toHaveLength(1);
      const [r] = again.rows;
      expect(r.value).toBe(rival.key);
      expect(r.barrier_n_eV).toBe(rival.barrier_n_eV);
      const answer = solveDesign(setContact(design(), 'top', r.contact), { accuracy: 1e-5 });
      if (answer.kind !== 'result') throw new Error('no result');
      expect(answer.result.contacts[0].barrier_n_eV, rival.key).toBeCloseTo(rival.barrier_n_eV, 9);
      expect((r.rho_c_ohm_cm2 as number) / (answer.result.contacts[0].rho_c_ohm_cm2 as number), rival.key).toBeCloseTo(1, 3);
    }
  });

  it("ranks the design's own metals too, and shows several published values of one pair and carrier", () => {
    const own: MetalInput = { id: 'Xy', name: 'own alloy', workFunction: '4.9 eV', source: 'lab book', barriers: [{ material: 'Si', carrier: 'n', height: '0.5 eV', source: 'first run' }, { material: 'Si', carrier: 'n', height: '0.62 eV', source: 'second run' }] };
    const { ranking: with_ } = ranked(design({}, [own]), { rerun: { metal: 'Xy', key: '' } });
    const [r] = with_.rows;
    expect(r.own).toBe(true);
    expect(r.values.filter(({ basis }) => basis === 'measured').map(({ barrier_n_eV, source }) => [barrier_n_eV, source])).toEqual([[0.5, 'first run'], [0.62, 'second run']]);
    expect(r.barrier_n_eV).toBe(0.5);
    const second = r.values[1];
    const [again] = ranked(design({}, [own]), { rerun: { metal: 'Xy', key: second.key } }).ranking.rows;
    expect(again.contact).toMatchObject({ metal: 'Xy', barrier: '0.62 eV', carrier: 'n' });
    expect(again.rho_c_ohm_cm2 as number).toBeGreaterThan(r.rho_c_ohm_cm2 as number);
  });

  it('shows the published values of a preset beside those of an entry of the design that stands in for it', () => {
    const own: MetalInput = { id: 'Al', workFunction: '4.2 eV', source: 'lab book', barriers: [{ material: 'Si', carrier: 'n', height: '0.55 eV', source: 'lab book' }] };
    const [r] = ranked(design({}, [own]), { rerun: { metal: 'Al', key: '' } }).ranking.rows;
    expect(r.barrier_n_eV).toBe(0.55);
    expect(r.values.filter(({ basis }) => basis === 'measured').length).toBeGreaterThan(1);
  });

  it('keeps the pinning, the carrier and the image force that the design states', () => {
    const { ranking: none } = ranked(design({ top: { kind: 'barrier', metal: 'Al', pinning: 'none', imageForce: false } }));
    expect(row('Al', none).contact).toEqual({ kind: 'barrier', metal: 'Al', pinning: 'none', imageForce: false });
    expect(row('Ti', none).values.find(({ key }) => key === row('Ti', none).value)!.basis).toBe('ideal');
    const { ranking: half } = ranked(design({ top: { kind: 'barrier', metal: 'Al', pinning: 0.5 } }), { rerun: { metal: 'Ti', key: '' } });
    expect(half.rows[0].values.find(({ key }) => key === half.rows[0].value)!.slope).toBe(0.5);
  });

  it("takes the holes' barriers on a p-type surface where the design is silent, and writes that down", () => {
    const p = design({ layers: [{ name: 'cap', material: 'Si', thickness: '60 nm', dopants: [{ dopant: 'B', concentration: '6e19 cm^-3' }] }], top: { kind: 'neutral' } });
    const { ranking: onP } = ranked(p, { rerun: { metal: 'Al', key: '' } });
    expect(onP.majority).toBe('p');
    expect(onP.rows[0].contact).toEqual({ kind: 'barrier', metal: 'Al', carrier: 'p', imageForce: true });
    expect(onP.rows[0].values.find(({ key }) => key === onP.rows[0].value)!.carrier).toBe('p');
  });

  it('tells of each metal as it comes', () => {
    expect(seen.map(({ metal }) => metal).sort()).toEqual(ranking.rows.map(({ metal }) => metal).sort());
    const last = steps[steps.length - 1];
    expect(last.done).toBe(last.of);
    expect(steps.every(({ done }, i) => i === 0 || done > steps[i - 1].done)).toBe(true);
  });

  it('solves once for all metals of one barrier', () => {
    const twin: MetalInput = { id: 'Twin', source: 'lab book', barriers: [{ material: 'Si', carrier: 'n', height: '0.72 eV', source: 'lab book' }] };
    const { ranking: with_ } = ranked(design({}, [twin]));
    expect(row('Twin', with_).worst_ohm_cm2).toBe(row('Al').worst_ohm_cm2);
    expect(with_.evaluations).toBe(ranking.evaluations);
  });

  it('gives reasons where no layer takes the carriers up', () => {
    const empty = design({ layers: [{ name: 'oxide', material: 'SiO2', thickness: '5 nm' }], bottom: { kind: 'open' } });
    const { ranking: none } = ranked(empty);
    for (const r of none.rows) {
      expect(r.rho_c_ohm_cm2, r.metal).toBe(null);
      expect(r.worst_ohm_cm2, r.metal).toBe(null);
      expect(r.reason, r.metal).toMatch(/\w/);
    }
  });

  it('hands on what is wrong with the design, but not what is wrong with its contact', () => {
    const broken = rankMetals({ ...design(), layers: [{ name: 'cap', material: 'Sii', thickness: '60 nm' }] }, { side: 'top' }).next();
    expect(broken.value).toMatchObject({ kind: 'complaints' });
    expect(ranked({ ...design(), top: { kind: 'barrier', metal: 'Unobtainium' } }, { rerun: { metal: 'Al', key: '' } }).ranking.rows[0].rho_c_ohm_cm2).not.toBe(null);
  });

  it('keeps to the tolerances that are asked for', () => {
    const { ranking: none } = ranked(design(), { tolerances: 'none', rerun: { metal: 'Al', key: '' } });
    expect(none.tolerances).toEqual([]);
    expect(none.rows[0].band_ohm_cm2![0]).toBe(none.rows[0].band_ohm_cm2![1]);
    expect(none.notes.join()).toContain('without a tolerance of the barrier');
  });

  it('warns where contacts of the kind do not follow a barrier', () => {
    const gan = starters.find(({ id }) => id === 'p-gan-contact')!.design;
    expect(ranked(gan, { rerun: { metal: 'Ni', key: '' } }).ranking.notes.join()).toContain('mechanism outside the model');
  });

  it('works corners out exactly where the design asks for the exact transmission', () => {
    const [wkb] = ranked(design(), { rerun: { metal: 'Al', key: '' } }).ranking.rows;
    const exact = ranked(design({ assumptions: { transmission: 'exact' } }), { rerun: { metal: 'Al', key: '' } }).ranking;
    expect(exact.rows[0].worst_ohm_cm2).not.toBe(wkb.worst_ohm_cm2);
    expect(exact.rows[0].worst_at).toBe(wkb.worst_at);
    expect(exact.notes.join()).toContain('exact');
  });
});
