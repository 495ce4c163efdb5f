import { describe, expect, it } from 'vitest';
import { BOLTZMANN, ELEMENTARY_CHARGE } from '../../solver/constants.ts';
import { polarisationAlongMetalFace, polarisationSheets } from '../../solver/polarisation.ts';
import { solveStack } from '../../solver/solve-stack.ts';
import type { Solution } from '../../solver/solution.ts';
import type { AlloyMaterial, Boundary, CrystalMaterial, Stack } from '../../solver/stack.ts';
import checksF from '../fixtures/checks-f.json';
import { expectSound } from './invariants.ts';
import { crystalWith, dopant, holdAgainst } from './point-fixtures.ts';
import { barrier, layer, stackOf } from './stack-fixtures.ts';

/** Constants of Ambacher et al. (1999) as the checks state them, straight in x; the affinity follows dEc = 0.7 dEg at each x. */
const gap = (x: number): number => 6.13 * x + 3.42 * (1 - x) - x * (1 - x);
const GAN: CrystalMaterial = {
  ...crystalWith(gap(0), 1e18, 1e18), id: 'gan', affinity: 4, permittivity: 9.5, permittivityHighFrequency: 9.5, electronMass: [0.2], holeMass: [1.5],
  polarisation: { spontaneous: -0.029e-4, e31: -0.49e-4, e33: 0.73e-4, c13: 103, c33: 405, lattice: 3.189e-8 },
};
const ALN: CrystalMaterial = {
  ...GAN, id: 'aln', gap: { zeroK: gap(1), alpha: 0, beta: 1 }, affinity: 4 - 0.7 * (gap(1) - gap(0)), permittivity: 9,
  polarisation: { spontaneous: -0.081e-4, e31: -0.6e-4, e33: 1.46e-4, c13: 108, c33: 373, lattice: 3.112e-8 },
};
const ALGAN: AlloyMaterial = { id: 'algan', first: GAN, second: ALN, bowing: { gap: 1, affinity: -0.7 } };
const STRAINED = { face: 'metal', strain: 'pseudomorphic', template: GAN } as const;

/** Undoped AlGaN of `x` on undoped GaN without a field below. */
function gas(x: number, thickness_nm: number, top: Boundary): Stack {
  return stackOf([{ ...layer('barrier', thickness_nm, [], ALGAN), x: { kind: 'constant', value: x } }, layer('channel', 1500, [], GAN)], { top, bottom: { kind: 'open', sheetCharge: 0 }, crystal: STRAINED });
}

/** Electrons of one layer, cm^-2, by the trapezoidal rule over the profile. */
function sheet(s: Solution, l: number): number {
  const { z, n, layer: of } = s.profiles;
  let sum = 0;
  for (let i = 0; i + 1 < z.length; i++) if (of[i] === l && of[i + 1] === l) sum += 0.5 * (z[i + 1] - z[i]) * (n[i] + n[i + 1]);
  return sum;
}
const solved = (stack: Stack): Solution => expectSound(solveStack(stack, { accuracy: 1e-6 }), 1e-6);

describe('polarisation against published constants (sources in checks-f.json)', () => {
  it('AlN strained to GaN (pol-ambacher-aln)', () => {
    const along = (x: number): number => polarisationAlongMetalFace(ALGAN, x, STRAINED);
    holdAgainst(checksF, 'pol-ambacher-aln', 'P_PE', (along(1) - ALN.polarisation!.spontaneous) * 1e4);
    holdAgainst(checksF, 'pol-ambacher-aln', 'sigma/e', (along(0) - along(1)) / ELEMENTARY_CHARGE);
  });
});

