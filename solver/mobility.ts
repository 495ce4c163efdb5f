import { isAlloy, type Material, type MobilityLaw } from './stack.ts';

/**
 * Mobility, cm^2/(V s).
 *
 * @param N  sum of all active dopants, cm^-3, >= 0
 *
 * min + (max - min)/[1 + (N/reference)^exponent]: Caughey and Thomas, Proc. IEEE 55, 2192 (1967), eq. (1) (number from memory).
 */
export function mobility(law: MobilityLaw, N: number): number {
  if (typeof law === 'number') return law;
  return law.min + (law.max - law.min) / (1 + Math.pow(N / law.reference, law.exponent));
}

/**
 * Mobility of a carrier in a material at composition x; null when no law is known.
 *
 * An alloy has a law of its own or, at its very ends, those of the crystals. Between them nothing is interpolated: alloy scattering makes
 * the mobility of a mixture smaller than any mean of its ends.
 */
export function carrierMobility(material: Material, carrier: 'electron' | 'hole', x: number, N: number): number | null {
  let law = material.mobility?.[carrier];
  if (law === undefined && isAlloy(material)) {
    if (x === 0) law = material.first.mobility?.[carrier];
    else if (x === 1) law = material.second.mobility?.[carrier];
  }
  return law === undefined ? null : mobility(law, N);
}
