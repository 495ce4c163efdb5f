import { describe, expect, it } from 'vitest';
import { localBands } from '../../solver/bands.ts';
import { isAlloy } from '../../solver/index.ts';
import { readDesign } from '../../src/design/read.ts';
import { toStack } from '../../src/design/stack.ts';
import type { Custom, Design, MaterialInput } from '../../src/design/types.ts';
import { solveDesign } from '../../src/result/solve-design.ts';
import { presetCatalogue } from '../../src/design/catalogue.ts';

const ASSUMPTIONS = { statistics: 'fermi-dirac', alignment: 'offsets', narrowing: false, nonParabolic: false, transmission: 'wkb' } as const;
const NONE = { donors: 0, acceptors: 0 };
const preset = (id: string): MaterialInput => structuredClone(presetCatalogue.materials.get(id)!.entry);
const own = (id: string, change: Partial<MaterialInput>): Custom => ({ materials: [{ ...preset(id), ...change, source: 'measured here' }] });
const design = (material: string, custom: Custom, x?: string, range?: [string, string]): Design => ({
  format: 'halfmark-design/1', title: 'formulas', conditions: { temperature: '300 K', ...(range ? { temperatureRange: range } : {}) }, top: { kind: 'neutral' },
  layers: [{ name: 'a', material, ...(x === undefined ? {} : { x }), thickness: '1 um', dopants: [{ kind: 'donor', depth: '6 meV', concentration: '1e17 cm^-3' }] }], bottom: { kind: 'neutral' }, custom,
});
const bands = (d: Design, T: number, x = 0) => {
  const reading = toStack(d);
  if (!reading.ok) throw new Error(JSON.stringify(reading.complaints));
  return localBands(reading.stack.layers[0].material, x, T, ASSUMPTIONS, NONE);
};
const complaints = (d: Design) => {
  const reading = toStack(d);
  return reading.ok ? [] : reading.complaints;
};

describe('a crystal with formulas of its own', () => {
  it('whose gap states Varshni’s law has the bands of the law itself', () => {
    const asFormula = design('GaAs', own('GaAs', { gap: { formula: '1.519 eV - 5.405e-4 eV/K * T^2/(T + 204 K)' } }));
    const asLaw = design('GaAs', own('GaAs', {}));
    for (const T of [77, 300, 500]) {
      const [a, b] = [bands(asFormula, T), bands(asLaw, T)];
      expect(a.gap).toBeCloseTo(b.gap, 12);
      expect(a.affinity).toBeCloseTo(b.affinity, 12);
      expect(a.nc).toBe(b.nc);
    }
  });

  it('has masses and permittivities that move with T', () => {
    const d = design('GaAs', own('GaAs', { electronMass: { formula: '0.067 * (1 + T/(3000 K))' }, permittivity: { formula: '12.4 * (1 + 1.2e-4/K * T)' } }));
    expect(bands(d, 300).permittivity).toBeCloseTo(12.4 * (1 + 0.036), 12);
    expect(bands(d, 600).permittivity).toBeCloseTo(12.4 * (1 + 0.072), 12);
    expect(bands(d, 600).nc / bands(d, 300).nc).toBeCloseTo(2 ** 1.5 * (1.2 / 1.1) ** 1.5, 10);
  });

  it('solves to a result, and its workings and sheet can read it', () => {
    const answer = solveDesign(design('GaAs', own('GaAs', { gap: { formula: '1.4 eV + 0 eV/K * T' } })));
    if (answer.kind !== 'result') throw new Error(JSON.stringify(answer));
    expect(answer.result.layers[0].gap_eV).toBeCloseTo(1.4, 12);
  });

  it('may not use x, and keeps one affinity', () => {
    expect(complaints(design('GaAs', own('GaAs', { gap: { formula: '1.5 eV * x' } })))[0]).toMatchObject({ path: 'custom.materials[0].gap.formula', message: expect.stringContaining('uses x, which does not count here; it may use T') });
    expect(complaints(design('GaAs', own('GaAs', { affinity: { formula: '4 eV' } })))[0].message).toContain('only an alloy takes');
  });
});

