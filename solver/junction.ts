import type { Alignment } from './alignment.ts';
import { localCharge, netDoping } from './charge.ts';
import { ELEMENTARY_CHARGE, EPSILON_0 } from './constants.ts';
import { depletionFrom, layerRanges } from './depletion.ts';
import { neutralLevel } from './fermi-level.ts';
import type { JunctionFigures, Profiles } from './solution.ts';
import type { Stack } from './stack.ts';

/** Neutral psi at one end of a layer, V, or null in an insulator. */
function neutralPsi(stack: Stack, alignment: Alignment, layer: number, z: number): number | null {
  const c = localCharge(stack.layers[layer], z, stack.temperature, stack.assumptions);
  return c.bands.insulator ? null : alignment.ecFlat(layer, z) - neutralLevel(c).ecMinusEf;
}

/**
 * Figures of the interface below layer `index`, with the values at the interface.
 *
 * Depletion approximation of an abrupt junction: W = sqrt(2 eps Vbi .../q), with the permittivity of each side (Sze and Ng, Physics of Semiconductor
 * Devices, 2007, eqs. 2.15 and 2.103); only where the two sides are doped oppositely. Capacitance: both solved depletion widths in
 * series, eps/W each.
 */
export function junctionFigures(stack: Stack, alignment: Alignment, profiles: Profiles, sheets: ArrayLike<number>, index: number): JunctionFigures {
  const above = stack.layers[index];
  const chargeAbove = localCharge(above, above.thickness, stack.temperature, stack.assumptions);
  const chargeBelow = localCharge(stack.layers[index + 1], 0, stack.temperature, stack.assumptions);
  const psiAbove = neutralPsi(stack, alignment, index, above.thickness);
  const psiBelow = neutralPsi(stack, alignment, index + 1, 0);
  const builtIn = psiAbove === null || psiBelow === null ? null : psiBelow - psiAbove;
  const depletionAbove = psiAbove === null ? null : depletionFrom(stack, profiles, index, 'bottom');
  const depletionBelow = psiBelow === null ? null : depletionFrom(stack, profiles, index + 1, 'top');

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
  const capacitance = depletionAbove && depletionBelow ? 1 / (depletionAbove / epsA + depletionBelow / epsB) : null;
  const { deltaEc, deltaEv, class: kind, source } = alignment.interfaces[index];
  return {
    index, builtIn, deltaEc, deltaEv, class: kind, alignment: source,
    sheetCharge: sheets[index],
    peakField: peakField(stack, profiles, index),
    depletionAbove, depletionBelow,
    depletionApproximationAbove: approximateAbove,
    depletionApproximationBelow: approximateBelow,
    capacitance,
  };
}

/** Largest field, V/cm, in the halves of the two layers that lie towards the interface (the others belong to their neighbours). */
function peakField(stack: Stack, profiles: Profiles, index: number): number {
  const ranges = layerRanges(profiles, stack.layers.length);
  const z0 = profiles.z[ranges[index][1]];
  let peak = 0;
  for (const l of [index, index + 1]) {
    const reach = stack.layers[l].thickness / 2;
    for (let s = ranges[l][0]; s <= ranges[l][1]; s++) if (Math.abs(profiles.z[s] - z0) <= reach) peak = Math.max(peak, Math.abs(profiles.field[s]));
  }
  return peak;
}
