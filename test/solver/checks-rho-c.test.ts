import { describe, expect, it } from 'vitest';
import { tunnellingEnergy } from '../../solver/barrier.ts';
import { closedFormResistivity, saturationCurrent } from '../../solver/closed-forms.ts';
import { BOLTZMANN, ELECTRON_MASS, ELEMENTARY_CHARGE, EPSILON_0, PLANCK } from '../../solver/constants.ts';
import { carrierConductance, isMissing } from '../../solver/contact-resistivity.ts';
import { inverseFermiHalf } from '../../solver/fermi-integral.ts';
import { integrate } from '../../solver/quadrature.ts';
import type { CrystalMaterial } from '../../solver/stack.ts';
import { NM_PER_CM } from '../../solver/units.ts';
import checks from '../fixtures/checks-rho-c.json';
import { bareStack, conductance, contactOn, SILICON, wayOf } from './contact-fixtures.ts';
import { crystalWith, holdAgainst, massFor } from './point-fixtures.ts';

/** A* of one spherical valley of mass m0: 4 pi m q k^2/h^3, A/(cm^2 K^2). */
const FREE = (4 * Math.PI * ELECTRON_MASS * ELEMENTARY_CHARGE * (BOLTZMANN * ELEMENTARY_CHARGE) ** 2) / PLANCK ** 3 / 1e4;

const rhoOf = (N: number, height: number, options: Parameters<typeof contactOn>[3] = {}, material: CrystalMaterial = SILICON): number => contactOn(material, N, height, options).contacts[0].rhoC ?? NaN;

/** The integral through the parabola of the depletion approximation, 300 K, relative permittivity 11.7. */
function throughParabola(N: number, height: number, states: number, mass: number, constant: number): number {
  const edge = -BOLTZMANN * 300 * inverseFermiHalf(N / states);
  const psi = height - edge;
  const width = Math.sqrt((2 * 11.7 * EPSILON_0 * psi) / (ELEMENTARY_CHARGE * N)) * NM_PER_CM;
  const s = Array.from({ length: 80 }, (_, i) => (i / 79) * width);
  const way = wayOf([{ s, u: s.map((x) => edge + psi * (1 - x / width) ** 2), slope: s.map((x) => (-2 * psi * (1 - x / width)) / width) }], edge);
  const c = carrierConductance(bareStack([mass]), way, 'electron', { imageForce: false });
  if (isMissing(c)) throw new Error(c.missing);
  return (Math.exp(-c.log) * 110) / constant;
}