describe('electron gases against published and exact figures (sources in checks-f.json)', () => {
  it('2deg-classical-exact: density, level and spill-over without subbands', () => {
    const s = solved(gas(0.25, 20, barrier(0.84 + 1.3 * 0.25)));
    const at = s.profiles.layer.indexOf(1);
    const n = sheet(s, 1);
    holdAgainst(checksF, '2deg-classical-exact', 'electrons in GaN', n);
    holdAgainst(checksF, '2deg-classical-exact', 'EF-Ec in GaN at the interface', -s.profiles.ec[at]);
    holdAgainst(checksF, '2deg-classical-exact', 'electrons spilt into the barrier', sheet(s, 0));
    // The published closed form with one subband gives 1.069e13.
    holdAgainst(checksF, '2deg-classical-exact', 'n_s / triangular-well closed form', n / 1.0686e13);
  });

  it('2deg-ambacher-abstract: 30 nm under a nickel gate', () => {
    for (const x of [0.15, 0.31]) {
      const n = sheet(solved(gas(x, 30, barrier(0.84 + 1.3 * x))), 1);
      holdAgainst(checksF, '2deg-ambacher-abstract', `n_s x=${x}`, n);
      holdAgainst(checksF, '2deg-ambacher-abstract', `n_s x=${x}, 30 nm by the closed form`, n);
    }
  });

  it('2deg-ibbetson-tcr: the thinnest barrier that holds a gas below surface donors', () => {
    const donors: Boundary = { kind: 'pinned', level: 1.65 };
    // The gas is there once the level has reached Ec at the interface.
    let [low, high] = [1, 10];
    for (let i = 0; i < 20; i++) {
      const middle = 0.5 * (low + high);
      const s = solved(gas(0.34, middle, donors));
      if (s.profiles.ec[s.profiles.layer.indexOf(1)] > 0) low = middle;
      else high = middle;
    }
    holdAgainst(checksF, '2deg-ibbetson-tcr', 't_cr', low);
    // Above it n_s = sigma (1 - t_cr/t), but for the further rise of the level.
    const sigma = polarisationSheets(gas(0.34, 20, donors))[0];
    expect(Math.abs(sheet(solved(gas(0.34, 20, donors)), 1) / (sigma * (1 - low / 20)) - 1)).toBeLessThan(0.1);
  });

  it('pinchoff-algan: the gate shift that empties the channel', () => {
    // At equilibrium holes gather under a gate below Ev, so the straight line is laid through small shifts and led on to zero.
    const at = (shift: number): number => sheet(solved(gas(0.3, 25, barrier(0.84 + 1.3 * 0.3 + shift))), 1);
    const [a, b] = [at(0), at(1)];
    holdAgainst(checksF, 'pinchoff-algan', 'V_off', -a / (a - b));
  });

  it('2deg-sze-7.5: a modulation-doped pair by charge control', () => {
    // The source states no gaps; wide ones keep holes from the gate down to pinch-off.
    const gaas = { ...crystalWith(1.42, 4.4e17, 8e18), id: 'gaas', affinity: 4.07, permittivity: 12.9 };
    const algaas = { ...crystalWith(3.5, 6e17, 1e19), id: 'algaas', affinity: 4.07 - 0.23, permittivity: 12.3 };
    const at = (shift: number): Solution => {
      const supply = layer('supply', 40, [dopant('donor', 2e18, { model: 'complete' })], algaas);
      return solved(stackOf([supply, layer('spacer', 3, [], algaas), layer('channel', 1000, [dopant('acceptor', 1e14, { model: 'complete' })], gaas)], { top: barrier(0.85 + shift) }));
    };
    // The line holds where the gate empties the supply; there it is laid through the solved density and led back to no shift.
    const [first, second] = [at(1.1), at(1.4)];
    expect([first, second].map((s) => s.layers[0].fullyDepleted)).toEqual([true, true]);
    const [a, b] = [sheet(first, 2), sheet(second, 2)];
    holdAgainst(checksF, '2deg-sze-7.5', 'n_s', a + ((a - b) * 1.1) / 0.3);
    // Without the shift the supply keeps a neutral part, which the line leaves out: the gas holds less than the line says.
    expect(at(0).layers[0].fullyDepleted).toBe(false);
    expect(sheet(at(0), 2)).toBeLessThan(2.31e12);
  });
});

describe('offsets against published figures (sources in checks-f.json)', () => {
  it('het-neamen-9.8: germanium on gallium arsenide by affinities', () => {
    const T = 0.0259 / BOLTZMANN;
    const ge: CrystalMaterial = { ...crystalWith(0.67, (2.4e13 ** 2 * Math.exp(0.67 / 0.0259)) / 6e18, 6e18, T), id: 'ge', affinity: 4.13 };
    const gaas: CrystalMaterial = { ...crystalWith(1.43, 4.7e17, 7e18, T), id: 'gaas', affinity: 4.07 };
    const s = solved(stackOf([layer('n', 1500, [dopant('donor', 1e16, { model: 'complete' })], ge), layer('P', 1500, [dopant('acceptor', 1e16, { model: 'complete' })], gaas)], { T, assumptions: { statistics: 'boltzmann' } }));
    const [j] = s.junctions;
    holdAgainst(checksF, 'het-neamen-9.8', 'dEc', j.deltaEc);
    holdAgainst(checksF, 'het-neamen-9.8', 'dEv', -j.deltaEv);
    holdAgainst(checksF, 'het-neamen-9.8', 'Vbi', -j.builtIn!);
    expect(j.class).toBe('straddling');
  });

  it('off-inas-gasb: a broken gap by affinities already', () => {
    const inas: CrystalMaterial = { ...crystalWith(0.354, 9e16, 7e18), id: 'inas', affinity: 4.9 };
    const gasb: CrystalMaterial = { ...crystalWith(0.726, 2e17, 2e19), id: 'gasb', affinity: 4.06 };
    const [j] = solved(stackOf([layer('a', 300, [dopant('donor', 1e16)], inas), layer('b', 300, [dopant('acceptor', 1e16)], gasb)])).junctions;
    expect(j.class).toBe('broken');
    // Ec of the upper below Ev of the lower: dEc less the gap below.
    holdAgainst(checksF, 'off-inas-gasb', 'overlap', j.deltaEc - 0.726);
  });
});
