import { isAlloy, type CrystalMaterial, type Material } from './stack.ts';

export type Carrier = 'electron' | 'hole';

/** A constant of a carrier: straight between an alloy's ends, and only an end that counts has to know it; undefined where one is missing. */
function constantOf(material: Material, x: number, read: (crystal: CrystalMaterial) => number | undefined): number | undefined {
  if (!isAlloy(material)) return read(material);
  const a = x === 1 ? 0 : read(material.first);
  const b = x === 0 ? 0 : read(material.second);
  return a === undefined || b === undefined ? undefined : (1 - x) * a + x * b;
}

/** Tunnelling mass of a carrier, m0. @param x  share of the alloy's `second` */
export function tunnellingMass(material: Material, x: number, carrier: Carrier): number | undefined {
  return constantOf(material, x, (crystal) => crystal.tunnellingMass?.[carrier]);
}

/** Richardson constant of a carrier, A/(cm^2 K^2). @param x  share of the alloy's `second` */
export function richardson(material: Material, x: number, carrier: Carrier): number | undefined {
  return constantOf(material, x, (crystal) => crystal.richardson?.[carrier]);
}