describe('contact resistivities against published and exact figures (sources in checks-rho-c.json)', () => {
  it('rc-te-closed: the thermionic limit', () => {
    holdAgainst(checks, 'rc-te-closed', 'rho_c 0.4 eV', rhoOf(1e14, 0.4));
  });

  it('rc-si-06: through a depletion parabola, and through the solved barrier, which electrons near its foot make thicker', () => {
    for (const name of ['1e19', '1e20']) holdAgainst(checks, 'rc-si-06', `rho_c ${name}, depletion parabola`, throughParabola(Number(name), 0.6, 2.86e19, 0.26, 110));
    for (const name of ['1e18', '1e19', '1e20']) holdAgainst(checks, 'rc-si-06', `rho_c ${name}, solved`, rhoOf(Number(name), 0.6));
    for (const name of ['1e19', '1e20']) holdAgainst(checks, 'rc-si-06', `rho_c ${name}`, rhoOf(Number(name), 0.6));
  });

  it('rc-si-06: at 1e20 the solved barrier lies a factor of 1.51 above the parabola whatever the mesh; by the wave equation it is within the 1.5 that the source asks', () => {
    // The parabola leaves out the electrons near its foot, which screen the dopants and stretch the barrier; quadratures of the first integral, apart from this solver, give the same 2.23e-7.
    const [solved, parabola] = [rhoOf(1e20, 0.6), throughParabola(1e20, 0.6, 2.86e19, 0.26, 110)];
    expect(solved / parabola).toBeGreaterThan(1.5);
    expect(solved / parabola).toBeLessThan(1.53);
    // A lower barrier has less of a foot to be stretched.
    const high = (height: number): number => rhoOf(1e20, height) / throughParabola(1e20, height, 2.86e19, 0.26, 110);
    expect(high(0.3)).toBeLessThan(high(0.6));
    // A finer mesh moves nothing. WKB overstates, and the wave equation on the same barrier conducts better.
    expect(Math.abs(rhoOf(1e20, 0.6, { accuracy: 1e-8 }) / solved - 1)).toBeLessThan(1e-5);
    const exact = Math.exp(-conductance(contactOn(SILICON, 1e20, 0.6), 'electron', { transmission: 'exact' }).log);
    expect(exact).toBeLessThan(1.47e-7 * 1.5);
    expect(exact).toBeGreaterThan(1.47e-7 / 1.5);
  });

  it('rc-landauer: the floor is that of one spherical valley, whatever its mass', () => {
    for (const mass of [0.067, 0.26, 1]) {
      const valley: CrystalMaterial = { ...SILICON, electronMass: [mass], richardson: { electron: FREE * mass, hole: 79 } };
      for (const [N, name] of [[1e19, '1e19'], [1e20, '1e20']] as const) {
        const c = contactOn(valley, N, -2, { T: 2 }).contacts[0];
        holdAgainst(checks, 'rc-landauer', `rho_min ${name}`, c.rhoCFloor ?? NaN);
        expect(c.rhoC).toBe(c.rhoCFloor);
      }
    }
  });

  it('rc-sip-record: the lowest measured contact lies above the floor and within reach', () => {
    const floor = (N: number): number => contactOn({ ...SILICON, electronMass: [1], richardson: { electron: FREE, hole: 79 } }, N, -2, { T: 2 }).contacts[0].rhoCFloor ?? NaN;
    holdAgainst(checks, 'rc-sip-record', 'measured / one-valley ballistic floor at 5e20', 1.5e-9 / floor(5e20));
    holdAgainst(checks, 'rc-sip-record', 'measured / floor at 2e21', 1.5e-9 / floor(2e21));
    const reached = [5e20, 1e21].flatMap((N) => [0.3, 0.5].map((height) => rhoOf(N, height, { imageForce: true })));
    expect(Math.min(...reached)).toBeLessThan(1.5e-9);
    expect(Math.max(...reached)).toBeGreaterThan(0.3e-9);
  });

  it('rc-cosi-p: the barrier at the solubility of boron lies below what was measured on p-silicon, and the gap is shown', () => {
    holdAgainst(checks, 'rc-cosi-p', 'rho_c at 2.5e20, depletion parabola', throughParabola(2.5e20, 0.46, 3.1e19, 0.2, 32));
    holdAgainst(checks, 'rc-cosi-p', 'rho_c at 1e20, depletion parabola', throughParabola(1e20, 0.46, 3.1e19, 0.2, 32));
    const p: CrystalMaterial = { ...crystalWith(1.12, 2.86e19, 3.1e19), tunnellingMass: { electron: 0.26, hole: 0.2 }, richardson: { electron: 110, hole: 32 } };
    const solved = [2.5e20, 1e20].map((N) => rhoOf(N, 0.46, { carrier: 'p' }, p));
    for (const got of solved) holdAgainst(checks, 'rc-cosi-p', 'rho_c', got);
    expect(solved[0]).toBeLessThan(1.3e-7 / 3);
    expect(solved[1]).toBeGreaterThan(1e-7);
  });

  it('rc-gaas-ltg: an untreated n-GaAs surface is far above what treated ones reach', () => {
    const gaas: CrystalMaterial = { ...crystalWith(1.424, 4.35e17, 8.5e18), permittivity: 12.9, permittivityHighFrequency: 10.9, tunnellingMass: { electron: 0.067, hole: 0.082 }, richardson: { electron: 8.05, hole: 74.5 } };
    const bare = rhoOf(5e18, 0.8, { imageForce: true }, gaas);
    const measured = checks.checks.find((c) => c.id === 'rc-gaas-ltg')!.expected.find((e) => e.quantity === 'measured n') as { range: number[] };
    expect(bare).toBeGreaterThan(10 * measured.range[1]);
    // A pinned p surface (phi_Bp 0.62 eV = Eg - 0.8) reaches the measured range with an acceptor doping that is grown.
    expect(rhoOf(2e20, 0.62, { imageForce: true, carrier: 'p' }, gaas)).toBeLessThan(2e-7);
  });
});

