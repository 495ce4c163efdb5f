import { describe, expect, it } from 'vitest';
import { barrierHeights, imageForceLowering, transportRegime, tunnellingEnergy } from '../../solver/barrier.ts';
import { localBands } from '../../solver/bands.ts';
import { BOLTZMANN, ELEMENTARY_CHARGE, EPSILON_0 } from '../../solver/constants.ts';
import { solveStack } from '../../solver/solve-stack.ts';
import type { AlloyMaterial, CrystalMaterial } from '../../solver/stack.ts';
import checksE from '../fixtures/checks-e.json';
import { expectSound } from './invariants.ts';
import { crystalWith, dopant, holdAgainst, PLAIN } from './point-fixtures.ts';
import { barrier, layer, stackOf } from './stack-fixtures.ts';

const COMPLETE = { model: 'complete' } as const;
const kelvin = (kT: number): number => kT / BOLTZMANN;

/**
 * A metal on a thick n layer. `xn` and `Emax` are those of the depletion approximation, led back from the solved field: the approximation keeps
 * all of V where the exact first integral has V - kT/q.
 */
function contact(m: CrystalMaterial, Nd: number, height: number, T = 300) {
  const thickness = Math.max(300, (4e7 * Math.sqrt((2 * m.permittivity * EPSILON_0) / (ELEMENTARY_CHARGE * Nd))) | 0);
  const s = expectSound(solveStack(stackOf([layer('n', thickness, [dopant('donor', Nd, COMPLETE)], m)], { T, top: barrier(height), assumptions: { statistics: 'boltzmann' } }), { accuracy: 1e-6 }), 1e-6);
  const V = height - s.layers[0].ecMinusEf;
  const solved = Math.abs(s.contacts[0].surfaceField);
  const Emax = solved * Math.sqrt(V / (V - BOLTZMANN * T));
  return { ecMinusEf: s.layers[0].ecMinusEf, Vbi: V, solved, Emax, xn: (m.permittivity * EPSILON_0 * Emax) / (ELEMENTARY_CHARGE * Nd), depletion: s.contacts[0].depletion! };
}

describe('barriers against published figures (sources in checks-e.json)', () => {
  const heights = (m: CrystalMaterial, workFunction: number, slope: number | 'material' = 'material') =>
    barrierHeights({ from: 'workFunction', workFunction, slope }, m, 0, localBands(m, 0, 300, PLAIN, { donors: 0, acceptors: 0 }));

  it('pin-cowley-si: silicon pins by a slope of 0.27', () => {
    const m = { ...crystalWith(1.12, 2.8e19, 1.04e19), affinity: 4.05, pinningSlope: 0.27, neutralityLevel: 1.12 - 0.745 };
    for (const phi of [4.8, 4.25]) holdAgainst(checksE, 'pin-cowley-si', `phi_Bn, phi_m = ${phi}`, heights(m, phi).barrierN);
    holdAgainst(checksE, 'pin-cowley-si', 'neutral level above Ev', m.neutralityLevel);
    expect(heights(m, 4.8).source).toBe('pinned');
  });

  it('pin-ge-dimoulas: germanium leaves every metal the same barrier', () => {
    const m = { ...crystalWith(0.66, 1.04e19, 6e18), affinity: 4, pinningSlope: 0.05, neutralityLevel: 0.09 };
    for (const phi of [4.28, 5.65]) {
      holdAgainst(checksE, 'pin-ge-dimoulas', `phi_Bn, phi_m ${phi}`, heights(m, phi).barrierN);
      expect(heights(m, phi).barrierP).toBeLessThan(0.11);
    }
  });

  it('sb-sum-rule: the barriers on n and p add up to the gap, and so do measured ones', () => {
    const m = { ...crystalWith(1.12, 2.8e19, 1.04e19), affinity: 4.05, pinningSlope: 0.27, neutralityLevel: 0.36 };
    const bands = localBands(m, 0, 300, PLAIN, { donors: 0, acceptors: 0 });
    for (const [name, [n, p]] of Object.entries({ NiSi: [0.65, 0.45], PtSi: [0.86, 0.24], CoSi2: [0.64, 0.46], TiSi2: [0.6, 0.5] })) {
      const fromN = barrierHeights({ from: 'measured', carrier: 'n', height: n }, m, 0, bands);
      const fromP = barrierHeights({ from: 'measured', carrier: 'p', height: p }, m, 0, bands);
      expect(fromN.barrierN + fromN.barrierP).toBeCloseTo(1.12, 12);
      holdAgainst(checksE, 'sb-sum-rule', `sum ${name}`, fromN.barrierN + fromP.barrierP);
    }
  });

  it('a material without a slope is ideal, and an alloy pins at its ends as its crystals do', () => {
    const none = crystalWith(1.12, 2.8e19, 1.04e19);
    const pinned = { ...none, id: 'pinned', pinningSlope: 0.1, neutralityLevel: 0.3 };
    expect(heights(none, 4.6).barrierN).toBeCloseTo(0.6, 12);
    expect(heights(none, 4.6).source).toBe('ideal');
    const alloy: AlloyMaterial = { id: 'alloy', first: pinned, second: none, bowing: {} };
    const at = (x: number) => barrierHeights({ from: 'workFunction', workFunction: 4.6, slope: 'material' }, alloy, x, localBands(alloy, x, 300, PLAIN, { donors: 0, acceptors: 0 }));
    expect(at(0)).toEqual(heights(pinned, 4.6));
    expect(at(1)).toEqual(heights(none, 4.6));
    // Between them the slope is known (1 by default at the far end), but the level is not.
    expect(() => at(0.5)).toThrow(/neutrality level/);
  });

  it('image-sze-vacuum and regimes-yu: the closed forms', () => {
    holdAgainst(checksE, 'image-sze-vacuum', 'dphi(1e5)', imageForceLowering(1e5, 1));
    holdAgainst(checksE, 'image-sze-vacuum', 'dphi(1e7)', imageForceLowering(1e7, 1));
    const regimes = [['1e17', 'thermionic'], ['1e19', 'thermionic-field'], ['3e20', 'field']] as const;
    for (const [N, regime] of regimes) {
      const e00 = tunnellingEnergy(Number(N), 0.26, 11.7);
      holdAgainst(checksE, 'regimes-yu', `E00/kT at ${N}`, e00 / (BOLTZMANN * 300));
      expect(transportRegime(e00, 300)).toBe(regime);
    }
  });
});

