import { describe, expect, it } from 'vitest';
import { BOLTZMANN } from '../../solver/constants.ts';
import { closeUps, closeUpSteps, type CarrierCloseUp, type CloseUp } from '../../src/contacts/close-up.ts';
import { starters } from '../../src/design/starters/index.ts';
import type { Design } from '../../src/design/types.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import { runJob } from '../../src/workers/job-replies.ts';
import type { JobReply } from '../../src/workers/job-messages.ts';

const starter = (id: string): Design => structuredClone(starters.find((s) => s.id === id)!.design);
function seen(design: Design, compare = false): CloseUp[] {
  const answer = closeUps(design, { compare });
  if (answer.kind !== 'seen') throw new Error(JSON.stringify(answer));
  return answer.contacts;
}
const [onP] = seen(starter('pn-diode'), true);
const [lightly] = seen(starter('schottky'));
const holes = onP.holes as CarrierCloseUp;
const electrons = lightly.electrons as CarrierCloseUp;

describe('a contact from near', () => {
  it('has the figures of the result', () => {
    const answer = solveDesign(starter('pn-diode'));
    if (answer.kind !== 'result') throw new Error('no result');
    const [contact] = answer.result.contacts;
    expect(onP).toMatchObject({ metal: contact.metal, barrier_p_eV: contact.barrier_p_eV, rho_c_ohm_cm2: contact.rho_c_ohm_cm2, rho_c_floor_ohm_cm2: contact.rho_c_floor_ohm_cm2, transport: contact.transport, e00_meV: contact.e00_meV, lowering_eV: contact.lowering_eV });
    expect(onP.e00_over_kT).toBeCloseTo((contact.e00_meV as number) / 1000 / (BOLTZMANN * 300), 6);
  });

  it('lets holes run below the Fermi level, electrons above it', () => {
    expect(onP.majority).toBe('p');
    expect(holes.energy_eV[0]).toBeGreaterThan(holes.energy_eV[holes.energy_eV.length - 1]);
    expect(electrons.energy_eV[0]).toBeLessThan(electrons.energy_eV[electrons.energy_eV.length - 1]);
    expect(holes.top_eV).toBeLessThan(0);
  });

  it('puts the peak within the middle 80 % where the current tunnels, and that below the top', () => {
    expect(holes.peak_eV as number).toBeLessThan(holes.from_eV as number);
    expect(holes.peak_eV as number).toBeGreaterThan(holes.to_eV as number);
    expect(holes.overTop as number).toBeLessThan(0.05);
    expect(holes.to_eV as number).toBeGreaterThan(holes.top_eV);
  });

  it('puts the current of a lightly doped layer at the top of the barrier', () => {
    expect(Math.abs((electrons.peak_eV as number) - electrons.top_eV)).toBeLessThan(0.01);
    expect(electrons.overTop as number).toBeGreaterThan(0.7);
    // Over a top the current falls as exp(-E/kT): 10 to 90 % is at least ln 9 kT.
    expect((electrons.to_eV as number) - (electrons.from_eV as number)).toBeGreaterThan(0.9 * Math.log(9) * BOLTZMANN * 300);
  });

  it('integrates to the resistivity that the result has', () => {
    // 1/rho_c is proportional to the integral of T f; the floor has T = 1 above the edge: their ratio needs no constant.
    const { energy_eV: e, product, occupancy } = holes;
    let [sum, free] = [0, 0];
    for (let i = 1; i < e.length; i++) {
      sum += ((product[i] + product[i - 1]) / 2) * Math.abs(e[i] - e[i - 1]);
      free += ((occupancy[i] + occupancy[i - 1]) / 2) * Math.abs(e[i] - e[i - 1]);
    }
    expect(free / sum / ((onP.rho_c_p_ohm_cm2 as number) / (onP.rho_c_floor_ohm_cm2 as number))).toBeCloseTo(1, 2);
  });

  it('sets WKB, Kemble and the wave equation side by side where asked', () => {
    expect(onP.compared!.map(({ transmission }) => transmission)).toEqual(['wkb', 'kemble', 'exact']);
    expect(onP.compared![0].rho_c_ohm_cm2).toBe(onP.rho_c_ohm_cm2);
    expect(onP.compared![2].rho_c_ohm_cm2).not.toBe(onP.rho_c_ohm_cm2);
    expect(lightly.compared).toBe(null);
  });

  it('begins at the metal on either side', () => {
    const design = starter('pn-diode');
    const turned = { ...design, bottom: { kind: 'barrier', metal: 'Al', carrier: 'n', imageForce: true } as const };
    const [top, bottom] = seen(turned);
    expect([top.side, bottom.side]).toEqual(['top', 'bottom']);
    for (const { bands } of [top, bottom]) {
      expect(bands.s_nm[0]).toBe(0);
      expect(bands.s_nm.every((s, i) => i === 0 || s >= bands.s_nm[i - 1])).toBe(true);
    }
    expect(bottom.bands.ec_eV[0]).toBeCloseTo(bottom.barrier_n_eV, 6);
    expect(bottom.layer).toBe('substrate');
  });

  it('is none where no end has a metal, and says what is wrong with a design', () => {
    expect(seen(starter('cryogenic'))).toEqual([]);
    const wrong = starter('pn-diode');
    wrong.layers[0].material = 'Sii';
    expect(closeUps(wrong)).toMatchObject({ kind: 'complaints', complaints: [{ path: 'layers[0].material' }] });
  });

  it('resolves the Fermi edge in the cold', () => {
    const cold = starter('pn-diode');
    cold.conditions.temperature = '60 K';
    const [{ holes: there }] = seen(cold);
    expect(Math.abs(there!.energy_eV[1] - there!.energy_eV[0])).toBeLessThan((BOLTZMANN * 60) / 4);
  });

  it('is a job of the page', () => {
    const replies: JobReply[] = [];
    runJob({ kind: 'closeUp', number: 3, input: { design: starter('schottky') } }, (reply) => replies.push(reply), () => 0);
    const last = replies[replies.length - 1];
    expect(last).toMatchObject({ kind: 'done', number: 3, value: { kind: 'seen' } });
    expect(structuredClone(last)).toEqual(last);
    expect([...closeUpSteps(starter('schottky'))].length).toBeGreaterThan(1);
  });
});
