import type { LocalBands } from './bands.ts';
import { BOLTZMANN, ELECTRON_MASS, ELEMENTARY_CHARGE, EPSILON_0, PLANCK } from './constants.ts';
import { isAlloy, type Boundary, type Material } from './stack.ts';
import { F_M_PER_F_CM, M3_PER_CM3 } from './units.ts';

export interface BarrierHeights {
  /** eV, without image-force lowering; barrierN + barrierP = Eg */ barrierN: number;
  barrierP: number;
  source: 'given' | 'measured' | 'pinned' | 'ideal';
}

/** S of a material: straight between an alloy's ends unless it has its own; 1 where none is known, so an alloy equals its crystals at both ends. */
export function pinningSlope(material: Material, x: number): number {
  if (material.pinningSlope !== undefined || !isAlloy(material)) return material.pinningSlope ?? 1;
  return (1 - x) * (material.first.pinningSlope ?? 1) + x * (material.second.pinningSlope ?? 1);
}

/** E_CNL above Ev, eV: straight between an alloy's ends unless it has its own; undefined where an end that counts lacks it. */
function neutralityLevel(material: Material, x: number): number | undefined {
  if (material.neutralityLevel !== undefined || !isAlloy(material)) return material.neutralityLevel;
  const a = material.first.neutralityLevel;
  const b = material.second.neutralityLevel;
  if (x === 0) return a;
  if (x === 1) return b;
  return a === undefined || b === undefined ? undefined : (1 - x) * a + x * b;
}

/**
 * Barrier of a metal on a semiconductor: phi_Bn = S (phi_m - chi - phi_cnl) + phi_cnl, phi_cnl = Eg - E_CNL.
 * Cowley and Sze, J. Appl. Phys. 36, 3212 (1965); S = 1 is Schottky-Mott, S = 0 Bardeen. E_CNL keeps its height above Ev at every T; a measured or
 * given height stays constant in T for its own carrier.
 *
 * @throws {RangeError} pinning without a neutrality level
 */
export function barrierHeights(source: Extract<Boundary, { kind: 'barrier' }>['source'], material: Material, x: number, bands: LocalBands): BarrierHeights {
  if (source.from !== 'workFunction') {
    const barrierN = source.carrier === 'n' ? source.height : bands.gap - source.height;
    return { barrierN, barrierP: bands.gap - barrierN, source: source.from };
  }
  const slope = source.slope === 'material' ? pinningSlope(material, x) : source.slope;
  let barrierN = source.workFunction - bands.affinity;
  if (slope !== 1) {
    const level = neutralityLevel(material, x);
    if (level === undefined) throw new RangeError(`${material.id} has no charge neutrality level to pin to; give the barrier outright or set pinning to "none"`);
    const phiCnl = bands.gap - level;
    barrierN = slope * (source.workFunction - bands.affinity - phiCnl) + phiCnl;
  }
  return { barrierN, barrierP: bands.gap - barrierN, source: slope === 1 ? 'ideal' : 'pinned' };
}

/**
 * Image-force lowering, eV: sqrt(q E/(4 pi eps)). Sze and Ng, Physics of Semiconductor Devices (2007), section 3.2.4.
 *
 * @param field                      size of the surface field, V/cm, >= 0
 * @param permittivityHighFrequency  relative
 */
export function imageForceLowering(field: number, permittivityHighFrequency: number): number {
  return Math.sqrt((ELEMENTARY_CHARGE * field) / (4 * Math.PI * permittivityHighFrequency * EPSILON_0));
}

/**
 * Characteristic tunnelling energy E00 = (q hbar/2) sqrt(N/(m eps)), eV. Padovani and Stratton, Solid-State Electron. 9, 695 (1966).
 *
 * @param density       charged doping at the metal, cm^-3
 * @param mass          tunnelling mass, m0
 * @param permittivity  static, relative
 */
export function tunnellingEnergy(density: number, mass: number, permittivity: number): number {
  const hbar = PLANCK / (2 * Math.PI);
  return (hbar / 2) * Math.sqrt((density * M3_PER_CM3) / (mass * ELECTRON_MASS * permittivity * EPSILON_0 * F_M_PER_F_CM));
}

/** Regime of a contact by E00/kT: below 0.5 thermionic, to 5 thermionic-field, above field emission (common practice, no source). */
export function transportRegime(e00: number, temperature: number): 'thermionic' | 'thermionic-field' | 'field' {
  const ratio = e00 / (BOLTZMANN * temperature);
  return ratio < 0.5 ? 'thermionic' : ratio <= 5 ? 'thermionic-field' : 'field';
}
