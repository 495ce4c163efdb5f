import { decimalText, densityText, fieldText, figureText } from '../../src/result/figure-text.ts';
import type { ProfileResult, Result } from '../../src/result/types.ts';

/** What the diagram says at one depth. Energies eV, densities cm^-3. */
export interface Reading {
  z_nm: number;
  /** index of the layer */ layer: number;
  ec_minus_ef_eV: number;
  ef_minus_ev_eV: number;
  n_cm3: number;
  p_cm3: number;
  potential_V: number;
  field_V_cm: number;
}

/**
 * Figures at a depth, between the mesh nodes on either side of it: straight in potential, energies and field, straight in the logarithm of the densities, since
 * those follow the energies by an exponential.
 *
 * @param z_nm    held within the stack
 * @param layer   the layer meant, where z lies on an interface; by default the lower one
 * @returns       null for a result without a profile
 */
export function readingAt(result: Result, z_nm: number, layer?: number): Reading | null {
  const p = result.profile;
  const last = p.z_nm.length - 1;
  if (last < 1) return null;
  const z = Math.min(Math.max(z_nm, p.z_nm[0]), p.z_nm[last]);
  let i = lowerNode(p.z_nm, z);
  if (layer !== undefined && p.layer[i] > layer) i = p.layer.lastIndexOf(layer) - 1;
  // An interface is two nodes at one depth: between them there is nothing to read.
  while (i > 0 && p.layer[i] !== p.layer[i + 1]) i--;
  const width = p.z_nm[i + 1] - p.z_nm[i];
  const u = width > 0 ? (z - p.z_nm[i]) / width : 0;
  const straight = (list: number[]): number => list[i] + u * (list[i + 1] - list[i]);
  const even = (list: number[]): number => (list[i] > 0 && list[i + 1] > 0 ? list[i] * (list[i + 1] / list[i]) ** u : straight(list));
  return {
    z_nm: z, layer: p.layer[i], ec_minus_ef_eV: straight(difference(p, 'ec_eV', i)), ef_minus_ev_eV: -straight(difference(p, 'ev_eV', i)),
    n_cm3: even(p.n_cm3), p_cm3: even(p.p_cm3), potential_V: straight(p.potential_V), field_V_cm: straight(p.field_V_cm),
  };
}

/** Edge less Fermi level, at nodes i and i + 1 only. */
function difference(p: ProfileResult, edge: 'ec_eV' | 'ev_eV', i: number): number[] {
  const list: number[] = [];
  for (const k of [i, i + 1]) list[k] = p[edge][k] - p.ef_eV[k];
  return list;
}

/** The last node at or above z that has one below it. */
function lowerNode(z: readonly number[], at: number): number {
  let [low, high] = [0, z.length - 1];
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (z[middle] <= at) low = middle;
    else high = middle;
  }
  return low;
}

export interface ReadingPart {
  symbol: string;
  figure: string;
  unit: string;
}

export function depthText(z_nm: number): string {
  return z_nm >= 1e4 ? `${figureText(z_nm / 1000, 4)} µm` : `${decimalText(z_nm, z_nm < 100 ? 2 : 1)} nm`;
}

export function readingParts(r: Reading): ReadingPart[] {
  return [
    { symbol: 'Ec − EF', figure: decimalText(r.ec_minus_ef_eV), unit: 'eV' },
    { symbol: 'EF − Ev', figure: decimalText(r.ef_minus_ev_eV), unit: 'eV' },
    { symbol: 'n', figure: densityText(r.n_cm3), unit: 'cm⁻³' },
    { symbol: 'p', figure: densityText(r.p_cm3), unit: 'cm⁻³' },
    { symbol: 'ψ', figure: decimalText(r.potential_V), unit: 'V' },
    { symbol: 'field', figure: fieldText(r.field_V_cm), unit: 'kV/cm' },
  ];
}

export function readingSentence(r: Reading, layer: string): string {
  return [`${depthText(r.z_nm)}, ${layer}`, ...readingParts(r).map((p) => `${p.symbol} ${p.figure} ${p.unit}`)].join('; ');
}