describe('the curve against doping', () => {
  it('of n- and p-silicon is flat in thermionic emission and falls ever more steeply, by seven decades for 0.6 eV between 1e18 and 1e20 cm^-3', () => {
    // The points are those of rc-si-06 (n) and rc-cosi-p (p); the shape is that of the theory curves cited there.
    const doping = [1e15, 1e16, 1e17, 1e18, 1e19, 1e20];
    for (const [carrier, height, constant] of [['n', 0.6, 110], ['p', 0.46, 32]] as const) {
      const material: CrystalMaterial = { ...SILICON, tunnellingMass: { electron: 0.26, hole: 0.2 }, richardson: { electron: 110, hole: 32 } };
      const got = doping.map((N) => rhoOf(N, height, { carrier }, material));
      const slopes = doping.slice(1).map((_, i) => Math.log10(got[i] / got[i + 1]));
      expect(slopes[0]).toBeLessThan(0.15);
      expect([...slopes].sort((a, b) => a - b)).toEqual(slopes);
      expect(got[0] / ((BOLTZMANN / (constant * 300)) * Math.exp(height / (BOLTZMANN * 300)))).toBeGreaterThan(0.8);
      if (carrier === 'n') expect(Math.log10(got[3] / got[5])).toBeGreaterThan(6.5);
    }
  });

  it('cold is the worst corner but in field emission', () => {
    const over = (N: number): number => rhoOf(N, 0.6, { T: 77, imageForce: true }) / rhoOf(N, 0.6, { T: 448, imageForce: true });
    expect(over(1e19)).toBeGreaterThan(300);
    expect(over(2e20)).toBeLessThan(1.5);
    expect(over(2e20)).toBeGreaterThan(1);
  });
});

