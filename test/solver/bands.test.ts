import { describe, expect, it } from 'vitest';
import { densityOfStates, gapAt, localBands } from '../../solver/bands.ts';
import { BOLTZMANN } from '../../solver/constants.ts';
import { layerFigures } from '../../solver/layer.ts';
import type { AlloyMaterial, CrystalMaterial } from '../../solver/stack.ts';
import checks from '../fixtures/checks-b.json';
import { BOLTZMANN_STATISTICS, crystalWith, holdAgainst, layerOf, PLAIN } from './point-fixtures.ts';

const none = { donors: 0, acceptors: 0 };

describe('gap and intrinsic density against published figures (sources in checks-b.json)', () => {
  it("Varshni's law gives the gaps of Ge and GaAs", () => {
    const ge = { zeroK: 0.7437, alpha: 0.0004774, beta: 235 };
    holdAgainst(checks, 'eg-ge-varshni', 'Eg(300 K)', gapAt(ge, 300));
    holdAgainst(checks, 'eg-ge-varshni', 'Eg(77 K)', gapAt(ge, 77));
    const gaas = { zeroK: 1.519, alpha: 0.0005405, beta: 204 };
    holdAgainst(checks, 'eg-varshni-gaas', 'Eg(300 K)', gapAt(gaas, 300));
    holdAgainst(checks, 'eg-varshni-gaas', 'Eg(77 K)', gapAt(gaas, 77));
  });

  it('the law of O\'Donnell and Chen starts flat and ends straight', () => {
    const law = { law: 'odonnell-chen', zeroK: 5.482, coupling: 2.31, phonon: 0.094 } as const;
    const coth = (u: number): number => 1 / Math.tanh(u);
    for (const T of [200, 300, 600, 1500]) expect(gapAt(law, T)).toBeCloseTo(5.482 - 2.31 * 0.094 * (coth(0.094 / (2 * BOLTZMANN * T)) - 1), 12);
    // Diamond: 5.47 eV at 300 K, Landolt-Boernstein.
    expect(gapAt(law, 300)).toBeCloseTo(5.47, 2);
    expect(gapAt(law, 1)).toBe(5.482);
    // Far above the phonon's temperature the slope is -2 S k, as in the paper.
    expect((gapAt(law, 2e5) - gapAt(law, 1.9e5)) / (1e4 * -2 * 2.31 * BOLTZMANN)).toBeCloseTo(1, 5);
  });

  it('a straight law turns about its value at 300 K', () => {
    const law = { law: 'linear', at300K: 2.42, slope: 4.1e-4 } as const;
    expect(gapAt(law, 300)).toBe(2.42);
    expect(gapAt(law, 100)).toBeCloseTo(2.502, 12);
    expect(gapAt({ law: 'varshni', zeroK: 1.519, alpha: 0.0005405, beta: 204 }, 300)).toBe(gapAt({ zeroK: 1.519, alpha: 0.0005405, beta: 204 }, 300));
  });

  it('the intrinsic density follows from stated densities of states', () => {
    const ni = (m: CrystalMaterial, T: number): number => layerFigures(layerOf(m, []), T, BOLTZMANN_STATISTICS, false).ni;
    const gaas = crystalWith(1.42, 4.7e17, 7e18);
    holdAgainst(checks, 'ni-gaas-neamen-4.3', 'ni(300 K)', ni(gaas, 300));
    holdAgainst(checks, 'ni-gaas-neamen-4.3', 'ni(450 K)', ni(gaas, 450));
    holdAgainst(checks, 'ni-si-550K', 'ni(550 K)', ni(crystalWith(1.12, 2.8e19, 1.04e19), 550));
    holdAgainst(checks, 'ni-sic-4h', 'ni(300 K)', ni(crystalWith(3.26, 1.7e19, 2.5e19), 300));
  });

  it('masses give densities of states and intrinsic densities', () => {
    holdAgainst(checks, 'ni-vz-table', 'Nc Ge', densityOfStates(0.56, 300));
    holdAgainst(checks, 'ni-vz-table', 'Nv Si', densityOfStates(0.81, 300));
    holdAgainst(checks, 'ni-vz-table', 'Nc Si', densityOfStates(1.08, 300));
    holdAgainst(checks, 'ni-vz-table', 'Nv GaAs', densityOfStates(0.47, 300));
    const table: [string, number, number, number][] = [['Ge', 0.66, 0.56, 0.29], ['Si', 1.12, 1.08, 0.81], ['GaAs', 1.424, 0.067, 0.47]];
    for (const [name, gap, me, mh] of table) {
      const m = { ...crystalWith(gap, 1e19, 1e19), electronMass: [me], holeMass: [mh] };
      holdAgainst(checks, 'ni-vz-table', `ni ${name}`, layerFigures(layerOf(m, []), 300, PLAIN, false).ni);
    }
  });
});