describe('an alloy with formulas of its own', () => {
  it('leaves the rule between its ends, and follows the formula in x and T', () => {
    const d = design('AlGaAs', own('AlGaAs', { gap: { formula: '1.424 eV + 1.247 eV * x - 4e-4 eV/K * (T - 300 K)' }, affinity: { formula: '4.07 eV - 1.1 eV * x' }, holeMass: { formula: '0.5 + 0.2 * x' } }), '0.3');
    expect(bands(d, 300, 0.3).gap).toBeCloseTo(1.424 + 0.3741, 12);
    expect(bands(d, 400, 0.3).gap).toBeCloseTo(1.424 + 0.3741 - 0.04, 12);
    // chi(x, T) = chi(x, 300 K) + kappa [Eg(300 K) - Eg(T)], kappa 0.5 by convention.
    expect(bands(d, 400, 0.3).affinity).toBeCloseTo(4.07 - 0.33 + 0.5 * 0.04, 12);
    const layer = toStack(d);
    if (!layer.ok || !isAlloy(layer.stack.layers[0].material)) throw new Error('no alloy');
    expect(bands(d, 300, 0.3).nv / bands(d, 300, 0).nv).toBeCloseTo((0.56 / 0.5) ** 1.5, 10);
  });

  it('takes one plain value as well, and refuses a crystal’s law', () => {
    expect(bands(design('AlGaAs', own('AlGaAs', { gap: '1.8 eV' }), '0.3'), 300, 0.3).gap).toBeCloseTo(1.8, 12);
    expect(complaints(design('AlGaAs', own('AlGaAs', { gap: { zeroK: '1.8 eV', alpha: '0 eV/K', beta: '1 K' } }), '0.3'))[0]).toMatchObject({ path: 'custom.materials[0].gap' });
    expect(complaints(design('AlGaAs', own('AlGaAs', { affinity: { formula: '4 eV - 1e-4 eV/K * T' } }), '0.3'))[0].message).toContain('uses T, which does not count here; it may use x');
  });
});

describe('a formula that fails somewhere in the design’s range', () => {
  const falling = own('GaAs', { gap: { formula: '1.5 eV - 5e-3 eV/K * T' } });

  it('is refused with the temperature, before anything is solved', () => {
    // Positive below 300 K, zero there.
    const [complaint] = complaints(design('GaAs', falling));
    expect(complaint).toMatchObject({ path: 'custom.materials[0].gap.formula', message: expect.stringMatching(/^comes to .* at 300 K, .* a gap lies above 0/) });
    const pole = own('GaAs', { permittivity: { formula: '12 + 1 / ((T - 350 K) / (1 K))' } });
    expect(complaints(design('GaAs', pole, undefined, ['250 K', '450 K']))[0].message).toContain('has no finite value at 350 K');
    expect(complaints(design('GaAs', pole, undefined, ['250 K', '320 K']))).toEqual([]);
  });

  it('is refused where only a place of a graded layer meets it', () => {
    const d = design('AlGaAs', own('AlGaAs', { gap: { formula: '1.4 eV - 4 eV * x' } }), '0');
    expect(complaints(d)).toEqual([]);
    const graded: Design = { ...d, layers: [{ ...d.layers[0], x: { from: '0', to: '0.5', shape: 'linear' } }] };
    expect(complaints(graded)[0].message).toMatch(/at 300 K and x = 0\.375/);
  });

  it('of an end of an alloy is found through the alloy', () => {
    const custom: Custom = { materials: [{ ...preset('GaAs'), gap: { formula: '1.5 eV - 5e-3 eV/K * T' }, source: 's' }] };
    expect(complaints(design('AlGaAs', custom, '0.3'))[0].path).toBe('custom.materials[0].gap.formula');
  });
});

describe('a dopant’s depth as a formula over x', () => {
  it('counts at the composition of its layer, and is refused where it cannot be', () => {
    const dopant = (formula: string): Custom => ({ dopants: [{ id: 'D', host: 'AlGaAs', kind: 'donor', depth: { formula }, source: 's' }] });
    const d = (formula: string): Design => ({ ...design('AlGaAs', dopant(formula), '0.4'), layers: [{ name: 'a', material: 'AlGaAs', x: '0.4', thickness: '1 um', dopants: [{ dopant: 'D', concentration: '1e17 cm^-3' }] }] });
    const reading = toStack(d('6 meV + 100 meV * x'));
    if (!reading.ok) throw new Error(JSON.stringify(reading.complaints));
    expect(reading.stack.layers[0].dopants[0].depth).toBeCloseTo(0.046, 12);
    expect(complaints(d('1 eV / (x - 0.4)'))[0]).toMatchObject({ path: 'custom.dopants[0].depth.formula', message: expect.stringContaining('at x = 0.4') });
    expect(complaints(d('6 meV + T * 1 meV/K'))[0].message).toContain('uses T');
  });
});

describe('the design document', () => {
  it('takes formulas where they belong and refuses other keys beside them', () => {
    const text = (gap: unknown): string => JSON.stringify(design('GaAs', own('GaAs', { gap: gap as MaterialInput['gap'] })));
    expect(readDesign(text({ formula: '1.4 eV' })).ok).toBe(true);
    expect(readDesign(text({ formula: '1.4 eV', more: 1 })).ok).toBe(false);
    expect(readDesign(text({ formula: 5 })).ok).toBe(false);
    expect(readDesign(text({ formula: 'x'.repeat(501) })).ok).toBe(false);
  });
});
