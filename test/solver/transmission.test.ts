import { describe, expect, it } from 'vitest';
import { tunnellingEnergy } from '../../solver/barrier.ts';
import { METAL_BAND, WAVE } from '../../solver/barrier-shape.ts';
import { ELECTRON_MASS, ELEMENTARY_CHARGE, PLANCK } from '../../solver/constants.ts';
import { waveSteps, waveTransmission } from '../../solver/exact-transmission.ts';
import { logTransmission } from '../../solver/transmission.ts';
import { CM_PER_NM } from '../../solver/units.ts';
import { kembleExponent, wkbExponent } from '../../solver/wkb.ts';
import checks from '../fixtures/checks-rho-c.json';
import { shapeOf, wayOf } from './contact-fixtures.ts';
import { holdAgainst } from './point-fixtures.ts';

/** 2 m0/hbar^2, nm^-2 eV^-1. */
const WAVE_NM = WAVE * CM_PER_NM ** 2;

/** U = edge + height (1 - s/width)^2, then flat. */
function depletionParabola(height: number, width: number, edge: number) {
  const s = Array.from({ length: 60 }, (_, i) => (i / 59) * width);
  return wayOf([{ s, u: s.map((x) => edge + height * (1 - x / width) ** 2), slope: s.map((x) => (-2 * height * (1 - x / width)) / width) }], edge);
}

describe('WKB', () => {
  it('wkb-parabola: the exponent of a depletion parabola is the closed form at every energy', () => {
    const psi = 0.66;
    const e00 = tunnellingEnergy(1e20, 0.34, 11.9);
    // 2 Int kappa ds = W sqrt(WAVE m psi) at the foot.
    const width = psi / e00 / Math.sqrt(WAVE_NM * 0.34 * psi);
    const shape = shapeOf(depletionParabola(psi, width, 0.1), [0.34]);
    const closed = (z: number): number => (psi / e00) * (Math.sqrt(1 - z) - z * Math.atanh(Math.sqrt(1 - z)));
    for (const z of [1e-3, 0.05, 0.3, 0.7, 0.99, 0.9999]) expect(Math.abs(wkbExponent(shape, 0.1 + z * psi) / closed(z) - 1)).toBeLessThan(3e-6);
    holdAgainst(checks, 'wkb-parabola', 'exponent', wkbExponent(shape, 0.1 + 0.3 * psi));
    holdAgainst(checks, 'wkb-parabola', 'at z = 0', wkbExponent(shape, 0.1));
    expect(wkbExponent(shape, shape.top)).toBe(0);
  });

  it('tunnel-singh-6.6: a triangle of the mean field', () => {
    const width = 2.947624;
    const way = wayOf([{ s: [0, width], u: [0.66, 0], slope: [-0.66 / width, -0.66 / width] }], 0);
    // The source's digits come of its rounded constants.
    const { hbar, m0, q } = checks.checks.find((c) => c.id === 'tunnel-singh-6.6')!.inputs as unknown as Record<string, number>;
    const rounded = (PLANCK / (2 * Math.PI) / hbar) * Math.sqrt((m0 * q) / (ELECTRON_MASS * ELEMENTARY_CHARGE));
    holdAgainst(checks, 'tunnel-singh-6.6', 'T(1e20)', Math.exp(-rounded * wkbExponent(shapeOf(way, [0.34]), 0)));
  });

  it('adds up the exponents of two humps with different masses and of a flat insulator before them', () => {
    const hump = (from: number): { s: number[]; u: number[]; slope: number[] } => {
      const s = Array.from({ length: 21 }, (_, i) => from + (i / 20) * 4);
      return { s, u: s.map((x) => 0.4 - 0.1 * (x - from - 2) ** 2), slope: s.map((x) => -0.2 * (x - from - 2)) };
    };
    const shape = shapeOf(wayOf([{ s: [0, 1], u: [2, 2], slope: [0, 0] }, hump(1), hump(5)], 0), [0.5, 0.3, 0.1]);
    for (const E of [0.05, 0.25]) {
      // Half a circle's area: Int sqrt(h - c x^2) dx = pi h/(2 sqrt c).
      const exact = 2 * Math.sqrt(WAVE_NM) * (Math.sqrt(0.5 * (2 - E)) + ((Math.sqrt(0.3) + Math.sqrt(0.1)) * Math.PI * (0.4 - E)) / (2 * Math.sqrt(0.1)));
      expect(Math.abs(wkbExponent(shape, E) - exact)).toBeLessThan(1e-6 * exact);
    }
    expect(shape.top).toBe(2);
  });

  it('with the two-band dispersion a barrier as high as the gap has pi/8 where one band has 2/3', () => {
    const way = wayOf([{ s: [0, 10], u: [2, 0], slope: [-0.2, -0.2] }], 0);
    const shape = shapeOf(way, [0.2]);
    const unit = (2 * Math.sqrt(WAVE_NM * 0.2) * 2 ** 1.5 * 10) / 2;
    expect(wkbExponent(shape, 0) / unit).toBeCloseTo(2 / 3, 6);
    expect(wkbExponent(shape, 0, 'two-band') / unit).toBeCloseTo(Math.PI / 8, 4);
    // Near the top, far from the other band, both agree.
    expect(wkbExponent(shape, 1.98, 'two-band') / wkbExponent(shape, 1.98)).toBeCloseTo(1, 2);
  });

  it('finds the top that the image force leaves inside, at the distance and height of the closed form', () => {
    const field = 0.1;
    const way = wayOf([{ s: [0, 5, 10], u: [1, 0.5, 0], slope: [-field, -field, -field] }], 0);
    const shape = shapeOf(way, [0.26], { imageForce: true });
    // q/(16 pi eps0) = 0.36 eV nm.
    const c = 0.3599911 / 11.7;
    expect(shape.topAt / CM_PER_NM).toBeCloseTo(Math.sqrt(c / field), 3);
    expect(shape.top).toBeCloseTo(1 - 2 * Math.sqrt(c * field), 6);
    // Between the two roots of 1 - field s - c/s = E.
    const E = 0.6;
    let sum = 0;
    const root = Math.sqrt((1 - E) ** 2 - 4 * c * field);
    const [a, b] = [(1 - E - root) / (2 * field), (1 - E + root) / (2 * field)];
    const n = 20000;
    for (let i = 0; i < n; i++) {
      const s = a + ((b - a) * (1 - Math.cos((Math.PI * (i + 0.5)) / n))) / 2;
      sum += Math.sqrt(1 - field * s - c / s - E) * ((b - a) / 2) * Math.sin((Math.PI * (i + 0.5)) / n) * (Math.PI / n);
    }
    expect(Math.abs(wkbExponent(shape, E) / (2 * Math.sqrt(WAVE_NM * 0.26) * sum) - 1)).toBeLessThan(1e-6);
  });
});