describe('alloys', () => {
  const first: CrystalMaterial = {
    ...crystalWith(1.5, 4e17, 8e18), id: 'first', gap: { zeroK: 1.5, alpha: 5e-4, beta: 200 },
    otherValleys: [{ name: 'X', gap: { zeroK: 1.95, alpha: 4e-4, beta: 200 }, electronMass: [0.9] }],
  };
  const second: CrystalMaterial = {
    ...crystalWith(3, 4e17, 8e18), id: 'second', gap: { zeroK: 3, alpha: 8e-4, beta: 500 }, affinity: 3.5, affinityShare: 0.7,
    otherValleys: [{ name: 'X', gap: { zeroK: 2.2, alpha: 3e-4, beta: 200 }, electronMass: [0.7] }],
  };
  const alloy: AlloyMaterial = { id: 'alloy', first, second, bowing: { gap: [-0.1, 1.3], affinity: 0.2 }, valleyBowing: { X: 0.05 } };

  it('take the lowest valley with its own mass', () => {
    const x = 0.8;
    const b = localBands(alloy, x, 200, PLAIN, none);
    const gapX = 0.2 * gapAt({ zeroK: 1.95, alpha: 4e-4, beta: 200 }, 200) + 0.8 * gapAt({ zeroK: 2.2, alpha: 3e-4, beta: 200 }, 200) - 0.16 * 0.05;
    expect(b.gap).toBeCloseTo(gapX, 12);
    expect(b.nc).toBeCloseTo(densityOfStates(0.2 * 0.9 + 0.8 * 0.7, 200), -8);
    const low = localBands(alloy, 0.1, 200, PLAIN, none);
    expect(low.gap).toBeCloseTo(0.9 * gapAt(first.gap, 200) + 0.1 * gapAt(second.gap, 200) - 0.09 * (-0.1 + 1.3 * 0.1), 12);
  });

  it("move their affinity with the alloy's own gap", () => {
    const x = 0.3;
    const at300 = localBands(alloy, x, 300, PLAIN, none);
    const cold = localBands(alloy, x, 77, PLAIN, none);
    expect(at300.affinity).toBeCloseTo(0.7 * 4 + 0.3 * 3.5 - 0.21 * 0.2, 12);
    expect(cold.affinity - at300.affinity).toBeCloseTo((0.7 * 0.5 + 0.3 * 0.7) * (at300.gap - cold.gap), 12);
  });

  it('equal their crystals at both ends', () => {
    for (const [x, m] of [[0, first], [1, second]] as const) expect(localBands(alloy, x, 250, PLAIN, none)).toEqual(localBands(m, 0, 250, PLAIN, none));
  });

  it('refuse a composition outside 0..1 and a temperature of zero', () => {
    expect(() => localBands(alloy, 1.1, 300, PLAIN, none)).toThrow(RangeError);
    expect(() => localBands(alloy, 0.1, 0, PLAIN, none)).toThrow(RangeError);
  });
});

describe('narrowing', () => {
  const m: CrystalMaterial = { ...crystalWith(1.12, 2.8e19, 1e19), narrowing: { law: 'slotboom', energy: 0.009, reference: 1e17, constant: 0.5, conductionShare: 0.4 } };

  it('lowers the gap and raises the affinity by the conduction share, for all active dopants together', () => {
    const off = localBands(m, 0, 300, PLAIN, { donors: 8e18, acceptors: 2e18 });
    const on = localBands(m, 0, 300, { ...PLAIN, narrowing: true }, { donors: 8e18, acceptors: 2e18 });
    // Slotboom and de Graaff (1976): 9 meV {ln(N/1e17) + sqrt[ln^2(N/1e17) + 0.5]}.
    const l = Math.log(100);
    const fall = 0.009 * (l + Math.sqrt(l * l + 0.5));
    expect(off.gap - on.gap).toBeCloseTo(fall, 12);
    expect(on.affinity - off.affinity).toBeCloseTo(0.4 * fall, 12);
  });

  it('vanishes without dopants', () => {
    expect(localBands(m, 0, 300, { ...PLAIN, narrowing: true }, none)).toEqual(localBands(m, 0, 300, PLAIN, none));
  });
});
