import type { Result } from '../result/types.ts';
import { energyDistribution, statesDistribution } from './band-filling.ts';
import { fermi } from './marks/occupancy.ts';
import { hereAt } from './rail.ts';

/** What the rail draws at one energy. */
export interface RailRow {
  /** eV, on the plate's axis */ energy_eV: number;
  /** share of the states that is filled, 0 to 1 */ occupancy: number;
  /** g(E), cm^-3 eV^-1; null in the gap and in an insulator, of whose bands no states are counted */ states: number | null;
  /** g f above the gap, g (1 - f) below it, cm^-3 eV^-1 */ carriers: number | null;
}

/** Even steps over the axis; the Fermi level and the ends of the thermal width stand between them. */
const STEPS = 16;

/**
 * The rail as figures, from the highest energy down.
 *
 * @param depth_nm  held within the stack
 * @param domain    energies of the axis, eV
 */
export function railRows(result: Result, depth_nm: number, domain: readonly [number, number]): RailRow[] {
  const here = hereAt(result, depth_nm);
  const layer = result.layers[here.layer];
  const { ec, ev, ef, kT } = here;
  const even = Array.from({ length: STEPS + 1 }, (_, i) => domain[0] + ((domain[1] - domain[0]) * i) / STEPS);
  const marks = [ef - Math.log(9) * kT, ef, ef + Math.log(9) * kT].filter((e) => e > domain[0] && e < domain[1]);
  const band = (e: number): { s: number; eta: number; a: number; states: number } | null => {
    if (layer.insulator) return null;
    if (e > ec && layer.nc_cm3 > 0) return { s: (e - ec) / kT, eta: (ef - ec) / kT, a: layer.kane_n_per_eV * kT, states: layer.nc_cm3 / kT };
    if (e < ev && layer.nv_cm3 > 0) return { s: (ev - e) / kT, eta: (ev - ef) / kT, a: layer.kane_p_per_eV * kT, states: layer.nv_cm3 / kT };
    return null;
  };
  return [...even, ...marks]
    .sort((p, q) => q - p)
    .map((energy_eV) => {
      const at = band(energy_eV);
      return {
        energy_eV,
        occupancy: fermi((energy_eV - ef) / kT),
        states: at && at.states * Math.exp(statesDistribution(at.s, at.a)),
        carriers: at && at.states * Math.exp(energyDistribution(at.s, at.eta, at.a)),
      };
    });
}
