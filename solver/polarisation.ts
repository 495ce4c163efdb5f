import { ELEMENTARY_CHARGE } from './constants.ts';
import { profileAt } from './profile.ts';
import { isAlloy, type Crystal, type Layer, type Material, type Polarisation, type Stack } from './stack.ts';

/** Polarisation constants of a material at x: straight between the ends of an alloy (Ambacher et al. 2000, "linear" form); null where an end has none. */
export function polarisationOf(material: Material, x: number): Polarisation | null {
  if (!isAlloy(material)) return material.polarisation ?? null;
  const a = material.first.polarisation;
  const b = material.second.polarisation;
  if (!a || !b) return null;
  const mix = (p: number | undefined, q: number | undefined): number | undefined => (p === undefined || q === undefined ? undefined : (1 - x) * p + x * q);
  return { spontaneous: (1 - x) * a.spontaneous + x * b.spontaneous, e31: mix(a.e31, b.e31), e33: mix(a.e33, b.e33), c13: mix(a.c13, b.c13), c33: mix(a.c33, b.c33), lattice: mix(a.lattice, b.lattice) };
}

/**
 * Polarisation along the metal-face direction, C/cm^2: spontaneous plus, when strained to a lattice a0,
 * P = 2 (a0 - a)/a (e31 - e33 c13/c33). Ambacher et al., J. Appl. Phys. 85, 3222 (1999), eqs. (4)-(6)
 * (numbers from memory).
 *
 * @throws {RangeError} a strained layer without the constants it takes
 */
export function polarisationAlongMetalFace(material: Material, x: number, crystal: Crystal): number {
  const p = polarisationOf(material, x);
  if (!p) return 0;
  if (crystal.strain === 'relaxed') return p.spontaneous;
  const template = crystal.template ? polarisationOf(crystal.template, crystal.templateX ?? 0) : null;
  if (!template?.lattice) throw new RangeError('a pseudomorphic stack needs a template with a lattice constant');
  const { e31, e33, c13, c33, lattice } = p;
  if (e31 === undefined || e33 === undefined || c13 === undefined || c33 === undefined || !lattice) {
    throw new RangeError(`${material.id} is strained but lacks one of e31, e33, c13, c33, lattice`);
  }
  return p.spontaneous + ((2 * (template.lattice - lattice)) / lattice) * (e31 - (e33 * c13) / c33);
}

/**
 * Sheet charge of polarisation at each inner interface, +q, cm^-2 [layers - 1].
 *
 * sigma = P(below) - P(above), projected on the growth axis, which points out of the top: on the metal face that is the metal-face direction
 * itself. So a strained AlGaN above GaN gets a positive charge there. Ambacher et al. (1999), eq. (7) (number from memory).
 */
export function polarisationSheets(stack: Stack): Float64Array {
  const sheets = new Float64Array(Math.max(0, stack.layers.length - 1));
  const crystal = stack.crystal;
  if (!crystal) return sheets;
  const sign = crystal.face === 'metal' ? 1 : -1;
  const at = (layer: Layer, z: number): number => sign * polarisationAlongMetalFace(layer.material, profileAt(layer.x, z, layer.thickness), crystal);
  for (let l = 0; l < sheets.length; l++) {
    const [above, below] = [stack.layers[l], stack.layers[l + 1]];
    sheets[l] = (at(below, 0) - at(above, above.thickness)) / ELEMENTARY_CHARGE;
  }
  return sheets;
}