describe('metals on solved layers against published figures (sources in checks-e.json)', () => {
  const si = crystalWith(1.12, 2.8e19, 1.04e19);

  it('sb-neamen-9.1: tungsten on silicon', () => {
    const m = { ...si, affinity: 4.01 };
    const { barrierN } = barrierHeights({ from: 'workFunction', workFunction: 4.55, slope: 'material' }, m, 0, localBands(m, 0, 300, PLAIN, { donors: 0, acceptors: 0 }));
    const c = contact(m, 1e16, barrierN);
    for (const [quantity, got] of [['phi_B', barrierN], ['Ec-EF', c.ecMinusEf], ['Vbi', c.Vbi]] as const) holdAgainst(checksE, 'sb-neamen-9.1', quantity, got);
    // The source goes on with Vbi rounded to 0.33 V.
    const rounded = contact(m, 1e16, 0.33 + c.ecMinusEf);
    holdAgainst(checksE, 'sb-neamen-9.1', 'xn', rounded.xn);
    holdAgainst(checksE, 'sb-neamen-9.1', 'Emax', rounded.Emax);
    // The solved field itself, by the first integral (the source compares to 1e-4), and the half-charge edge within a Debye length (41 nm).
    expect(Math.abs(c.solved / Math.sqrt((2 * ELEMENTARY_CHARGE * 1e16 * (c.Vbi - BOLTZMANN * 300)) / (11.7 * EPSILON_0)) - 1)).toBeLessThan(1e-4);
    expect(Math.abs(c.depletion - c.xn)).toBeLessThan(4.1e-6);
  });

  it('vbi-singh-6.5 and sb-cv-sze-7.1: built-in potentials of entered barriers', () => {
    const T = kelvin(0.026);
    const singh = contact(crystalWith(1.12, 2.8e19, 1.04e19, T), 1e16, 0.67, T);
    holdAgainst(checksE, 'vbi-singh-6.5', 'Ec-EF', singh.ecMinusEf);
    holdAgainst(checksE, 'vbi-singh-6.5', 'Vbi', singh.Vbi);
    const warm = kelvin(0.0259);
    holdAgainst(checksE, 'sb-cv-sze-7.1', 'Vbi', contact({ ...crystalWith(1.12, 2.86e19, 2.66e19, warm), permittivity: 11.9 }, 2.7e15, 0.66, warm).Vbi);
  });

  it('w-neamen-9.7 and tunnel-singh-6.6: thin barriers', () => {
    const bulk = (N: number): number => BOLTZMANN * 300 * Math.log(2.8e19 / N);
    holdAgainst(checksE, 'w-neamen-9.7', 'xn', contact(si, 7e18, 0.67 + bulk(7e18)).xn);
    const m = { ...si, permittivity: 11.9 };
    for (const N of ['1e18', '1e20']) {
      const c = contact(m, Number(N), 0.66 + bulk(Number(N)));
      holdAgainst(checksE, 'tunnel-singh-6.6', `W(${N})`, c.xn);
      if (N === '1e20') holdAgainst(checksE, 'tunnel-singh-6.6', 'mean field(1e20)', c.Vbi / c.xn);
    }
  });

  it('mesfet-sze-7.4: a gate empties the layer on an insulating floor at zero bias', () => {
    const T = kelvin(0.026);
    const m = { ...crystalWith(1.42, 4.7e17, 7e18, T), permittivity: 12.4 };
    const s = expectSound(solveStack(stackOf([layer('channel', 600, [dopant('donor', 2e15, COMPLETE)], m)], { T, top: barrier(0.89), bottom: { kind: 'open', sheetCharge: 0 }, assumptions: { statistics: 'boltzmann' } })));
    holdAgainst(checksE, 'mesfet-sze-7.4', 'Vbi', 0.89 - s.layers[0].ecMinusEf);
    expect(s.layers[0].fullyDepleted).toBe(true);
    const thick = expectSound(solveStack(stackOf([layer('channel', 1000, [dopant('donor', 2e15, COMPLETE)], m)], { T, top: barrier(0.89), bottom: { kind: 'open', sheetCharge: 0 }, assumptions: { statistics: 'boltzmann' } })));
    // Pinch-off at 1000 nm is 1.46 V, above the 0.75 V that are there.
    expect(thick.layers[0].fullyDepleted).toBe(false);
  });
});