describe('an energy within rounding of the top', () => {
  it('has next to no exponent, rather than none that is a number', () => {
    for (const edge of [0.1, 0.37, -0.2793145362848096]) {
      for (const rise of [0.7, 1 / 3, 1.2815487454439211]) {
        const top = edge + rise;
        // Deep under a thick layer, where depths have lost the digits that would tell such energies apart.
        const deep = 1.8e5;
        const way = wayOf([{ s: [0, deep], u: [edge, edge], slope: [0, 0] }, { s: [deep, deep + 0.1], u: [top, edge], slope: [-rise / 0.1, 0] }], edge);
        const shape = shapeOf(way, [0.3, 0.2]);
        for (let ulp = 0; ulp < 8; ulp++) {
          const exponent = wkbExponent(shape, shape.top * (1 - ulp * 1.2e-16));
          expect(exponent).toBeGreaterThanOrEqual(0);
          expect(exponent).toBeLessThan(1e-8);
        }
      }
    }
  });
});

describe("Kemble's form", () => {
  it('is 1/2 at the top of a smooth barrier and symmetric about it', () => {
    const s = Array.from({ length: 41 }, (_, i) => i / 4);
    const shape = shapeOf(wayOf([{ s, u: s.map((x) => 0.5 - 0.02 * (x - 5) ** 2), slope: s.map((x) => -0.04 * (x - 5)) }], 0), [0.3]);
    const log = logTransmission(shape, 'kemble');
    expect(Math.exp(log(shape.top))).toBeCloseTo(0.5, 6);
    for (const d of [0.01, 0.05, 0.3]) {
      expect(Math.exp(log(shape.top + d)) + Math.exp(log(shape.top - d))).toBeCloseTo(1, 12);
      // Exact for the parabola: exp(2 pi (U - E)/hbar omega), hbar omega = 2 sqrt(c/(WAVE m)).
      expect(kembleExponent(shape, shape.top - d)).toBeCloseTo((2 * Math.PI * d) / (2 * Math.sqrt(0.02 / (WAVE_NM * 0.3))), 5);
    }
    // Far above, straight on and without a jump.
    expect(kembleExponent(shape, 0.5 + 0.5000001)).toBeCloseTo(kembleExponent(shape, 0.5 + 0.4999999), 4);
    expect(kembleExponent(shape, 2)).toBeLessThan(kembleExponent(shape, 1.2));
  });
});

