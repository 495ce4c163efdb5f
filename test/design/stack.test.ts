import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readDesign } from '../../src/design/read.ts';
import { toStack } from '../../src/design/stack.ts';
import type { Design } from '../../src/design/types.ts';
import { isAlloy, type CrystalMaterial, type Stack } from '../../solver/index.ts';
import { solveDesign } from '../../src/result/solve-design.ts';

const fixture = (name: string): Design => {
  const reading = readDesign(readFileSync(join(import.meta.dirname, '../fixtures/designs', name), 'utf8'));
  if (!reading.ok) throw new Error(JSON.stringify(reading.complaints));
  return reading.design;
};
const stackOf = (design: Design, set: Record<string, string> = {}): Stack => {
  const reading = toStack(design, set);
  if (!reading.ok) throw new Error(JSON.stringify(reading.complaints));
  return reading.stack;
};

describe('a design in solver units', () => {
  it('takes every custom form as it is written', () => {
    const stack = stackOf(fixture('custom.json'));
    const [alloy, crystal, oxide] = stack.layers;
    const m = crystal.material as CrystalMaterial;
    expect(m.gap).toEqual({ zeroK: 1.17, alpha: 4.73e-4, beta: 636 });
    expect(m.holeMass).toEqual([0.523, 1.4e-3, -1.48e-6]);
    expect(m).toMatchObject({ affinityShare: 0.5, permittivity: 11.7, neutralityLevel: 0.36, pinningSlope: 0.27, insulator: false });
    expect(m.affinity).toBe(4.05);
    expect(m.nonParabolicity).toEqual({ electron: 0.5, hole: undefined });
    expect(m.richardson).toEqual({ electron: 112, hole: 32 });
    expect(m.mobility).toEqual({ electron: 1300, hole: { min: 45, max: 470, reference: 2.2e17, exponent: 0.72 } });
    expect(m.narrowing).toEqual({ law: 'slotboom', energy: 0.009, reference: 1e17, constant: 0.5, conductionShare: 0.5 });
    expect(m.polarisation?.spontaneous).toBeCloseTo(-3.4e-6, 18);
    expect(isAlloy(alloy.material) && alloy.material.bowing).toMatchObject({ gap: 0.35, affinity: -0.1 });
    expect(alloy.x).toEqual({ kind: 'linear', from: 0.1, to: 0.3 });
    expect(alloy.dopants[0]).toMatchObject({ id: null, kind: 'donor', depth: 0.01, degeneracy: 2, model: 'dilute', activation: 1, compensation: 0 });
    expect(crystal.dopants[0]).toMatchObject({ id: 'donor-P', depth: 0.0455, model: 'merging', activation: 0.8, compensation: 0.1, merging: { depthReference: 2.2e18, depthExponent: 2, boundReference: 6e18, boundExponent: 2.3 } });
    expect(crystal.dopants[0].concentration).toMatchObject({ kind: 'implant', peak: 8e17, background: 1e15 });
    expect(crystal.dopants[1]).toMatchObject({ model: 'screened', screened: { coefficient: 3.1e-8, mottDensity: 3.7e18, boundExponent: 2 } });
    expect(crystal.dopants[1].concentration).toMatchObject({ kind: 'points', value: [1e18, 1e16], scale: 'log' });
    expect((oxide.material as CrystalMaterial).insulator).toBe(true);
    expect(oxide.material).toMatchObject({ gap: { zeroK: 8.9, alpha: 0 }, permittivity: 3.9, permittivityHighFrequency: 3.9 });
    expect(stack.interfaces).toEqual([{ index: 1, sheetCharge: -2e11 }]);
    expect(stack.bottom).toEqual({ kind: 'open', sheetCharge: 1e11 });
    // The measured barrier is on crystal-A; the metal lies on the alloy, so its work function counts.
    expect(stack.top).toEqual({ kind: 'barrier', metal: 'metal-A', imageForce: false, source: { from: 'workFunction', workFunction: 4.65, slope: 'material' } });
    expect(stack.temperature).toBe(350);
  });

  it('solves with every custom form in it', () => {
    expect(solveDesign(fixture('custom.json')).kind).toBe('result');
  });

  it('lets a custom entry win over a preset, inside that design only', () => {
    const design = fixture('gaas-contact.json');
    design.custom = { metals: [{ id: 'Ti', workFunction: '4.0 eV', source: 'invented for a test' }] };
    expect(stackOf(design).top).toMatchObject({ source: { from: 'workFunction', workFunction: 4 } });
    expect(stackOf(fixture('gaas-contact.json')).top).toMatchObject({ source: { from: 'measured' } });
  });

  it('takes variables and the temperature from the run', () => {
    const design = fixture('gaas-contact.json');
    expect(stackOf(design).layers[0].dopants[0].concentration).toEqual({ kind: 'constant', value: 1e19 });
    const set = stackOf(design, { Ncap: '2e18 cm^-3', temperature: '-40 degC' });
    expect(set.layers[0].dopants[0].concentration).toEqual({ kind: 'constant', value: 2e18 });
    expect(set.temperature).toBeCloseTo(233.15, 10);
  });

  it('uses a published offset between presets, with the sign of the order in the stack', () => {
    const design = fixture('gaas-contact.json');
    delete design.interfaces;
    const [first, second] = stackOf(design).interfaces;
    expect(first.published?.dEv).toBeCloseTo(-0.53 * 0.3, 12);
    expect(second.published?.dEv).toBeCloseTo(0.53 * 0.3, 12);
  });

  it('reads a barrier by what is given: height, measurement, pinning', () => {
    const design = fixture('gaas-contact.json');
    design.top = { kind: 'barrier', metal: 'Ti', barrier: '0.6 eV', carrier: 'p' };
    expect(stackOf(design).top).toMatchObject({ source: { from: 'given', carrier: 'p', height: 0.6 }, metal: 'Ti', imageForce: true });
    design.top = { kind: 'barrier', metal: 'Ti', pinning: 'none' };
    expect(stackOf(design).top).toMatchObject({ source: { from: 'workFunction', slope: 1 } });
    design.top = { kind: 'barrier', metal: 'Ti', pinning: 'full' };
    expect(stackOf(design).top).toMatchObject({ source: { from: 'workFunction', slope: 0 } });
    design.top = { kind: 'barrier', metal: 'Ti', pinning: 0.4 };
    expect(stackOf(design).top).toMatchObject({ source: { from: 'workFunction', slope: 0.4 } });
  });

  it('takes the model that a preset names, so that a degenerate layer keeps its carriers', () => {
    const design = fixture('gaas-contact.json');
    expect(stackOf(design).layers[0].dopants[0]).toMatchObject({ id: 'Si', model: 'screened', screened: { coefficient: 0, mottDensity: 1.6e16 } });
    const answer = solveDesign(design);
    if (answer.kind !== 'result') throw new Error('not solved');
    // Three decades above the Mott density every donor is free; as isolated levels a tenth of them would be.
    expect(answer.result.layers[0].ionised[0].fraction).toBeGreaterThan(0.99);
    design.layers[0].dopants = [{ dopant: 'Si', concentration: 'Ncap', model: 'dilute' }];
    expect(stackOf(design).layers[0].dopants[0].model).toBe('dilute');
  });
});