describe('the closed forms', () => {
  it('agree with the integral over their own parabola where each is meant to hold', () => {
    const bounds = { 'thermionic-field': [0.7, 1], field: [0.85, 1] };
    const seen = new Set<string>();
    for (const T of [20, 77, 300]) {
      for (const N of [1e17, 3e18, 1e19, 2e19, 1e20, 1e21]) {
        const kT = BOLTZMANN * T;
        const edge = -kT * inverseFermiHalf(N / (2.86e19 * (T / 300) ** 1.5));
        const e00 = tunnellingEnergy(N, 0.26, 11.7);
        const psi = 0.6 - edge;
        const { rhoC, form } = closedFormResistivity(0.6, edge, e00, 110, T);
        if (form === 'thermionic') continue;
        seen.add(form);
        const integrand = (theta: number): number => {
          const z = Math.sin(theta) ** 2;
          const root = Math.sqrt(1 - z);
          const u = (edge + z * psi) / kT;
          return (Math.exp(-(psi / e00) * (root - z * Math.atanh(root)) - Math.max(u, 0)) / (1 + Math.exp(-Math.abs(u)))) * psi * Math.sin(2 * theta);
        };
        const { value } = integrate(integrand, [1e-9, 0.4, 0.8, 1.2, Math.PI / 2 - 1e-9], 1e-9, 0, 200);
        const ratio = rhoC / (BOLTZMANN ** 2 / (110 * (value + kT * Math.log1p(Math.exp(-0.6 / kT)))));
        expect(ratio, `${form} ${T} K ${N}`).toBeGreaterThan(bounds[form][0]);
        expect(ratio, `${form} ${T} K ${N}`).toBeLessThan(bounds[form][1]);
      }
    }
    expect([...seen].sort()).toEqual(['field', 'thermionic-field']);
  });

  it("the thermionic-field form in print (from memory) lies 2 r/sqrt(tanh r) above the integral's, r = E00/kT: it counts the forward current alone and half of the Gauss integral", () => {
    const kT = BOLTZMANN * 300;
    for (const r of [0.6, 1, 1.5]) {
      const [psi, edge, e00] = [0.6, 0.02, r * kT];
      const form = closedFormResistivity(psi + edge, edge, e00, 110, 300);
      expect(form.form).toBe('thermionic-field');
      // k/(A T) sqrt(E00/(pi psi)) cosh r coth r exp(psi/E0 + edge/kT), Yu (1970).
      const printed = (BOLTZMANN / (110 * 300)) * Math.sqrt(e00 / (Math.PI * psi)) * (Math.cosh(r) / Math.tanh(r)) * Math.exp((psi * Math.tanh(r)) / e00 + edge / kT);
      expect(printed / form.rhoC / ((2 * r) / Math.sqrt(Math.tanh(r)))).toBeCloseTo(1, 9);
      const exponent = (z: number): number => (psi / e00) * (Math.sqrt(1 - z) - z * Math.atanh(Math.sqrt(1 - z)));
      const { value } = integrate((theta) => Math.exp(-exponent(Math.sin(theta) ** 2) - (edge + Math.sin(theta) ** 2 * psi) / kT) * psi * Math.sin(2 * theta), [1e-9, 0.4, 0.8, 1.2, Math.PI / 2 - 1e-9], 1e-9, 0, 200);
      // Boltzmann's occupancy, as both forms take it: what is left is the parabola's share. The printed form is off by more at every r.
      const integral = BOLTZMANN ** 2 / (110 * value);
      expect(Math.abs(Math.log(form.rhoC / integral)), `r = ${r}`).toBeLessThan(0.2);
      expect(printed / integral, `r = ${r}`).toBeGreaterThan(1.4);
    }
  });

  it('choose thermionic emission below kT/2 and without a barrier, and stay finite in the cold', () => {
    const usual = closedFormResistivity(0.6, 0.1, 0.012, 110, 300);
    expect(usual.form).toBe('thermionic');
    expect(usual.rhoC / ((BOLTZMANN / (110 * 300)) * Math.exp(0.6 / (BOLTZMANN * 300)))).toBeCloseTo(1, 9);
    // A barrier below EF, as a metal on InAs has, conducts no better than the states above it.
    const low = closedFormResistivity(-0.14, -0.2, 0.1, 3, 300);
    expect(low.rhoC / (BOLTZMANN ** 2 / (3 * 0.14))).toBeCloseTo(1, 2);
    expect(closedFormResistivity(-0.3, -0.1, 0.2, 110, 300).form).toBe('thermionic');
    expect(closedFormResistivity(0.6, 0.02, 0.3, 110, 4.2).form).toBe('field');
    expect(closedFormResistivity(0.6, 0.02, 0.3, 110, 4.2).rhoC).toBeGreaterThan(0);
    expect(closedFormResistivity(0.6, 0.02, 0.3, 110, 4.2).rhoC).toBeLessThan(Infinity);
  });

  it('saturation current: A T^2 exp(-phi/kT), with the lowering that the contact reports', () => {
    // Sze and Ng's constants for n-silicon, W: 110, 0.67 eV: 5.5e-5 A/cm^2 by the formula.
    expect(saturationCurrent(0.67, 110, 300)).toBeCloseTo(110 * 300 ** 2 * Math.exp(-0.67 / (BOLTZMANN * 300)), 15);
    const lowered = contactOn(SILICON, 1e16, 0.67, { imageForce: true }).contacts[0];
    const plain = contactOn(SILICON, 1e16, 0.67).contacts[0];
    expect(plain.lowering).toBeNull();
    expect((lowered.saturationCurrent ?? NaN) / (plain.saturationCurrent ?? NaN)).toBeCloseTo(Math.exp((lowered.lowering ?? NaN) / (BOLTZMANN * 300)), 6);
    expect(contactOn(SILICON, 1e19, -0.1).contacts[0].saturationCurrent).toBeNull();
    // Thermionic emission conducts dJ/dV = J/kT at zero bias.
    expect((plain.saturationCurrent ?? NaN) * (plain.rhoCClosedForm ?? NaN)).toBeCloseTo(BOLTZMANN * 300, 9);
    expect(conductance(contactOn({ ...SILICON, electronMass: [massFor(2.86e19, 300)] }, 1e16, 0.67)).error).toBeLessThan(1e-5);
  });
});
