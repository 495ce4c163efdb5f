import { describe, expect, it } from 'vitest';
import { dopants, materials, metals, offsets } from '../../presets/index.ts';
import { naturalValence } from '../../solver/alignment.ts';
import { localBands, type LocalBands } from '../../solver/bands.ts';
import { ELEMENTARY_CHARGE } from '../../solver/constants.ts';
import { carrierMobility } from '../../solver/mobility.ts';
import { polarisationAlongMetalFace } from '../../solver/polarisation.ts';
import { material, PLAIN, read } from './as-materials.ts';

const bands = (id: string, x: number, T: number): LocalBands => localBands(material(id), x, T, PLAIN, { donors: 0, acceptors: 0 });
const gap = (id: string, x = 0, T = 300): number => bands(id, x, T).gap;
function ni(id: string, T = 300): number {
  const b = bands(id, 0, T);
  return Math.sqrt(b.nc * b.nv) * Math.exp(-b.gap / (2 * b.kT));
}
function expectWithin(value: number, low: number, high: number, place: string): void {
  expect(value, place).toBeGreaterThanOrEqual(low);
  expect(value, place).toBeLessThanOrEqual(high);
}

describe('gaps of the presets', () => {
  it('meet the published gaps at 300 K, the lowest valley counting', () => {
    // Handbook values at 300 K, from memory; Ge and AlAs name another valley first.
    const published: [string, number][] = [['Si', 1.124], ['Ge', 0.661], ['GaAs', 1.424], ['AlAs', 2.163], ['InP', 1.344], ['InGaAs', 0.74], ['GaN', 3.44], ['4H-SiC', 3.26], ['CdTe', 1.52], ['CdS', 2.42], ['diamond', 5.47]];
    for (const [id, value] of published) expect(Math.abs(gap(id) - value), id).toBeLessThan(0.02);
  });

  it('stay within plausible bounds from 4 K to 1000 K, the affinity and the densities of states likewise', () => {
    for (const m of materials) {
      for (const T of [4, 77, 300, 600, 1000]) {
        for (const x of 'alloy' in m ? [0, 0.25, 0.5, 1] : [0]) {
          const b = bands(m.id, x, T);
          const place = `${m.id}, x = ${x}, ${T} K`;
          expectWithin(b.gap, m.id === 'InAs' || m.id === 'InN' || m.id === 'InGaN' ? 0.1 : 0.3, 10, place);
          expectWithin(b.affinity, 0.5, 6.2, place);
          expectWithin(b.permittivity, 3, 30, place);
          if (!b.insulator) for (const dos of [b.nc, b.nv]) expectWithin(dos / Math.pow(T / 300, 1.5), 4e16, 1e21, place);
        }
      }
    }
  });

  it('follow the published alloys', () => {
    // Vurgaftman et al. (2001): 1.841 eV at x = 0.3; the older line of Casey and Panish gives 1.798.
    expectWithin(gap('AlGaAs', 0.3), 1.798, 1.85, 'AlGaAs');
    // Direct to indirect between 0.37 and 0.45 (Adachi 1985): the density of states jumps with the X valleys.
    expect(bands('AlGaAs', 0.36, 300).nc).toBeLessThan(1.2e18);
    expect(bands('AlGaAs', 0.46, 300).nc).toBeGreaterThan(1e19);
    // Unstrained SiGe: 1.12 - 0.41 x + 0.008 x^2 at 300 K; Weber and Alonso (1989) at 4 K, exciton energy of 15 meV added.
    expect(gap('SiGe', 0.3)).toBeCloseTo(1.12 - 0.41 * 0.3 + 0.008 * 0.09, 2);
    expect(Math.abs(gap('SiGe', 0.3, 4) - (1.155 - 0.43 * 0.3 + 0.206 * 0.09 + 0.015))).toBeLessThan(0.02);
    expect(gap('SiGe', 1)).toBe(gap('Ge'));
    // Ambacher et al. (1999) for AlGaN; Wu et al. (2003) for InGaN, with 0.77 and 3.42 eV at the ends.
    expect(Math.abs(gap('AlGaN', 0.3) - (6.13 * 0.3 + 3.42 * 0.7 - 0.21))).toBeLessThan(0.1);
    expect(Math.abs(gap('InGaN', 0.2) - (0.77 * 0.2 + 3.42 * 0.8 - 0.16 * 1.43))).toBeLessThan(0.05);
  });
});

describe('intrinsic densities', () => {
  it('of silicon follow the measurement from 78 K to 340 K', () => {
    // Misiakos and Tsamakis, J. Appl. Phys. 74, 3293 (1993): 5.29e19 (T/300)^2.54 exp(-6726/T) cm^-3.
    for (const T of [78, 125, 200, 250, 300, 340]) {
      const measured = 5.29e19 * Math.pow(T / 300, 2.54) * Math.exp(-6726 / T);
      expectWithin(ni('Si', T) / measured, T < 200 ? 0.8 : 0.9, 1.1, `${T} K`);
    }
  });

  it('of other crystals meet the handbook figures at 300 K', () => {
    const published: [string, number][] = [['Ge', 2.0e13], ['GaAs', 2.1e6], ['InP', 1.3e7], ['GaSb', 1.5e12]];
    for (const [id, value] of published) expectWithin(ni(id) / value, 0.8, 1.25, id);
  });
});

