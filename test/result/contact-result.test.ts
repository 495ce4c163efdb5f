import { describe, expect, it } from 'vitest';
import { solveDesign } from '../../src/result/solve-design.ts';
import type { ContactResult } from '../../src/result/types.ts';

function contacts(top: object, more: object = {}): { contacts: ContactResult[]; warnings: string[] } {
  const design = {
    format: 'halfmark-design/1', title: 'contact', conditions: { temperature: '300 K' }, top,
    layers: [{ name: 'n', material: 'Si', thickness: '200 nm', dopants: [{ dopant: 'P', concentration: '1e20 cm^-3' }] }], bottom: { kind: 'neutral' }, ...more,
  };
  const answer = solveDesign(design as never);
  if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
  return answer.result;
}

describe('the contact rows of a result', () => {
  it('hold the resistivity, its two shares, the closed form, the floor and the saturation current in ohm cm^2 and A/cm^2', () => {
    const [c, neutral] = contacts({ kind: 'barrier', barrier: '0.6 eV' }).contacts;
    expect(c.rho_c_ohm_cm2).toBeGreaterThan(1e-9);
    expect(c.rho_c_ohm_cm2).toBeLessThan(1e-6);
    expect(c.rho_c_n_ohm_cm2).toBeCloseTo(c.rho_c_ohm_cm2 as number, 20);
    expect(c.rho_c_p_ohm_cm2).toBeGreaterThan(1e6);
    expect(c.rho_c_floor_ohm_cm2).toBeLessThan(c.rho_c_ohm_cm2 as number);
    expect(c.rho_c_closed_form_ohm_cm2).toBeGreaterThan(0);
    expect([c.closed_form, c.transmission]).toEqual(['field', 'wkb']);
    expect(c.rho_c_error).toBeLessThan(1e-5);
    expect(c.saturation_A_cm2).toBeGreaterThan(0);
    expect([neutral.rho_c_ohm_cm2, neutral.rho_c_floor_ohm_cm2, neutral.saturation_A_cm2, neutral.transmission]).toEqual([null, null, null, null]);
  });

  it('follow the transmission that the assumptions name', () => {
    const of = (transmission: string): ContactResult => contacts({ kind: 'barrier', barrier: '0.6 eV' }, { assumptions: { transmission } }).contacts[0];
    const [wkb, kemble, exact] = ['wkb', 'kemble', 'exact'].map(of);
    expect([wkb.transmission, kemble.transmission, exact.transmission]).toEqual(['wkb', 'kemble', 'exact']);
    expect(exact.rho_c_ohm_cm2).toBeLessThan(wkb.rho_c_ohm_cm2 as number);
    expect(kemble.rho_c_ohm_cm2).toBeGreaterThan(wkb.rho_c_ohm_cm2 as number);
  });

  it('are numbers or null, never infinite, and say in a warning when a contact blocks', () => {
    const { contacts: [c], warnings } = contacts({ kind: 'barrier', barrier: '0.9 eV' }, { conditions: { temperature: '4 K' }, layers: [{ name: 'n', material: 'Si', thickness: '20 um', dopants: [{ dopant: 'P', concentration: '1e15 cm^-3' }] }] });
    expect(c.rho_c_ohm_cm2).toBeNull();
    expect(warnings.join()).toContain('it blocks');
  });

  it('warn on p-GaN that the mechanism lies outside the model, with the published band', () => {
    const { warnings } = contacts({ kind: 'barrier', metal: 'Ni' }, { layers: [{ name: 'p', material: 'GaN', thickness: '300 nm', dopants: [{ dopant: 'Mg', concentration: '2e19 cm^-3' }] }] });
    expect(warnings.join()).toMatch(/top contact: mechanism outside the model; contacts to p-type GaN were measured between 1\.1e-6 and 5\.2e-2 ohm cm\^2/);
  });
});
