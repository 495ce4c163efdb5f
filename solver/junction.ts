import type { Alignment } from './alignment.ts';
import { localCharge, netDoping } from './charge.ts';
import { ELEMENTARY_CHARGE, EPSILON_0 } from './constants.ts';
import { depletionFrom, type SpaceCharge } from './depletion.ts';
import { neutralLevel } from './fermi-level.ts';
import type { JunctionFigures, Profiles } from './solution.ts';
import type { Stack } from './stack.ts';

/** Neutral psi at one end of a layer, V, or null in an insulator. */
function neutralPsi(stack: Stack, alignment: Alignment, layer: number, z: number): number | null {
  const c = localCharge(stack.layers[layer], z, stack.temperature, stack.assumptions);
  return c.bands.insulator ? null : alignment.ecFlat(layer, z) - neutralLevel(c).ecMinusEf;
}

/**
 * Figures of the interface below layer `index`, with the values at the interface; its capacitance comes from capacitance.ts.
 *
 * Depletion approximation of an abrupt junction: W = sqrt(2 eps Vbi .../q), with the permittivity of each side (Sze and Ng, Physics of Semiconductor
 * Devices, 2007, sections 2.2 and 2.7; from memory); only where the two sides are doped oppositely.
 */
export function junctionFigures(stack: Stack, alignment: Alignment, profiles: Profiles, space: SpaceCharge, sheets: ArrayLike<number>, index: number): Omit<JunctionFigures, 'capacitance'> {
  const above = stack.layers[index];
  const chargeAbove = localCharge(above, above.thickness, stack.temperature, stack.assumptions);
  const chargeBelow = localCharge(stack.layers[index + 1], 0, stack.temperature, stack.assumptions);
  const psiAbove = neutralPsi(stack, alignment, index, above.thickness);
  const psiBelow = neutralPsi(stack, alignment, index + 1, 0);
  const builtIn = psiAbove === null || psiBelow === null ? null : psiBelow - psiAbove;
  const depletionAbove = psiAbove === null ? null : depletionFrom(stack, profiles, space, index, 'bottom');
  const depletionBelow = psiBelow === null ? null : depletionFrom(stack, profiles, space, index + 1, 'top');

  const nA = netDoping(chargeAbove);
  const nB = netDoping(chargeBelow);
  const epsA = chargeAbove.bands.permittivity * EPSILON_0;
  const epsB = chargeBelow.bands.permittivity * EPSILON_0;
  let approximateAbove: number | null = null;
  let approximateBelow: number | null = null;
  // The n side of a junction that depletes lies at the higher neutral potential.
  if (builtIn !== null && nA * nB < 0 && builtIn * (nB - nA) > 0) {
    const [a, b] = [Math.abs(nA), Math.abs(nB)];
    const common = (2 * epsA * epsB * Math.abs(builtIn)) / (ELEMENTARY_CHARGE * (epsA * a + epsB * b));
    approximateAbove = Math.sqrt((common * b) / a);
    approximateBelow = Math.sqrt((common * a) / b);
  }
  const { deltaEc, deltaEv, class: kind, source } = alignment.interfaces[index];
  return {
    index, builtIn, deltaEc, deltaEv, class: kind, alignment: source,
    sheetCharge: sheets[index],
    peakField: peakField(profiles, space, index),
    depletionAbove, depletionBelow,
    depletionApproximationAbove: approximateAbove,
    depletionApproximationBelow: approximateBelow,
  };
}

/** Net charge below this share of the largest met on the way ends a junction's own space charge. */
const SPENT = 0.01;

/** Largest field, V/cm, in the junction's own space charge on both sides. */
function peakField(profiles: Profiles, space: SpaceCharge, index: number): number {
  const above = space.ranges[index];
  const below = space.ranges[index + 1];
  return Math.max(peakFrom(profiles, above[1], above[0]), peakFrom(profiles, below[0], below[1]));
}

/**
 * From the interface at node `start` into its layer, which ends at `end`: as far as the space charge keeps its sign and its size and the field its
 * direction. Space charge that fills the layer to its far end is shared with the junction there; the field along it runs
 * one way, so that a larger one than at this interface is the other junction's.
 */
function peakFrom(profiles: Profiles, start: number, end: number): number {
  const { charge, field } = profiles;
  const step = end > start ? 1 : -1;
  let peak = Math.abs(field[start]);
  let most = Math.abs(charge[start]);
  for (let s = start + step; step * (end - s) >= 0; s += step) {
    most = Math.max(most, Math.abs(charge[s]));
    if (field[s] * field[start] <= 0) return peak;
    peak = Math.max(peak, Math.abs(field[s]));
    if (charge[s] * charge[start] <= 0 || Math.abs(charge[s]) < SPENT * most) return peak;
  }
  return Math.abs(field[start]);
}