describe('the exact transmission', () => {
  it('of a rectangular barrier with three different masses is the closed form, below and above the top', () => {
    const [d, V, edge, m2, m3] = [1.5, 0.8, 0.1, 0.4, 0.26];
    const shape = shapeOf(wayOf([{ s: [0, d], u: [V, V], slope: [0, 0] }, { s: [d, d + 20], u: [edge, edge], slope: [0, 0] }], edge), [m2, m3]);
    const steps = waveSteps(shape, 1);
    for (const E of [0.15, 0.5, 0.79, 0.81, 1.3, 2.5]) {
      const v1 = Math.sqrt(WAVE_NM * (METAL_BAND + E));
      const v3 = Math.sqrt((WAVE_NM * (E - edge)) / m3);
      const nu = Math.sqrt((WAVE_NM * Math.abs(V - E)) / m2);
      const phase = nu * m2 * d;
      const [even, odd, sign] = E < V ? [Math.cosh(phase), Math.sinh(phase), -1] : [Math.cos(phase), Math.sin(phase), 1];
      // |A|^2 = [(1 + v3/v1)^2 even^2 + (v3/nu +- nu/v1)^2 odd^2]/4, T = (v3/v1)/|A|^2.
      const exact = (4 * v3) / v1 / ((1 + v3 / v1) ** 2 * even ** 2 + (v3 / nu + (sign * nu) / v1) ** 2 * odd ** 2);
      expect(waveTransmission(steps, E)).toBeCloseTo(Math.log(exact), 8);
    }
    expect(waveTransmission(steps, edge)).toBe(-Infinity);
    expect(waveTransmission(steps, 0)).toBe(-Infinity);
  });

  it("of an inverted parabola is Kemble's, which is exact there", () => {
    // It starts at the bottom of the metal's band with the metal's mass and ends as deep, so that nothing else throws waves back.
    const c = 0.005;
    const half = Math.sqrt((METAL_BAND + 0.3) / c);
    const s = Array.from({ length: 400 }, (_, i) => (i / 399) * 2 * half);
    const shape = shapeOf(wayOf([{ s, u: s.map((x) => 0.3 - c * (x - half) ** 2), slope: s.map((x) => -2 * c * (x - half)) }], -METAL_BAND), [1]);
    const steps = waveSteps(shape, 16);
    const omega = 2 * Math.sqrt(c / WAVE_NM);
    for (const E of [0, 0.2, 0.28, 0.3, 0.31, 0.36]) {
      const exact = -Math.log1p(Math.exp((2 * Math.PI * (0.3 - E)) / omega));
      // The kinks at both ends throw back an amplitude of k'/4k^2 = 6e-4 each, four times which shows at most.
      expect(Math.abs(waveTransmission(steps, E) - exact)).toBeLessThan(3e-3);
    }
  });

  it('converges with the fourth order of its steps', () => {
    const shape = shapeOf(depletionParabola(0.6, 9, 0), [0.26], { deep: true });
    const at = (n: number): number => waveTransmission(waveSteps(shape, n), 0.25);
    const finest = at(64);
    const [coarse, fine] = [Math.abs(at(2) - finest), Math.abs(at(4) - finest)];
    expect(Math.log2(coarse / fine)).toBeGreaterThan(3.7);
    expect(fine).toBeLessThan(1e-5);
  });

  it('passes barriers so thick that amplitudes overflow', () => {
    const shape = shapeOf(wayOf([{ s: [0, 500], u: [1, 1], slope: [0, 0] }, { s: [500, 600], u: [0, 0], slope: [0, 0] }], 0), [1, 0.3]);
    const log = waveTransmission(waveSteps(shape, 1), 0.2);
    expect(log).toBeLessThan(-4000);
    expect(log / -wkbExponent(shape, 0.2)).toBeCloseTo(1, 2);
  });
});