describe('mobilities', () => {
  it('of doped silicon give the standard resistivities at 1e16 cm^-3', () => {
    // 0.53 ohm cm (phosphorus) and 1.5 ohm cm (boron), the curves of ASTM F723, from memory; 10 % between published fits.
    const rho = (carrier: 'electron' | 'hole'): number => 1 / (ELEMENTARY_CHARGE * 1e16 * (carrierMobility(material('Si'), carrier, 0, 1e16) as number));
    expectWithin(rho('electron') / 0.53, 0.9, 1.1, 'n');
    expectWithin(rho('hole') / 1.5, 0.9, 1.1, 'p');
  });

  it('fall with doping and lie between 1 and 40000 cm^2/(V s) when undoped', () => {
    for (const m of materials) {
      if ('alloy' in m || !m.mobility) continue;
      for (const carrier of ['electron', 'hole'] as const) {
        if (!m.mobility[carrier]) continue;
        const at = (N: number): number => carrierMobility(material(m.id), carrier, 0, N) as number;
        expectWithin(at(0), 1, 40000, `${m.id} ${carrier}`);
        expect(at(1e19), `${m.id} ${carrier}`).toBeLessThan(at(1e15));
        expect(at(1e19), `${m.id} ${carrier}`).toBeGreaterThan(0);
      }
    }
  });
});

describe('levels and barriers', () => {
  it('every dopant level lies inside the gap of its host', () => {
    for (const d of dopants) {
      const rows: [number, string][] = typeof d.depth === 'string' ? [[0, d.depth], [1, d.depth]] : d.depth.points;
      for (const [x, depth] of rows) expectWithin(read(depth), 1e-4, gap(d.host, x), `${d.host}:${d.id}`);
      expectWithin(d.degeneracy ?? 2, 0.1, 12, `${d.host}:${d.id}`);
      if (d.solubility) expectWithin(read(d.solubility), 1e14, 1e22, `${d.host}:${d.id}`);
    }
  });

  it('a level counted from the far edge in print stands where print puts it', () => {
    // Gold in silicon: acceptor 0.55 eV below Ec, donor 0.35 eV above Ev (Sze 2007).
    const depth = (id: string): number => read(dopants.find((d) => d.host === 'Si' && d.id === id)?.depth as string);
    expect(gap('Si') - depth('Au-acceptor')).toBeCloseTo(0.55, 2);
    expect(gap('Si') - depth('Au-donor')).toBeCloseTo(0.35, 2);
  });

  it('work functions and barriers are plausible', () => {
    for (const m of metals) {
      if (m.workFunction) expectWithin(read(m.workFunction), 2.2, 6, m.id);
      for (const b of m.barriers) expectWithin(read(b.height), 0.01, gap(b.material), `${m.id} on ${b.carrier}-${b.material}`);
    }
  });

  it('neutrality levels, slopes and Richardson constants are plausible', () => {
    for (const m of materials) {
      if ('alloy' in m) continue;
      if (m.neutralityLevel) expectWithin(read(m.neutralityLevel), 0, 6, m.id);
      if (m.pinningSlope !== undefined) expectWithin(m.pinningSlope, 0, 1, m.id);
      for (const A of Object.values(m.richardson ?? {})) expectWithin(read(A as string), 1, 300, m.id);
      for (const t of Object.values(m.tunnellingMass ?? {})) expectWithin(t as number, 0.01, 2.5, m.id);
    }
  });
});

describe('band offsets and polarisation', () => {
  it('published offsets agree with the natural valence edges where both are known', () => {
    let compared = 0;
    for (const o of offsets) {
      const [a, b] = [naturalValence(material(o.first), 1), naturalValence(material(o.second), 1)];
      if (!o.deltaEv || !a || !b) continue;
      expect(a.scale).toBe(b.scale);
      // +/- 0.17 eV is what the least certain of these measurements states (InN/AlN, King et al. 2007).
      expect(Math.abs(b.edge - a.edge - read(o.deltaEv.constant ?? '0 eV') - read(o.deltaEv.perX ?? '0 eV')), `${o.first}/${o.second}`).toBeLessThan(0.17);
      compared++;
    }
    expect(compared).toBeGreaterThanOrEqual(11);
  });

  it('the steps at silicon are those of its gate oxides: both carriers confined', () => {
    const oxides = offsets.filter((o) => o.first === 'Si' && bands(o.second, 0, 300).insulator);
    expect(oxides.length).toBe(4);
    for (const o of oxides) {
      const dEc = read(o.deltaEc?.constant as string);
      expect(dEc, o.second).toBeGreaterThan(1);
      expect(gap(o.second) - gap('Si') - dEc, o.second).toBeGreaterThan(1);
    }
  });

  it('strained SiGe on silicon takes the step of its gap almost wholly in the valence band', () => {
    // Robbins et al. (1992) for the gap; People and Bean (1986): the conduction step stays below 20 meV.
    expect(gap('SiGe-on-Si', 0.2, 4)).toBeCloseTo(gap('Si', 0, 4) - 0.896 * 0.2 + 0.396 * 0.04, 9);
    const perX = read(offsets.find((o) => o.second === 'SiGe-on-Si')?.deltaEv?.perX as string);
    expect(Math.abs(perX * 0.2 + gap('SiGe-on-Si', 0.2) - gap('Si'))).toBeLessThan(0.02);
  });

  it('strained Al0.3Ga0.7N on GaN carries the published sheet charge', () => {
    // 1.68e13 cm^-2: Ambacher et al., J. Appl. Phys. 85, 3222 (1999), linear interpolation at x = 0.3.
    const crystal = { face: 'metal', strain: 'pseudomorphic', template: material('GaN') } as const;
    const P = (id: string, x: number): number => polarisationAlongMetalFace(material(id), x, crystal);
    expect((P('GaN', 0) - P('AlGaN', 0.3)) / ELEMENTARY_CHARGE / 1.68e13).toBeCloseTo(1, 1);
  });
});
