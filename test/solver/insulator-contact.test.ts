import { describe, expect, it } from 'vitest';
import { METAL_BAND, WAVE } from '../../solver/barrier-shape.ts';
import { BOLTZMANN } from '../../solver/constants.ts';
import { integrate } from '../../solver/quadrature.ts';
import { solveStack } from '../../solver/solve-stack.ts';
import { isRefusal, type Solution } from '../../solver/solution.ts';
import type { CrystalMaterial } from '../../solver/stack.ts';
import { CM_PER_NM } from '../../solver/units.ts';
import { conductance, metal, SILICON } from './contact-fixtures.ts';
import { dopant } from './point-fixtures.ts';
import { layer, stackOf } from './stack-fixtures.ts';

const OXIDE: CrystalMaterial = { id: 'oxide', insulator: true, gap: { zeroK: 9, alpha: 0, beta: 1 }, affinity: 1, affinityShare: 0.5, permittivity: 3.9, permittivityHighFrequency: 2.2, tunnellingMass: { electron: 0.42, hole: 0.42 } };
const WAVE_NM = WAVE * CM_PER_NM ** 2;

function solved(nm: number, height: number, T: number): Solution {
  const answer = solveStack(stackOf([layer('oxide', nm, [], OXIDE), layer('n', 60, [dopant('donor', 1e20, { model: 'complete' })], SILICON)], { T, top: metal(height) }), { accuracy: 1e-7, contacts: false });
  if (isRefusal(answer)) throw new Error(answer.reason);
  return answer;
}

/** The contact whose metal meets EF where the semiconductor has it, so that all bands are flat: a rectangular barrier and nothing else. */
function flat(nm: number, T: number): { s: Solution; top: number; edge: number } {
  const start = solved(nm, 3, T);
  const inside = start.profiles.layer.indexOf(1);
  const step = start.profiles.ec[inside - 1] - start.profiles.ec[inside];
  const edge = start.layers[1].ecMinusEf;
  return { s: solved(nm, step + edge, T), top: step + edge, edge };
}

describe('a thin insulator between a metal and a degenerate semiconductor with flat bands', () => {
  it('has the bands flat indeed', () => {
    const { s, top, edge } = flat(1, 300);
    const { ec, layer: of } = s.profiles;
    for (let i = 0; i < ec.length; i++) expect(Math.abs(ec[i] - (of[i] === 0 ? top : edge))).toBeLessThan(1e-5);
  });

  it('conducts by the wave equation as the closed form of a rectangular barrier of three masses, integrated over the occupancy', () => {
    for (const T of [77, 300, 500]) {
      for (const nm of [0.5, 1, 2]) {
        const { s, top, edge } = flat(nm, T);
        const kT = BOLTZMANN * T;
        const transmission = (E: number): number => {
          const v1 = Math.sqrt(WAVE_NM * (METAL_BAND + E));
          const v3 = Math.sqrt((WAVE_NM * (E - edge)) / 0.26);
          const nu = Math.sqrt((WAVE_NM * (top - E)) / 0.42);
          const phase = nu * 0.42 * nm;
          return (4 * v3) / v1 / ((1 + v3 / v1) ** 2 * Math.cosh(phase) ** 2 + (v3 / nu - nu / v1) ** 2 * Math.sinh(phase) ** 2);
        };
        // E = edge + w^2 takes the root at the edge out.
        const reach = Math.sqrt(30 * kT - edge);
        const { value } = integrate((w) => (2 * w * transmission(edge + w * w)) / (1 + Math.exp((edge + w * w) / kT)), [0, 0.5 * reach, reach], 1e-9, 0, 200);
        const exact = Math.log((110 / BOLTZMANN ** 2) * value);
        const got = conductance(s, 'electron', { transmission: 'exact' });
        // Flat to some 1e-6 eV, which a tunnelling exponent feels as a share of itself.
        expect(Math.abs(got.log - exact), `${T} K, ${nm} nm`).toBeLessThan(1e-4);
      }
    }
  });

  it('conducts by WKB as exp(-2 kappa d) over the occupancy, and closer to the wave equation than the factors before it', () => {
    for (const nm of [1, 2]) {
      const { s, top, edge } = flat(nm, 300);
      const kT = BOLTZMANN * 300;
      const { value } = integrate((E) => Math.exp(-2 * nm * Math.sqrt(WAVE_NM * 0.42 * (top - E))) / (1 + Math.exp(E / kT)), [edge, 0, 30 * kT], 1e-10, 0, 200);
      const wkb = conductance(s);
      expect(Math.abs(wkb.log - Math.log((110 / BOLTZMANN ** 2) * value)), `${nm} nm`).toBeLessThan(1e-4);
      // Prefactors of a rectangle: 16 v1 v3 nu^2/((v1^2 + nu^2)(v3^2 + nu^2)), at most 16/4.
      const ratio = Math.exp(conductance(s, 'electron', { transmission: 'exact' }).log - wkb.log);
      expect(ratio).toBeGreaterThan(0.3);
      expect(ratio).toBeLessThan(4);
    }
  });
});
